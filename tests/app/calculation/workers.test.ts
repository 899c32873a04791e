import { availableParallelism } from 'node:os';
import { expect, it } from 'vitest';
import { usualWorkers } from '../../../app/calculation/workers';

it('as many workers as the environment says, else one for every core', () => {
  expect(usualWorkers({ FARWELL_WORKERS: '3' })).toBe(3);
  for (const wrong of [{}, { FARWELL_WORKERS: '0' }, { FARWELL_WORKERS: 'all' }, { FARWELL_WORKERS: '-1' }]) {
    expect(usualWorkers(wrong)).toBe(availableParallelism());
  }
});
