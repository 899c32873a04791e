import { expect, it } from 'vitest';
import * as engine from '#engine';

it('regression: the engine’s door offers these names, so that a change of it is one on purpose', () => {
  expect(Object.keys(engine).sort()).toEqual([
    'BOHR_IN_ANGSTROM',
    'DALTON_IN_ELECTRON_MASSES',
    'DIPOLE_IN_DEBYE',
    'EngineError',
    'HARTREE_IN_EV',
    'HARTREE_IN_KJ_PER_MOL',
    'HARTREE_IN_WAVENUMBERS',
    'LEVEL_NAMES',
    'LOW_REFERENCE_WEIGHT',
    'NOMINAL_SPEEDS',
    'UNATTENDED',
    'acceptHelpers',
    'allowHelpers',
    'basisSetLimit',
    'basisSetLimitOfCurves',
    'computePoint',
    'countWork',
    'describeBasis',
    'describeBasisUsed',
    'evaluateOnGrid',
    'explainStudy',
    'findLevelMinimum',
    'followNeighbours',
    'followStates',
    'helpThread',
    'listBasisSets',
    'measuredFor',
    'prepareStudy',
    'studiesInBases',
    'studyCautions',
    'studyInBasis',
  ]);
});
