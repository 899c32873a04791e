import type { Data } from 'plotly.js-dist';
import { wellLevels } from '../../study/well-levels';
import { LEVELS } from '../state/levels';
import { convertLength, toEnergyUnit } from '../units';
import { energyZero } from './curves';
import type { FigureRequest } from './figure';
import { curveLook } from './palette';

/**
 * The vibrational levels of one curve as lines across its well: of the most complete level that is shown and has
 * them, as those of several would be a tangle.
 */
export function levelLines(request: FigureRequest): readonly Data[] {
  const { study, points, levelsOf: results, energyUnit, lengthUnit, theme } = request;
  const level = levelWithLines(request);
  if (!results || level === undefined) return [];
  const zero = energyZero(study, points, level, request);
  if (typeof zero === 'string') return [];
  const length = (value: number) => convertLength(value, study.molecule.unit, lengthUnit);
  const lines = wellLevels(results, level);
  return [
    {
      type: 'scatter',
      mode: 'lines',
      name: `${level}, vibrational levels`,
      // a gap after every line
      x: lines.flatMap(({ from, to }) => [length(from), length(to), null]),
      y: lines.flatMap(({ energy }) => {
        const height = toEnergyUnit(energy - zero, energyUnit);
        return [height, height, null];
      }),
      connectgaps: false,
      line: { color: curveLook(level, theme.ground).colour, width: 1 },
      opacity: 0.55,
      hoverinfo: 'skip',
      xaxis: 'x',
      yaxis: 'y',
      showlegend: false,
    },
  ];
}

/** Whose levels are drawn; undefined: none has any. */
export function levelWithLines({
  levelsOf,
  hiddenLevels,
}: Pick<FigureRequest, 'levelsOf' | 'hiddenLevels'>): string | undefined {
  return LEVELS.map(({ name }) => name as string).findLast((name) => {
    const { minimum, vibration } = levelsOf?.findings[name] ?? {};
    return minimum?.kind === 'found' && vibration?.kind === 'found' && !hiddenLevels.includes(name);
  });
}
