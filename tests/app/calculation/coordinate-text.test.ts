import { describe, expect, it } from 'vitest';
import type { Study } from '#engine';
import { coordinateText } from '../../../app/calculation/coordinate-text';

const study = (unit: 'angstrom' | 'bohr', scan: Study['scan']): Study => ({
  format: 'farwell/study',
  version: 1,
  molecule: { unit, atoms: [] },
  basis: 'STO-3G',
  levels: ['RHF'],
  scan,
});

describe('coordinateText', () => {
  it('gives distances in the unit of the study and angles in degrees', () => {
    const distance: Study['scan'] = { coordinate: { bonds: [[0, 1]] }, values: [1] };
    expect(coordinateText(study('angstrom', distance), 1.25)).toBe('1.25 Å');
    expect(coordinateText(study('bohr', distance), 1.4)).toBe('1.4 bohr');
    expect(coordinateText(study('bohr', { coordinate: { angle: [1, 0, 2] }, values: [90] }), 104.5)).toBe(
      '104.5°',
    );
    expect(coordinateText(study('bohr', { coordinate: { dihedral: [0, 1, 2, 3] }, values: [1] }), 60)).toBe(
      '60°',
    );
  });
});
