import type { LevelFindings, StudyResults } from '#engine';
import { LevelSwatch } from '../../charts/level-swatch';
import { useWindowState } from '../../state/window-context';
import { BasisComparison } from './basis-comparison';
import { CautionList } from './caution-list';
import { CurveFitsTable } from './curve-fits-table';
import { ExcitedStates } from './excited-states';
import type { ShownUnits } from './shown-units';
import { SpectroscopicFacts } from './spectroscopic-facts';
import { VibrationTables } from './vibration-tables';
import { WellFacts } from './well-facts';

/** What can be read off each level's curve, and where it should not be trusted. */
export function Findings() {
  const run = useWindowState((state) => state.run);
  const view = useWindowState((state) => state.view);
  if (run === undefined) return <p className="empty">Nothing has been computed yet.</p>;
  const { study, results } = run;
  const units = { lengthUnit: view.lengthUnit ?? study.molecule.unit, energyUnit: view.energyUnit };
  return (
    <div className="findings">
      {results === undefined && <p className="empty">Findings are read off the finished curve.</p>}
      {study.levels.map((level) => {
        const findings = results?.findings[level];
        return (
          <section key={level} className="finding">
            <h3>
              <LevelSwatch level={level} /> {level}
            </h3>
            {findings && <WellFacts {...{ findings, study, ...units }} />}
            <CautionList run={run} level={level} lengthUnit={units.lengthUnit} />
            {findings && <FurtherFindings {...{ level, findings, results, ...units }} />}
          </section>
        );
      })}
      {results && <BasisComparison results={results} {...units} />}
      <CautionList run={run} lengthUnit={units.lengthUnit} />
    </div>
  );
}

interface FurtherFindingsProps extends ShownUnits {
  readonly level: string;
  readonly findings: LevelFindings;
  readonly results: StudyResults;
}

/** What takes more room than a line, folded. */
function FurtherFindings({ level, findings, results, ...units }: FurtherFindingsProps) {
  const { study, curves } = results;
  const { vibration, isotopologues, fits, excitedStates = [] } = findings;
  return (
    <>
      <SpectroscopicFacts level={level} results={results} />
      {vibration && (
        <VibrationTables
          {...{ vibration, isotopologues, molecule: study.molecule, energyUnit: units.energyUnit }}
        />
      )}
      {fits && <CurveFitsTable fits={fits} />}
      <ExcitedStates states={excitedStates} curves={curves?.[level] ?? []} study={study} {...units} />
    </>
  );
}
