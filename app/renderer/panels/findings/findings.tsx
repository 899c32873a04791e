import { LevelSwatch } from '../../charts/level-swatch';
import { useWindowState } from '../../state/window-context';
import { BasisComparison } from './basis-comparison';
import { CautionList } from './caution-list';
import { CurveFitsTable } from './curve-fits-table';
import { ExcitedStates } from './excited-states';
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
      {results === undefined ? (
        <p className="empty">Findings are read off the finished curve.</p>
      ) : (
        study.levels.map((level) => {
          const findings = results.findings[level];
          if (findings === undefined) return null;
          const { vibration, isotopologues, fits, excitedStates = [] } = findings;
          return (
            <section key={level} className="finding">
              <h3>
                <LevelSwatch level={level} /> {level}
              </h3>
              <WellFacts {...{ findings, study, ...units }} />
              <SpectroscopicFacts level={level} results={results} />
              {vibration && (
                <VibrationTables
                  {...{ vibration, isotopologues, molecule: study.molecule, energyUnit: units.energyUnit }}
                />
              )}
              {fits && <CurveFitsTable fits={fits} />}
              <ExcitedStates
                states={excitedStates}
                curves={results.curves?.[level] ?? []}
                study={study}
                {...units}
              />
            </section>
          );
        })
      )}
      {results && <BasisComparison results={results} {...units} />}
      <CautionList run={run} lengthUnit={units.lengthUnit} />
    </div>
  );
}
