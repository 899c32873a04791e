import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Study } from '#engine';
import { parseStudy } from '../../../app/study/parse-study';
import { serialiseStudy } from '../../../app/study/serialise';

const STUDY: Study = {
  levels: ['RHF', 'FCI'],
  basis: 'STO-3G',
  scan: { coordinate: { bonds: [[0, 1]] }, count: 40, to: 6, from: 0.4 },
  molecule: {
    charge: 1,
    atoms: [
      { at: [0, 0, 0], element: 'He' },
      { at: [0, 0, 0.7743], element: 'H' },
    ],
    unit: 'angstrom',
  },
  title: undefined,
  version: 1,
  format: 'farwell/study',
};

describe('serialiseStudy', () => {
  it('writes keys in one order, short things on one line, and nothing for what is undefined', () => {
    expect(serialiseStudy(STUDY)).toBe(`{
  "format": "farwell/study",
  "version": 1,
  "molecule": {
    "unit": "angstrom",
    "atoms": [{ "element": "He", "at": [0, 0, 0] }, { "element": "H", "at": [0, 0, 0.7743] }],
    "charge": 1
  },
  "scan": { "coordinate": { "bonds": [[0, 1]] }, "from": 0.4, "to": 6, "count": 40 },
  "basis": "STO-3G",
  "levels": ["RHF", "FCI"]
}
`);
  });

  it('is read back to the same study, to the last digit', () => {
    const number = fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0);
    fc.assert(
      fc.property(
        fc.array(number, { minLength: 1, maxLength: 40 }),
        fc.string({ maxLength: 50 }),
        (exponents, notes) => {
          const shells = { H: [{ angularMomentum: 0, exponents, coefficients: exponents }] };
          const study: Study = { ...STUDY, notes, basis: { name: 'x', shells } };
          const reading = parseStudy(serialiseStudy(study));
          const { title: _, ...written } = study;
          expect(reading).toEqual({ ok: true, study: written });
        },
      ),
      { seed: 20261201 },
    );
  });
});
