import { useState } from 'react';
import { Button } from 'react-aria-components';
import type { StudyIssue } from '../../contract/requests';
import { Check } from '../controls/check';
import { LabelledField } from '../controls/labelled-field';
import { Segmented } from '../controls/segmented';
import { numbered } from '../numbered';
import { type AtomDraft, EMPTY_ATOM, type StudyDraft } from '../state/draft';
import { type PastedAtoms, readPastedAtoms } from '../state/pasted-atoms';
import { numberOrText } from '../state/study-text';
import { withoutAtom } from '../state/without-atom';

interface MoleculeEditorProps {
  readonly draft: StudyDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

const AXES = ['x', 'y', 'z'] as const;

/** The molecule as a table of atoms, with charge, multiplicity and the unit of every length. */
export function MoleculeEditor({ draft, issues, onEdit }: MoleculeEditorProps) {
  const editAtom = (index: number, change: Partial<AtomDraft>) =>
    onEdit((current) => ({
      ...current,
      atoms: current.atoms.map((atom, other) => (other === index ? { ...atom, ...change } : atom)),
    }));
  return (
    <div className="moleculeEditor">
      <div className="fieldRow">
        <Segmented
          isLabelShown
          label="Lengths in"
          options={[
            { key: 'angstrom', text: 'Å', name: 'ångström' },
            { key: 'bohr', text: 'a₀', name: 'bohr' },
          ]}
          chosen={draft.unit}
          onChoose={(unit) => onEdit((current) => ({ ...current, unit }))}
        />
        <LabelledField
          label="Charge"
          className="short"
          value={draft.charge}
          isWrong={isAt(issues, 'molecule.charge')}
          onChange={(charge) => onEdit((current) => ({ ...current, charge }))}
        />
        <LabelledField
          label="Multiplicity"
          className="short"
          placeholder="lowest"
          value={draft.multiplicity}
          isWrong={isAt(issues, 'molecule.multiplicity')}
          onChange={(multiplicity) => onEdit((current) => ({ ...current, multiplicity }))}
        />
      </div>
      <table className="atoms">
        <thead>
          <tr>
            <th scope="col">Atom</th>
            <th scope="col">Element</th>
            {AXES.map((axis) => (
              <th scope="col" key={axis}>
                {axis}
              </th>
            ))}
            <th scope="col">Isotope</th>
            <th scope="col">Ghost</th>
            <td />
          </tr>
        </thead>
        <tbody>
          {numbered(draft.atoms).map(({ number: index, item: atom }) => (
            <AtomRow
              key={index}
              index={index}
              atom={atom}
              issues={issues}
              onEdit={editAtom}
              onRemove={() => onEdit((current) => withoutAtom(current, index))}
            />
          ))}
        </tbody>
      </table>
      <div className="fieldRow">
        <Button
          className="quietButton"
          onPress={() => onEdit((current) => ({ ...current, atoms: [...current.atoms, EMPTY_ATOM] }))}
        >
          Add an atom
        </Button>
        <span className="hint">
          Atoms are counted from 0, as in the study file. A ghost keeps its functions, without nucleus and
          electrons.
        </span>
      </div>
      <PasteAtoms onPaste={(atoms) => onEdit((current) => ({ ...current, atoms }))} />
    </div>
  );
}

interface AtomRowProps {
  readonly index: number;
  readonly atom: AtomDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (index: number, change: Partial<AtomDraft>) => void;
  readonly onRemove: () => void;
}

function AtomRow({ index, atom, issues, onEdit, onRemove }: AtomRowProps) {
  const place = `molecule.atoms[${index}]`;
  return (
    <tr data-wrong={isAt(issues, place) || undefined}>
      <th scope="row">{index}</th>
      <td>
        <LabelledField
          label={`Element of atom ${index}`}
          isLabelHidden
          value={atom.element}
          isWrong={isAt(issues, `${place}.element`)}
          onChange={(element) => onEdit(index, { element })}
        />
      </td>
      {AXES.map((axis, component) => (
        <td key={axis}>
          <LabelledField
            label={`${axis} of atom ${index}`}
            isLabelHidden
            className="coordinate"
            value={atom.at[component] ?? ''}
            isWrong={
              isAt(issues, `${place}.at`) && typeof numberOrText(atom.at[component] ?? '') !== 'number'
            }
            onChange={(value) => {
              const [x, y, z] = atom.at.map((old, other) => (other === component ? value : old));
              onEdit(index, { at: [x ?? '', y ?? '', z ?? ''] });
            }}
          />
        </td>
      ))}
      <td>
        <LabelledField
          label={`Isotope of atom ${index}, mass number`}
          isLabelHidden
          placeholder="usual"
          value={atom.isotope}
          isWrong={isAt(issues, `${place}.isotope`)}
          onChange={(isotope) => onEdit(index, { isotope })}
        />
      </td>
      <td>
        <Check
          name={`Atom ${index} is a ghost`}
          isChecked={atom.ghost}
          onChange={(ghost) => onEdit(index, { ghost })}
        >
          {null}
        </Check>
      </td>
      <td>
        <Button className="quietButton" aria-label={`Remove atom ${index}`} onPress={onRemove}>
          ×
        </Button>
      </td>
    </tr>
  );
}

/** Takes the place of the whole table, and only when every line reads. */
function PasteAtoms({ onPaste }: { readonly onPaste: (atoms: readonly AtomDraft[]) => void }) {
  const [text, setText] = useState('');
  const [outcome, setOutcome] = useState<PastedAtoms>();
  return (
    <div className="pasteAtoms">
      <LabelledField
        label="Or paste lines: element x y z"
        lines={3}
        value={text}
        placeholder={'O  0.000  0.000  0.117\nH  0.000  0.757 -0.470'}
        isWrong={outcome?.ok === false}
        onChange={setText}
      />
      <div className="fieldRow">
        <Button
          className="quietButton"
          onPress={() => {
            // never disabled: a button that loses its focus would leave the keyboard outside of the editor
            if (text.trim() === '') return;
            const pasted = readPastedAtoms(text);
            setOutcome(pasted);
            if (!pasted.ok) return;
            onPaste(pasted.atoms);
            setText('');
          }}
        >
          Replace the atoms
        </Button>
        {outcome?.ok === false && (
          <span className="note" role="alert">
            Line {outcome.line}, “{outcome.text}”, is not an atom. <em>Write each as: element x y z.</em>
          </span>
        )}
      </div>
    </div>
  );
}

const isAt = (issues: readonly StudyIssue[], place: string): boolean =>
  issues.some(
    (issue) =>
      issue.place === place || issue.place.startsWith(`${place}.`) || issue.place.startsWith(`${place}[`),
  );
