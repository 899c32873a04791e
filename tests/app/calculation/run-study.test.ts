import { readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { type PreparedStudy, prepareStudy, type Study, studyInBasis } from '#engine';
import type { FinishedPoint } from '../../../app/calculation/messages';
import type { Progress } from '../../../app/calculation/progress';
import { type RunOptions, runStudy } from '../../../app/calculation/run-study';
import type { StartWorker } from '../../../app/calculation/worker-thread';
import { temporaryFolder } from '../../support/temporary-folder';
import { startHere } from '../../support/worker-here';

const folder = temporaryFolder();
const study: Study = {
  format: 'farwell/study',
  version: 1,
  molecule: {
    unit: 'bohr',
    atoms: [
      { element: 'He', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 1.4632] },
    ],
    charge: 1,
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 0.9, to: 5.1, count: 10 },
  basis: 'STO-3G',
  levels: ['RHF', 'CIS', 'FCI'],
};

function prepared(changes: Partial<Study> = {}): PreparedStudy {
  const preparation = prepareStudy({ ...study, ...changes });
  if (!preparation.ok) throw preparation.errors[0];
  return preparation.prepared;
}

async function resultsOf(options: RunOptions = {}, changes: Partial<Study> = {}) {
  const outcome = await runStudy({ prepared: prepared(changes) }, { startWorker: startHere, ...options });
  if (outcome.kind !== 'done') throw new Error(JSON.stringify(outcome));
  return outcome.results;
}

describe('runStudy', () => {
  it('gives every point in the order of the scan, and findings and basis for the study as run', async () => {
    const results = await resultsOf({ workers: 3 });
    expect(results.points.map(({ coordinate }) => coordinate)).toEqual(prepared().coordinates);
    for (const { levels } of results.points) {
      expect(Object.keys(levels)).toEqual(study.levels);
      expect(Object.values(levels).every(({ converged }) => converged)).toBe(true);
    }
    expect(Object.keys(results.findings)).toEqual(study.levels);
    expect(results.findings.FCI?.minimum.kind).toBe('found');
    expect(results.study).toMatchObject({ ...study, molecule: { charge: 1, multiplicity: 1 }, states: 1 });
    expect(results.basis).toMatchObject({ name: 'STO-3G', functions: 2 });
    const everywhere = (place: number) => prepared().coordinates.map(() => place);
    expect(results.curves).toEqual({
      CIS: [
        { name: '1 ¹Σ⁺', states: everywhere(1) },
        { name: '1 ³Σ⁺', states: everywhere(0) },
      ],
      FCI: [{ name: '1 ¹Σ⁺', states: everywhere(0) }],
    });
  });

  it('gives the same numbers to the last bit with any number of workers', async () => {
    expect(await resultsOf({ workers: 1 })).toEqual(await resultsOf({ workers: 4 }));
  });

  it('gives the same numbers to the last bit wherever it was interrupted, and computes no point twice', async () => {
    const unbroken = await resultsOf();
    const all = new Map<number, FinishedPoint>();
    await resultsOf({ onPoint: (index, point) => all.set(index, point) });
    for (const known of [[0], [0, 1, 2], [0, 1, 2, 3], [4, 5, 8], [...all.keys()]]) {
      const finished = new Map(known.map((index) => [index, all.get(index)!]));
      const computed: number[] = [];
      expect(await resultsOf({ workers: 2, finished, onPoint: (index) => computed.push(index) })).toEqual(
        unbroken,
      );
      expect(computed.sort((a, b) => a - b)).toEqual(
        [...all.keys()].filter((i) => !known.includes(i)).sort((a, b) => a - b),
      );
    }
  });

  it('tells how far it is, first for the points, then for their neighbours, then for the minima', async () => {
    const told: Progress[] = [];
    const finished = new Map<number, FinishedPoint>();
    await resultsOf({ onPoint: (index, point) => index < 3 && finished.set(index, point) });
    await resultsOf({ workers: 1, finished, onProgress: (progress) => told.push(progress) });
    // the same count again is only a sign of life
    const news = told.filter(
      ({ stage, done }, k) => told[k - 1]?.stage !== stage || told[k - 1]?.done !== done,
    );
    const points = news.filter(({ stage }) => stage === 'points');
    expect(points.map(({ done }) => done)).toEqual([3, 4, 5, 6, 7, 8, 9, 10]);
    expect(points[0]?.secondsLeft).toBeUndefined();
    expect(points[1]?.secondsLeft).toBeGreaterThan(0);
    expect(points.at(-1)?.secondsLeft).toBe(0);
    expect([...new Set(told.map(({ stage }) => stage))]).toEqual(['points', 'neighbours', 'minima']);
    const countsOf = (wanted: Progress['stage']) =>
      news.filter(({ stage }) => stage === wanted).map(({ done, total }) => [done, total]);
    expect(countsOf('neighbours')).toEqual(Array.from({ length: 11 }, (_, done) => [done, 10]));
    expect(countsOf('minima')).toEqual([0, 1, 2, 3].map((done) => [done, 3]));
  });

  it('stops at once when it is cancelled, and says nothing afterwards', async () => {
    const cancel = new AbortController();
    let points = 0;
    const outcome = await runStudy(
      { prepared: prepared() },
      {
        startWorker: startHere,
        signal: cancel.signal,
        onPoint: () => {
          points++;
          if (points === 3) cancel.abort();
        },
      },
    );
    expect(outcome).toEqual({ kind: 'cancelled' });
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect(points).toBe(3);
    expect(
      await runStudy({ prepared: prepared() }, { startWorker: startHere, signal: cancel.signal }),
    ).toEqual({
      kind: 'cancelled',
    });
  });

  it('gives the same numbers to the last bit from the cache, in part or in whole, and says how many points it had', async () => {
    const cache = { folder: join(folder, 'cache'), mostBytes: 1e8 };
    // full CI in this basis takes longer than looking it up
    const slow = { basis: '6-31G', scan: { ...study.scan!, count: 4, to: 2 } };
    const run = (options: RunOptions = {}) =>
      runStudy({ prepared: prepared(slow) }, { startWorker: startHere, ...options });
    const fresh = await run();
    const first = await run({ cache });
    const [somePoint] = readdirSync(cache.folder);
    expect(first).toEqual(fresh);
    const second = await run({ cache, workers: 3 });
    if (fresh.kind !== 'done' || second.kind !== 'done') throw new Error('not done');
    expect(second.results).toEqual(fresh.results);
    expect(second.keptPoints).toBeGreaterThan(0);
    writeFileSync(join(cache.folder, somePoint!), 'damaged');
    const third = await run({ cache });
    expect(third.kind === 'done' && third.results).toEqual(fresh.results);
    // another study with the same first point: found there, but of course not its curve
    const shorter = {
      ...slow,
      title: 'shorter',
      scan: { coordinate: study.scan!.coordinate, values: [0.9] },
    };
    const single = await runStudy({ prepared: prepared(shorter) }, { startWorker: startHere, cache });
    expect(single.kind === 'done' && single.results.points).toEqual(fresh.results.points.slice(0, 1));
  });

  it('tells where the time went, by stage and level, if it is asked', async () => {
    const told = new Map<string, Set<string>>();
    await resultsOf({
      onTimes: (kind, times) => {
        const stages = told.get(kind) ?? new Set();
        told.set(kind, stages);
        for (const { stage, level = '' } of times) stages.add(`${stage} ${level}`);
      },
    });
    expect([...told.keys()].sort()).toEqual(['followed', 'minimum', 'point']);
    expect([...told.get('point')!]).toEqual(
      expect.arrayContaining(['integrals ', 'CI model space FCI', 'rest CIS']),
    );
    expect([...told.get('minimum')!]).toEqual(expect.arrayContaining(['rest RHF', 'integrals FCI']));
  });

  it('gives the same numbers although a worker died on the way', async () => {
    let deaths = 0;
    const startMortal: StartWorker = (start) => {
      const worker = startHere(start);
      return {
        ...worker,
        listen: ({ onReply, onDeath }) =>
          worker.listen({
            onDeath,
            onReply: (reply) => {
              if (deaths > 0 || reply.kind !== 'point' || reply.index !== 5) return onReply(reply);
              deaths++;
              worker.end();
              onDeath('it was shot');
            },
          }),
      };
    };
    expect(await resultsOf({ startWorker: startMortal, workers: 2 })).toEqual(await resultsOf());
    expect(deaths).toBe(1);
  });

  it('fails with the error of whoever keeps the points', async () => {
    const onPoint = () => {
      throw new Error('disk full');
    };
    await expect(resultsOf({ onPoint })).rejects.toThrow('disk full');
  });

  it('computes a single geometry', async () => {
    const { points, findings } = await resultsOf({}, { scan: undefined, levels: ['RHF'] });
    expect(points.map(({ coordinate }) => coordinate)).toEqual([null]);
    expect(findings.RHF?.minimum.kind).toBe('none');
  });
});

describe('runStudy in several bases', () => {
  const short = {
    scan: { coordinate: { bonds: [[0, 1]] }, values: [1.6, 2, 3] },
    levels: ['RHF', 'CISD'],
  } as const;
  const inBoth = { ...short, findings: { bases: ['6-31G'] } };

  it('gives of each basis what a study in that basis alone gives', async () => {
    const both = await resultsOf({ workers: 2 }, inBoth);
    const alone = await resultsOf({ workers: 1 }, { ...short, basis: '6-31G' });
    const [further] = both.furtherBases ?? [];
    expect(further).toEqual(studyInBasis(alone));
    expect(further?.levels.CISD?.energies).toHaveLength(3);
    expect(both.points).toEqual((await resultsOf({}, short)).points);
    expect(both.basisSetLimit).toMatchObject({ kind: 'none' });
  });

  it('goes on from points of any basis that are known, and counts them through all', async () => {
    const computed = new Map<number, FinishedPoint>();
    const whole = await resultsOf({ onPoint: (index, point) => computed.set(index, point) }, inBoth);
    expect([...computed.keys()].sort()).toEqual([0, 1, 2, 3, 4, 5]);
    const finished = new Map([...computed].filter(([index]) => index === 0 || index === 3 || index === 4));
    const again: number[] = [];
    const resumed = await resultsOf({ finished, onPoint: (index) => again.push(index) }, inBoth);
    expect(again.sort()).toEqual([1, 2, 5]);
    expect(resumed).toEqual(whole);
  });

  it('says in which basis it is', async () => {
    const seen: Progress[] = [];
    await resultsOf({ onProgress: (progress) => seen.push(progress) }, inBoth);
    const last = (stage: string, number: number) =>
      seen.findLast((progress) => progress.stage === stage && progress.basis?.number === number);
    expect(last('points', 1)).toMatchObject({ done: 3, total: 3, basis: { name: 'STO-3G', of: 2 } });
    expect(last('minima', 2)).toMatchObject({ done: 2, total: 2, basis: { name: '6-31G', of: 2 } });
  });
});
