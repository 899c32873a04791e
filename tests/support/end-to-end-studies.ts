import type { Study } from '#engine';

/** A proton leaves helium: two electrons, computed in an instant. */
export const helium: Study = {
  format: 'farwell/study',
  version: 1,
  title: 'A proton leaves helium',
  molecule: {
    unit: 'angstrom',
    atoms: [
      { element: 'He', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 0.7743] },
    ],
    charge: 1,
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 0.4, to: 4, count: 10 },
  basis: 'STO-3G',
  levels: ['RHF', 'CIS', 'CISD', 'FCI'],
};

/** Water is bent: long enough to be interrupted, and without a curve's minimum to look for afterwards. */
export const water: Study = {
  format: 'farwell/study',
  version: 1,
  molecule: {
    unit: 'angstrom',
    atoms: [
      { element: 'O', at: [0, 0, 0] },
      { element: 'H', at: [0, 0.757, 0.587] },
      { element: 'H', at: [0, -0.757, 0.587] },
    ],
  },
  scan: { coordinate: { angle: [1, 0, 2] }, from: 90, to: 120, count: 9 },
  basis: '6-31G',
  levels: ['RHF', 'CISD'],
  frozenCore: true,
};
/** Nitrogen is pulled apart: with its cores frozen. */
export const nitrogen: Study = {
  format: 'farwell/study',
  version: 1,
  molecule: {
    unit: 'angstrom',
    atoms: [
      { element: 'N', at: [0, 0, 0] },
      { element: 'N', at: [0, 0, 1.1] },
    ],
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 0.9, to: 2, count: 9 },
  basis: 'STO-3G',
  levels: ['RHF', 'FCI'],
  frozenCore: true,
};
