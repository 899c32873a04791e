import { describe, expect, it } from 'vitest';
import { explanationText } from '../../../../app/renderer/panels/explanation';

describe('what a study asks of the machine', () => {
  it('is said in one line, the time shared among the workers', () => {
    const levels = [
      { level: 'RHF', bytes: 1000, seconds: 1 },
      { level: 'FCI', determinants: 63504, bytes: 2_400_000, seconds: 9 },
    ];
    const explanation = {
      formula: 'H₂O',
      electrons: 10,
      points: 30,
      functions: 13,
      frozenOrbitals: 1,
      repulsionIntegrals: 4186,
      levels,
      pointSeconds: 9.5,
      afterwardsSeconds: 75,
    };
    expect(explanationText(explanation, 2)).toBe(
      '10 electrons · 13 basis functions · 1 frozen orbital · 30 points · determinants FCI 63\u2009504 · about 3 min, 2.4 MB',
    );
  });
});
