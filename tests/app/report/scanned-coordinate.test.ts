import { describe, expect, it } from 'vitest';
import {
  coordinateHeading,
  coordinateScale,
  coordinateText,
  sharedCoordinate,
} from '../../../app/report/scanned-coordinate';
import { sampleResults } from '../../support/sample-results';

const results = sampleResults();
const withStudy = (study: object) => ({ ...results, study: { ...results.study, ...study } });
const water = {
  unit: 'bohr' as const,
  atoms: [
    { element: 'O', at: [0, 0, 0] as const },
    { element: 'H', at: [1.4, 1.1, 0] as const },
    { element: 'H', at: [-1.4, 1.1, 0] as const },
  ],
  charge: 0,
  multiplicity: 1,
};
const angleScan = withStudy({
  molecule: water,
  scan: { coordinate: { angle: [1, 0, 2] }, from: 90, to: 180, count: 10 },
});

describe('sharedCoordinate', () => {
  it('names bonds by their elements and units as printed', () => {
    expect(coordinateHeading(sharedCoordinate([results], ['h2']))).toBe('H–H distance (Å)');
    const both = withStudy({
      molecule: water,
      scan: {
        coordinate: {
          bonds: [
            [0, 1],
            [0, 2],
          ],
        },
        values: [1, 2],
      },
    });
    expect(coordinateHeading(sharedCoordinate([both], ['water']))).toBe('O–H distance (bohr)');
    expect(coordinateHeading(sharedCoordinate([angleScan], ['water']))).toBe('H–O–H angle (°)');
  });

  it('finds a general name for different bonds and converts to the unit of the first file', () => {
    const other = withStudy({
      molecule: water,
      scan: { coordinate: { bonds: [[0, 1]] }, values: [1, 2] },
    });
    const shared = sharedCoordinate([results, other], ['h2', 'water']);
    expect(coordinateHeading(shared)).toBe('Bond distance (Å)');
    expect(coordinateScale(results, shared)).toBe(1);
    expect(coordinateScale(other, shared)).toBeCloseTo(0.529177, 6);
  });

  it('refuses to put a distance and an angle on one axis, and says which file has which', () => {
    expect(() => sharedCoordinate([results, angleScan], ['h2', 'water'])).toThrowError(
      expect.objectContaining({
        code: 'report.coordinatesDiffer',
        place: 'water',
        message: 'h2 has a scan of a distance, water has a scan of an angle: they share no axis.',
      }),
    );
  });
});

describe('coordinateText', () => {
  it('leaves out the noise of evenly spaced doubles', () => {
    expect(coordinateText(0.1 + 0.2, 'Å')).toBe('0.3 Å');
    expect(coordinateText(104.5, '°')).toBe('104.5°');
  });
});
