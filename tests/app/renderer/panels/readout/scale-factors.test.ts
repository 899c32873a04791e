import { expect, it } from 'vitest';
import { factorsText } from '../../../../../app/renderer/panels/readout/scale-factors';

it('names element and shell of every factor', () => {
  expect(factorsText({ Li: { '1s': 2.69592, '2sp': 0.74623 }, H: { '1s': 1.02147 } })).toBe(
    'Li 1s 2.6959, 2sp 0.7462 · H 1s 1.0215',
  );
});
