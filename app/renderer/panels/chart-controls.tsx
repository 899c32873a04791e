import type { LengthUnit } from '#engine';
import { scansLength } from '../charts/curves';
import { Segmented } from '../controls/segmented';
import { useController, useWindowState } from '../state/window-context';
import type { EnergyReference } from '../state/window-state';
import { ENERGY_UNITS, type EnergyUnit, LENGTH_UNITS } from '../units';

const ENERGY_OPTIONS = (Object.keys(ENERGY_UNITS) as EnergyUnit[]).map((key) => ({
  key,
  text: ENERGY_UNITS[key].symbol,
  name: ENERGY_UNITS[key].name,
}));

const LENGTH_OPTIONS: readonly { readonly key: LengthUnit; readonly text: string; readonly name: string }[] =
  [
    { key: 'angstrom', text: LENGTH_UNITS.angstrom.symbol, name: 'ångström' },
    { key: 'bohr', text: LENGTH_UNITS.bohr.symbol, name: 'bohr' },
  ];

const REFERENCE_OPTIONS: readonly { readonly key: EnergyReference; readonly text: string }[] = [
  { key: 'absolute', text: 'absolute' },
  { key: 'ownMinimum', text: 'above own minimum' },
  { key: 'farEnd', text: 'against far end' },
];

/** In which units, and from where, the numbers are shown. */
export function ChartControls() {
  const view = useWindowState((state) => state.view);
  const study = useWindowState((state) => state.run?.study);
  const controller = useController();
  return (
    <div className="chartControls">
      <Segmented
        label="Energies shown"
        options={REFERENCE_OPTIONS}
        chosen={view.energyReference}
        onChoose={(energyReference) => controller.changeView({ energyReference })}
      />
      <Segmented
        label="Energy unit"
        options={ENERGY_OPTIONS}
        chosen={view.energyUnit}
        onChoose={(energyUnit) => controller.changeView({ energyUnit })}
      />
      {(study === undefined || scansLength(study)) && (
        <Segmented
          label="Length unit"
          options={LENGTH_OPTIONS}
          chosen={view.lengthUnit ?? study?.molecule.unit ?? 'angstrom'}
          onChoose={(lengthUnit) => controller.changeView({ lengthUnit })}
        />
      )}
    </div>
  );
}
