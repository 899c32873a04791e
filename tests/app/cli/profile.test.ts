import { expect, it } from 'vitest';
import { startProfile } from '../../../app/cli/profile';

it('adds times up by stage and by level, and shows only what there was', async () => {
  let time = 0;
  const profile = startProfile(
    () => 1000 * time,
    () => 123e6,
  );
  profile.add('point', [
    { stage: 'integrals', seconds: 1 },
    { stage: 'CI product', level: 'FCI', seconds: 2 },
    { stage: 'rest', level: 'FCI', seconds: 0.5 },
  ]);
  profile.add('point', [{ stage: 'integrals', seconds: 0.25 }]);
  profile.add('minimum', [{ stage: 'CI product', level: 'FCI', seconds: 4 }]);
  await profile.stretch('computing', async () => {
    time = 3;
  });
  time = 4;
  expect(profile.table(['RHF', 'FCI'])).toBe(
    [
      'Where the time went, in seconds of computing:',
      '                     shared     FCI   in all',
      'integrals             1.250       –    1.250',
      'CI product                –   6.000    6.000',
      'rest of the points        –   0.500    0.500',
      'all points            1.250   2.500    3.750',
      'all minima                –   4.000    4.000',
      'By the clock: computing 3.000 s, the whole program 4.000 s.',
      'Memory at most 120 MB.',
    ].join('\n'),
  );
});
