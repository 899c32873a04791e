import { Button, ProgressBar } from 'react-aria-components';
import { formatDuration } from '../numbers';
import { currentIssues } from '../state/current-issues';
import { useController, useWindowState } from '../state/window-context';
import type { Run } from '../state/window-state';

/** Compute, or, while computing, how far it is and the button that stops it. */
export function ComputeControl() {
  const run = useWindowState((state) => state.run);
  const check = useWindowState((state) => state.check);
  const controller = useController();
  if (run?.status === 'computing') return <Computing run={run} onCancel={() => controller.cancel()} />;
  const issues = currentIssues(check);
  const isReady = check.kind === 'judged' && check.result.ok;
  return (
    <div className="computeControl">
      <Button
        className="primaryButton"
        isDisabled={!isReady}
        aria-describedby="compute-state"
        onPress={() => void controller.compute()}
      >
        Compute
      </Button>
      <p id="compute-state" className="hint">
        {issues.length > 0 ? howManyPlaces(issues.length) : isReady ? lastOutcome(run) : 'Reading the study…'}
      </p>
    </div>
  );
}

function Computing({ run, onCancel }: { readonly run: Run; readonly onCancel: () => void }) {
  const done = run.progress?.done ?? run.points.filter((point) => point !== undefined).length;
  const total = run.progress?.total ?? run.total;
  const { secondsLeft, basis } = run.progress ?? {};
  return (
    <div className="computeControl">
      <Button className="primaryButton" onPress={onCancel}>
        Cancel
      </Button>
      <ProgressBar className="progress" aria-label="Computing" value={done} maxValue={Math.max(1, total)}>
        {({ percentage = 0 }) => (
          <>
            <span className="progressTrack">
              <span className="progressFill" style={{ inlineSize: `${percentage}%` }} />
            </span>
            <span className="hint">
              {done} of {total} {STAGES[run.progress?.stage ?? 'points'] ?? run.progress?.stage}
              {basis === undefined ? '' : ` in ${basis.name} (${basis.number} of ${basis.of})`}
              {secondsLeft === undefined ? '' : `, ${formatDuration(secondsLeft)} left`}
            </span>
          </>
        )}
      </ProgressBar>
    </div>
  );
}

/** What is counted at each stage of a calculation. */
const STAGES: Readonly<Record<string, string>> = {
  points: 'points',
  neighbours: 'points compared with their neighbours',
  minima: 'minima',
  limit: 'basis-set limits',
};

const howManyPlaces = (count: number): string =>
  count === 1
    ? 'One place of the sentence needs correcting first.'
    : `${count} things need correcting first.`;

function lastOutcome(run: Run | undefined): string {
  switch (run?.status) {
    case undefined:
    case 'computing':
      return 'Ready.';
    case 'done':
      return `Computed, ${run.total} ${run.total === 1 ? 'point' : 'points'}.`;
    case 'opened':
      return 'Opened from a file.';
    case 'cancelled':
      return `Cancelled; ${run.points.filter((point) => point !== undefined).length} of ${run.total} points are kept.`;
    case 'failed':
      return 'Failed.';
  }
}
