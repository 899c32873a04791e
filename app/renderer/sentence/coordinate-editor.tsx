import { Check } from '../controls/check';
import { Choice } from '../controls/choice';
import { Segmented } from '../controls/segmented';
import { formatFixed } from '../numbers';
import type { ScanDraft, StudyDraft } from '../state/draft';
import { withCoordinate, withSpacing } from '../state/scan-defaults';
import { numberOrText } from '../state/study-text';
import { LENGTH_UNITS } from '../units';

interface CoordinateEditorProps {
  readonly draft: StudyDraft;
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

/** What is scanned: bonds, an angle, a dihedral or nothing; and whether its values are spaced or listed. */
export function CoordinateEditor({ draft, onEdit }: CoordinateEditorProps) {
  const { scan } = draft;
  const editScan = (change: Partial<ScanDraft>) =>
    onEdit((current) => ({ ...current, scan: { ...current.scan, ...change } }));
  return (
    <div className="coordinateEditor">
      <Segmented
        label="What is scanned"
        options={[
          { key: 'bonds', text: 'Bonds' },
          { key: 'angle', text: 'Angle' },
          { key: 'dihedral', text: 'Dihedral' },
          { key: 'none', text: 'Nothing: one geometry' },
        ]}
        chosen={scan.coordinate}
        onChoose={(coordinate) => editScan(withCoordinate(scan, coordinate, draft.atoms.length))}
      />
      {scan.coordinate === 'bonds' && <BondChoice draft={draft} onChange={(bonds) => editScan({ bonds })} />}
      {scan.coordinate === 'angle' && (
        <AtomChoices
          atoms={draft.atoms}
          names={['From atom', 'at atom', 'to atom']}
          chosen={scan.angle}
          onChange={([a = 0, b = 0, c = 0]) => editScan({ angle: [a, b, c] })}
        />
      )}
      {scan.coordinate === 'dihedral' && (
        <AtomChoices
          atoms={draft.atoms}
          names={['Atom', 'axis from', 'axis to', 'atom']}
          chosen={scan.dihedral}
          onChange={([a = 0, b = 0, c = 0, d = 0]) => editScan({ dihedral: [a, b, c, d] })}
        />
      )}
      {scan.coordinate !== 'none' && (
        <Segmented
          label="Values"
          options={[
            { key: 'even', text: 'Evenly spaced' },
            { key: 'listed', text: 'Listed one by one' },
          ]}
          chosen={scan.spacing}
          onChoose={(spacing) => editScan(withSpacing(scan, spacing))}
        />
      )}
    </div>
  );
}

/** Every pair of atoms, the closest first; several at once take the same length. */
function BondChoice({
  draft,
  onChange,
}: {
  readonly draft: StudyDraft;
  readonly onChange: (bonds: ScanDraft['bonds']) => void;
}) {
  const { bonds } = draft.scan;
  const isSame = (bond: readonly [number, number], [a, b]: readonly [number, number]) =>
    (bond[0] === a && bond[1] === b) || (bond[0] === b && bond[1] === a);
  return (
    <fieldset className="bondChoice">
      <legend>Bonds pulled; several take the same length</legend>
      {atomPairs(draft).map(({ pair, distance }) => {
        const [first, second] = pair;
        const isChosen = bonds.some((bond) => isSame(bond, pair));
        return (
          <Check
            key={pair.join('-')}
            isChecked={isChosen}
            onChange={(chosen) =>
              onChange(chosen ? [...bonds, pair] : bonds.filter((bond) => !isSame(bond, pair)))
            }
          >
            {atomName(draft.atoms, first)} – {atomName(draft.atoms, second)}
            <span className="hint">
              {' '}
              {Number.isFinite(distance)
                ? `${formatFixed(distance, 4)} ${LENGTH_UNITS[draft.unit].symbol}`
                : ''}
            </span>
          </Check>
        );
      })}
    </fieldset>
  );
}

interface AtomChoicesProps {
  readonly atoms: StudyDraft['atoms'];
  readonly names: readonly string[];
  readonly chosen: readonly number[];
  readonly onChange: (chosen: readonly number[]) => void;
}

function AtomChoices({ atoms, names, chosen, onChange }: AtomChoicesProps) {
  const options = atoms.map((_, index) => ({ key: index, text: atomName(atoms, index) }));
  return (
    <div className="fieldRow">
      {names.map((name, place) => (
        <Choice
          key={name}
          label={name}
          options={options}
          chosen={chosen[place] ?? 0}
          onChoose={(index) => onChange(chosen.map((old, other) => (other === place ? index : old)))}
        />
      ))}
    </div>
  );
}

const atomName = (atoms: StudyDraft['atoms'], index: number): string =>
  `${atoms[index]?.element || 'atom'} ${index}`;

function atomPairs({ atoms }: StudyDraft) {
  const pairs = atoms.flatMap((first, i) =>
    atoms.slice(i + 1).map((second, offset) => ({
      pair: [i, i + 1 + offset] as const,
      distance: Math.hypot(
        ...first.at.map(
          (value, axis) => Number(numberOrText(value)) - Number(numberOrText(second.at[axis] ?? '')),
        ),
      ),
    })),
  );
  const ranked = (distance: number) => (Number.isFinite(distance) ? distance : Number.MAX_VALUE);
  return pairs.sort((a, b) => ranked(a.distance) - ranked(b.distance));
}
