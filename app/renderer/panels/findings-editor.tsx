import type { StudyIssue } from '../../contract/requests';
import { Check } from '../controls/check';
import { LabelledField } from '../controls/labelled-field';
import type { FindingsDraft, StudyDraft } from '../state/draft';

interface FindingsEditorProps {
  readonly draft: StudyDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

/** What is read off the curves beyond the usual. */
export function FindingsEditor({ draft: { findings }, issues, onEdit }: FindingsEditorProps) {
  const edit = (change: Partial<FindingsDraft>) =>
    onEdit((current) => ({ ...current, findings: { ...current.findings, ...change } }));
  const field = (key: 'rotation' | 'isotopologues' | 'bases' | 'referenceWeight') => ({
    value: findings[key],
    isWrong: issues.some(({ place }) => place.startsWith(`findings.${key}`)),
    onChange: (typed: string) => edit({ [key]: typed }),
  });
  return (
    <div className="findingsEditor">
      <LabelledField
        label="Rotational quantum numbers J, besides 0"
        placeholder="none: 5, 10"
        {...field('rotation')}
      />
      <LabelledField
        label="Other isotopes: a mass number for every atom, molecules separated by commas"
        placeholder="none: 1 2, 2 2"
        {...field('isotopologues')}
      />
      {findings.kept.bases === undefined ? (
        <LabelledField
          label="The same in further basis sets, to compare and extrapolate"
          placeholder="none: cc-pVDZ, cc-pVTZ"
          {...field('bases')}
        />
      ) : (
        <p className="hint">Further basis sets are those of the study file.</p>
      )}
      <LabelledField
        label="One determinant describes the state down to a weight of"
        placeholder="0.9"
        {...field('referenceWeight')}
      />
      <Check isChecked={findings.counterpoise} onChange={(counterpoise) => edit({ counterpoise })}>
        <strong>Counterpoise correction</strong>{' '}
        <span className="hint">what each fragment gains from the other’s basis functions</span>
      </Check>
    </div>
  );
}
