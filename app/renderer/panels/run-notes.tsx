import { studyText } from '../state/study-text';
import { useWindowState } from '../state/window-context';
import type { Run } from '../state/window-state';

/** What a reader of the charts must know: whose curves they are, what is missing from them and why. */
export function RunNotes({ run }: { readonly run: Run }) {
  const draft = useWindowState((state) => state.draft);
  const isOutdated = studyText(draft).text !== run.text;
  const { levels } = run.study;
  const notes = [
    ...(run.error === undefined ? [] : [`${run.error.message} ${run.error.remedy}`]),
    ...(isOutdated ? [`These curves belong to the sentence before it was changed: ${run.sentence}`] : []),
    ...(levels.includes('CIS')
      ? ['CIS has no curve of correlation: single excitations leave the ground state RHF’s.']
      : []),
  ];
  if (notes.length === 0) return null;
  return (
    <div className="runNotes">
      {notes.map((note) => (
        <p
          key={note}
          className="chartNote"
          data-failed={note.startsWith(run.error?.message ?? '\u0000') || undefined}
        >
          {note}
        </p>
      ))}
    </div>
  );
}
