import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Study } from '#engine';
import type { EventName, Events } from '../../../app/contract/requests';
import { createService, type Service } from '../../../app/service/service';
import { temporaryFolder } from '../../support/temporary-folder';

type Posted = {
  readonly [E in EventName]: { readonly name: E; readonly payload: Events[E] };
}[EventName];

const SAMPLES = join(temporaryFolder(), 'samples');
mkdirSync(SAMPLES);
writeFileSync(join(SAMPLES, 'h2.study.json'), studyText({ title: 'Two hydrogens' }));
writeFileSync(join(SAMPLES, 'b.study.json'), studyText({ title: undefined }));
writeFileSync(join(SAMPLES, 'notes.txt'), 'no study');
writeFileSync(join(SAMPLES, '..', 'outside.study.json'), studyText());

function studyText(changes: Partial<Study> = {}): string {
  const study: Study = {
    format: 'farwell/study',
    version: 1,
    molecule: {
      unit: 'bohr',
      atoms: [
        { element: 'H', at: [0, 0, 0] },
        { element: 'H', at: [0, 0, 1.4] },
      ],
    },
    scan: { coordinate: { bonds: [[0, 1]] }, from: 1, to: 3, count: 5 },
    basis: 'STO-3G',
    levels: ['RHF', 'FCI'],
  };
  return JSON.stringify({ ...study, ...changes });
}

/** Takes minutes, so that it is surely still running when a test cancels it. */
const LONG = studyText({
  basis: {
    name: 'long',
    evenTempered: {
      H: [{ angularMomentum: 0, smallest: 0.02, ratio: 1.9, count: 14 }],
    },
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 1, to: 3, count: 2000 },
});

// the service's workers are threads of the built program

const services: Service[] = [];
function openService(): {
  readonly service: Service;
  readonly posted: readonly Posted[];
} {
  const posted: Posted[] = [];
  const service = createService({
    host: 'browser',
    workers: 1,
    samplesFolder: SAMPLES,
    post: (name, payload) => posted.push({ name, payload } as Posted),
  });
  services.push(service);
  return { service, posted };
}
afterEach(() => {
  for (const service of services.splice(0)) service.dispose();
});

const finished = (posted: readonly Posted[], id: number) =>
  posted.flatMap((event) =>
    event.name === 'calculation:finished' && event.payload.id === id ? [event.payload] : [],
  );

describe('samples', () => {
  it('are listed with title and sentence, and opened as text', async () => {
    const { handlers } = openService().service;
    const samples = await handlers['samples:list']();
    expect(samples.map(({ id, title }) => [id, title])).toEqual([
      ['b', 'b'],
      ['h2', 'Two hydrogens'],
    ]);
    for (const { sentence } of samples) expect(sentence).toMatch(/H–H.*STO-3G/);
    expect(await handlers['samples:open']({ id: 'h2' })).toEqual({
      name: 'h2.study.json',
      text: studyText({ title: 'Two hydrogens' }),
    });
  });

  it.each(['../outside', 'notes.txt', 'absent', '', 'h2.study.json'])(
    'are the only files that open: not %s',
    async (id) => {
      await expect(openService().service.handlers['samples:open']({ id })).rejects.toMatchObject({
        code: 'sample.unknown',
      });
    },
  );
});

describe('basis sets', () => {
  it('are listed, and each that is listed can be shown', async () => {
    const { handlers } = openService().service;
    const sets = await handlers['basis:list']();
    expect(sets.map(({ name }) => name)).toContain('STO-3G');
    for (const { name, elements } of sets) {
      const shown = await handlers['basis:show']({ name });
      expect(Object.keys(shown.shells).sort()).toEqual([...elements].sort());
    }
  });

  it('that do not exist are refused with the nearest that does', () => {
    expect(() => openService().service.handlers['basis:show']({ name: 'STO-3H' })).toThrow(/STO-3H/);
  });
});

describe('study:check', () => {
  const check = (text: string) => openService().service.handlers['study:check']({ text });

  it('gives the study with its defaults, its sentence and its size', async () => {
    expect(await check(studyText())).toMatchObject({
      ok: true,
      study: { molecule: { charge: 0, multiplicity: 1 }, states: 1 },
      sentence: expect.stringContaining('STO-3G'),
      explanation: { electrons: 2, points: 5, functions: 2 },
    });
  });

  it.each([
    ['no JSON', '{ "format": '],
    ['an unknown key', studyText({ scann: 1 } as never)],
    [
      'an element that does not exist',
      studyText({
        molecule: { unit: 'bohr', atoms: [{ element: 'Xx', at: [0, 0, 0] }] },
        scan: undefined,
      }),
    ],
    [
      'a multiplicity that the electrons do not allow',
      studyText({
        molecule: {
          unit: 'bohr',
          atoms: [{ element: 'H', at: [0, 0, 0] }],
          charge: -1,
          multiplicity: 2,
        },
        scan: undefined,
      }),
    ],
    ['a basis set in another file', studyText({ basis: { file: 'basis.json' } })],
  ])('refuses %s with a message and a remedy', async (_what, text) => {
    const result = await check(text);
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.issues.length).toBeGreaterThan(0);
    for (const { code, message, remedy } of result.issues) {
      expect(code).not.toBe('internal');
      expect(message).not.toBe('');
      expect(remedy).not.toBe('');
    }
  });

  it('says that a basis set in another file is out of the window’s reach', async () => {
    expect(await check(studyText({ basis: { file: 'mine.json' } }))).toMatchObject({
      issues: [
        {
          code: 'basis.file',
          place: 'basis.file',
          message: expect.stringContaining('mine.json'),
        },
      ],
    });
  });
});

describe('a calculation', () => {
  it('posts every point once, progress, and the results at the end', async () => {
    const { service, posted } = openService();
    const { id, points } = await service.handlers['calculation:start']({
      text: studyText(),
    });
    expect(points).toBe(5);
    await vi.waitFor(() => expect(finished(posted, id)).toHaveLength(1), 30_000);
    expect(posted.at(-1)?.name).toBe('calculation:finished');
    expect(new Set(posted.map(({ payload }) => payload.id))).toEqual(new Set([id]));

    const { outcome } = finished(posted, id)[0]!;
    expect(outcome.kind).toBe('done');
    if (outcome.kind !== 'done') return;
    const posts = posted.flatMap((event) => (event.name === 'calculation:point' ? [event.payload] : []));
    expect(posts.map(({ index }) => index).sort()).toEqual([0, 1, 2, 3, 4]);
    for (const { index, point } of posts) expect(point).toEqual(outcome.results.points[index]);
    expect(posted.some(({ name }) => name === 'calculation:progress')).toBe(true);
  });

  it('is refused where the study is, before anything starts', async () => {
    const { service, posted } = openService();
    const text = studyText({ basis: 'no such set' });
    expect(() => service.handlers['calculation:start']({ text })).toThrow(/no such set/);
    expect(posted).toEqual([]);
  });

  it('is cancelled at once, and says nothing afterwards', async () => {
    const { service, posted } = openService();
    const { id } = await service.handlers['calculation:start']({ text: LONG });
    await vi.waitFor(
      () => expect(posted.some(({ name }) => name === 'calculation:point')).toBe(true),
      30_000,
    );
    expect(await service.handlers['calculation:cancel']({ id })).toEqual({
      cancelled: true,
    });
    expect(posted.at(-1)).toEqual({
      name: 'calculation:finished',
      payload: { id, outcome: { kind: 'cancelled' } },
    });
    const count = posted.length;
    await new Promise((resolve) => setTimeout(resolve, 300));
    expect(posted.length).toBe(count);
    expect(await service.handlers['calculation:cancel']({ id })).toEqual({
      cancelled: false,
    });
  });

  it('cancels the one before', async () => {
    const { service, posted } = openService();
    const first = await service.handlers['calculation:start']({ text: LONG });
    const second = await service.handlers['calculation:start']({
      text: studyText(),
    });
    expect(second.id).not.toBe(first.id);
    expect(finished(posted, first.id)).toEqual([{ id: first.id, outcome: { kind: 'cancelled' } }]);
    await vi.waitFor(
      () => expect(finished(posted, second.id)).toMatchObject([{ outcome: { kind: 'done' } }]),
      30_000,
    );
  });

  it('cannot be cancelled by a number that is not its own', async () => {
    const { service } = openService();
    const { id } = await service.handlers['calculation:start']({ text: LONG });
    expect(await service.handlers['calculation:cancel']({ id: id + 1 })).toEqual({ cancelled: false });
    expect(await service.handlers['calculation:cancel']({ id })).toEqual({
      cancelled: true,
    });
  });

  it('ends with the service', async () => {
    const { service, posted } = openService();
    const { id } = await service.handlers['calculation:start']({ text: LONG });
    service.dispose();
    expect(finished(posted, id)).toMatchObject([{ outcome: { kind: 'cancelled' } }]);
  });
});

describe('program:describe', () => {
  it('tells version, host and threads', async () => {
    expect(await openService().service.handlers['program:describe']()).toEqual({
      version: expect.stringMatching(/^\d+\.\d+\.\d+/),
      host: 'browser',
      workers: 1,
    });
  });
});
