import { describe, expect, it } from 'vitest';
import type { LevelCurve } from '../../../engine/calculation/level-curve';
import { readWell } from '../../../engine/calculation/read-well';
import { atom, prepare, study } from '../../support/studies';

const XS = [1, 1.2, 1.4, 1.6, 2, 3];

/** A made-up curve of H2, bohr. */
function readingOf(energyAt: (x: number) => number) {
  const prepared = prepare(
    study([atom('H'), atom('H', 0, 0, 1.4)], {
      levels: ['MP2'],
      scan: { coordinate: { bonds: [[0, 1]] }, values: XS },
    }),
  );
  const scan = XS.map((x) => ({ x, energy: energyAt(x) }));
  const curve: LevelCurve = { level: 'MP2', bohrPerUnit: 1, scan, points: () => scan, energyAt };
  return readWell(prepared, curve, undefined, Number.POSITIVE_INFINITY);
}

const morse = (x: number) => 0.17 * (1 - Math.exp(-1.02 * (x - 1.43))) ** 2 - 1.17;

describe('readWell', () => {
  it('identity: of a smooth curve the minimum is known, and not said to lie on a kink', () => {
    const { minimum, well } = readingOf(morse);
    expect(minimum).toMatchObject({ kind: 'found' });
    expect(minimum).not.toHaveProperty('onKink');
    expect(well?.constants?.diatomic).toBeDefined();
  });

  it('identity: a bend beside the minimum is said at the minimum, and constants of derivatives are not given', () => {
    const { minimum, well } = readingOf((x) => morse(x) + (x > 1.44 ? 0.03 * (x - 1.44) : 0));
    expect(minimum).toMatchObject({ kind: 'found', onKink: true });
    expect(well?.constants?.diatomic).toBeUndefined();
  });
});
