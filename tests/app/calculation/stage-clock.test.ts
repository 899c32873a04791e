import { expect, it } from 'vitest';
import { startStageClock } from '../../../app/calculation/stage-clock';

it('a stage is counted without those inside it, for the level that it belongs to, and once', () => {
  let time = 0;
  const { listener, take } = startStageClock(() => time * 1000);
  const at = (seconds: number, ...event: Parameters<typeof listener>) => {
    time = seconds;
    listener(...event);
  };
  at(1, 'self-consistency', 'begins');
  at(3, 'stability', 'begins');
  at(4, 'stability', 'ends');
  at(6, 'self-consistency', 'ends');
  at(6, { level: 'FCI' }, 'begins');
  at(8, 'CI product', 'begins');
  at(12, 'CI product', 'ends');
  at(13, { level: 'FCI' }, 'ends');
  time = 15;
  expect(take()).toEqual([
    { stage: 'rest', seconds: 3 },
    { stage: 'self-consistency', seconds: 4 },
    { stage: 'stability', seconds: 1 },
    { stage: 'rest', level: 'FCI', seconds: 3 },
    { stage: 'CI product', level: 'FCI', seconds: 4 },
  ]);
  time = 16;
  expect(take()).toEqual([{ stage: 'rest', seconds: 1 }]);
});
