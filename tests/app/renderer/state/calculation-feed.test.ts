import { describe, expect, it } from 'vitest';
import { CalculationFeed } from '../../../../app/renderer/state/calculation-feed';
import { createFakeHost } from '../../../support/fake-host';
import { samplePoint } from '../../../support/sample-results';

function watched() {
  const host = createFakeHost();
  const frames: (() => void)[] = [];
  const heard: unknown[] = [];
  const feed = new CalculationFeed(
    host,
    {
      advanced: (points, progress) => heard.push([points.map(({ index }) => index), progress?.done]),
      finished: ({ kind }) => heard.push(kind),
    },
    (callback) => frames.push(callback),
  );
  const point = (id: number, index: number) =>
    host.emit('calculation:point', { id, index, point: samplePoint(1) });
  const frame = () => {
    for (const callback of frames.splice(0)) callback();
  };
  return { host, feed, heard, point, frame, frames };
}

describe('the feed of a calculation', () => {
  it('hands on all that arrived since the last frame at once', () => {
    const { host, feed, heard, point, frame, frames } = watched();
    feed.follow(1);
    point(1, 0);
    point(1, 1);
    host.emit('calculation:progress', { id: 1, done: 2, total: 9, stage: 'points' });
    expect(heard).toEqual([]);
    expect(frames).toHaveLength(1);
    frame();
    expect(heard).toEqual([[[0, 1], 2]]);
  });

  it('keeps what comes before the number of the calculation, and only what is its own', () => {
    const { feed, heard, point, frame } = watched();
    feed.expect();
    point(6, 0);
    point(7, 3);
    feed.follow(7);
    frame();
    expect(heard).toEqual([[[3], undefined]]);
  });

  it('hands on the last points before it says that the calculation has ended', () => {
    const { host, feed, heard, point, frame } = watched();
    feed.follow(1);
    point(1, 5);
    host.emit('calculation:finished', { id: 1, outcome: { kind: 'cancelled' } });
    frame();
    expect(heard).toEqual([[[5], undefined], 'cancelled']);
  });

  it('says nothing more once it is stopped', () => {
    const { host, feed, heard, point, frame } = watched();
    feed.follow(1);
    point(1, 0);
    feed.stop();
    point(1, 1);
    host.emit('calculation:finished', { id: 1, outcome: { kind: 'cancelled' } });
    frame();
    expect(heard).toEqual([]);
  });
});
