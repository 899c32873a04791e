import {
  Autocomplete,
  Input,
  ListBox,
  ListBoxItem,
  SearchField,
  Text,
  useFilter,
} from 'react-aria-components';
import { LabelledField } from '../controls/labelled-field';
import { Segmented } from '../controls/segmented';
import type { BasisDraft, StudyDraft } from '../state/draft';
import { useWindowState } from '../state/window-context';

interface BasisEditorProps {
  readonly draft: StudyDraft;
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

/** A basis set by its name, or its numbers written out. */
export function BasisEditor({ draft, onEdit }: BasisEditorProps) {
  const editBasis = (change: Partial<BasisDraft>) =>
    onEdit((current) => ({ ...current, basis: { ...current.basis, ...change } }));
  return (
    <div className="basisEditor">
      <Segmented
        label="Where the basis set comes from"
        options={[
          { key: 'named', text: 'Published' },
          { key: 'custom', text: 'Own numbers' },
        ]}
        chosen={draft.basis.kind}
        onChoose={(kind) =>
          editBasis({ kind, custom: draft.basis.custom === '' ? exampleBasis(draft) : draft.basis.custom })
        }
      />
      {draft.basis.kind === 'named' ? (
        <BasisList draft={draft} onChoose={(name) => editBasis({ name })} />
      ) : (
        <LabelledField
          label="Basis set, as in the study file: shells, evenTempered, scaleFactors by element, or optimiseScale"
          lines={16}
          className="code"
          value={draft.basis.custom}
          onChange={(custom) => editBasis({ custom })}
        />
      )}
    </div>
  );
}

function BasisList({
  draft,
  onChoose,
}: {
  readonly draft: StudyDraft;
  readonly onChoose: (name: string) => void;
}) {
  const bases = useWindowState(({ catalogue }) => catalogue.bases);
  const { contains } = useFilter({ sensitivity: 'base' });
  const wanted = new Set(draft.atoms.map(({ element }) => element.trim().toLowerCase()));
  const covers = (elements: readonly string[]) => {
    const has = new Set(elements.map((element) => element.toLowerCase()));
    return [...wanted].every((element) => has.has(element));
  };
  const chosen = bases.find(({ name }) => name.toLowerCase() === draft.basis.name.toLowerCase());
  return (
    <Autocomplete filter={contains}>
      <SearchField className="field" aria-label="Find a basis set" autoFocus>
        <Input placeholder="Find a basis set" />
      </SearchField>
      <ListBox
        className="list basisList"
        aria-label="Basis sets"
        selectionMode="single"
        disallowEmptySelection
        selectedKeys={chosen === undefined ? [] : [chosen.name]}
        items={bases.map((basis) => ({ ...basis, id: basis.name }))}
        onSelectionChange={(keys) => {
          const basis = bases.find(({ name }) => keys !== 'all' && keys.has(name));
          if (basis !== undefined) onChoose(basis.name);
        }}
      >
        {({ name, description, elements }) => (
          <ListBoxItem textValue={name}>
            <Text slot="label">{name}</Text>
            <Text slot="description">
              {covers(elements) ? description : `lacks an element of this molecule. ${description}`}
            </Text>
          </ListBoxItem>
        )}
      </ListBox>
    </Autocomplete>
  );
}

/** Something to start from: an even-tempered set of s functions for each element of the molecule. */
function exampleBasis({ atoms }: StudyDraft): string {
  const elements = [...new Set(atoms.map(({ element }) => element.trim()))].filter(
    (element) => element !== '',
  );
  const shells = [{ angularMomentum: 0, smallest: 0.05, ratio: 2.8, count: 8 }];
  return JSON.stringify(
    { name: 'even-tempered', evenTempered: Object.fromEntries(elements.map((element) => [element, shells])) },
    undefined,
    2,
  );
}
