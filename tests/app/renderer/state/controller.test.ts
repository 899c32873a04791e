import { describe, expect, it } from 'vitest';
import { WindowController } from '../../../../app/renderer/state/controller';
import type { Remembered } from '../../../../app/renderer/state/remembered';
import { createStore } from '../../../../app/renderer/state/store';
import { INITIAL_STATE } from '../../../../app/renderer/state/window-state';
import { createFakeHost } from '../../../support/fake-host';
import { sampleResults } from '../../../support/sample-results';

function openWindow(options: { secondsPerPoint?: number; remembered?: Remembered } = {}) {
  const host = createFakeHost({ secondsPerPoint: options.secondsPerPoint ?? 0.01 });
  const store = createStore(INITIAL_STATE);
  let remembered: Remembered = options.remembered ?? {};
  const resting: (() => void)[] = [];
  const controller = new WindowController(store, {
    host,
    memory: {
      load: () => remembered,
      save: (next) => {
        remembered = next;
      },
    },
    afterTyping: (callback) => resting.push(callback),
    onNextFrame: (callback) => callback(),
    saveFile: async ({ suggestedName }) => {
      throw new Error(`no room for ${suggestedName}`);
    },
  });
  /** typing has rested and the host has answered */
  const settle = async () => {
    for (const callback of resting.splice(0)) callback();
    await new Promise((resolve) => setTimeout(resolve));
  };
  const named = (name: string) => host.requests.filter((request) => request.name === name);
  return { host, store, controller, settle, named, memory: () => remembered };
}

const setTo = (to: string) => (draft: (typeof INITIAL_STATE)['draft']) => ({
  ...draft,
  scan: { ...draft.scan, to },
});

describe('the window', () => {
  it('begins with the first sample, computed at once because it is quick', async () => {
    const { host, store, controller } = openWindow();
    await controller.begin();
    expect(store.get().draft.title).toBe('Two hydrogen atoms come together');
    expect(store.get().run?.status).toBe('computing');
    for (let point = 0; point <= 37; point++) host.emitNextPoint();
    expect(store.get().run).toMatchObject({ status: 'done', total: 37 });
    expect(store.get().run?.results?.findings).toHaveProperty('FCI');
  });

  it('leaves a long calculation until it is asked for', async () => {
    const { store, controller, named } = openWindow({ secondsPerPoint: 600 });
    await controller.begin();
    expect(named('calculation:start')).toEqual([]);
    await controller.compute();
    expect(store.get().run?.status).toBe('computing');
  });

  it('keeps what is typed, valid or not, and remembers it', async () => {
    const { store, controller, settle, memory } = openWindow();
    await controller.begin();
    controller.edit(setTo('six'));
    await settle();
    expect(store.get().draft.scan.to).toBe('six');
    expect(store.get().check).toMatchObject({
      kind: 'judged',
      result: { ok: false, issues: [{ place: 'scan.to' }] },
    });
    const reopened = openWindow({ remembered: memory() });
    await reopened.controller.begin();
    expect(reopened.store.get().draft.scan.to).toBe('six');
    expect(reopened.named('samples:open')).toEqual([]);
  });

  it('computes nothing while the study is wrong or not yet judged', async () => {
    const { controller, settle, named } = openWindow({ secondsPerPoint: 600 });
    await controller.begin();
    controller.edit(setTo('5'));
    await controller.compute();
    controller.edit(setTo('six'));
    await settle();
    await controller.compute();
    expect(named('calculation:start')).toEqual([]);
  });

  it('judges only the latest typing', async () => {
    const { store, controller, settle, named } = openWindow();
    await controller.begin();
    const before = named('study:check').length;
    controller.edit(setTo('s'));
    controller.edit(setTo('5'));
    await settle();
    expect(named('study:check')).toHaveLength(before + 1);
    expect(store.get().check).toMatchObject({ result: { ok: true } });
  });

  it('lets go at once when cancelled and keeps the points that were there', async () => {
    const { host, store, controller, named } = openWindow();
    await controller.begin();
    host.emitNextPoint();
    host.emitNextPoint();
    controller.cancel();
    expect(store.get().run?.status).toBe('cancelled');
    host.emitNextPoint();
    expect(store.get().run?.points.filter((point) => point !== undefined)).toHaveLength(2);
    expect(named('calculation:cancel')).toEqual([{ name: 'calculation:cancel', payload: { id: 1 } }]);
  });

  it('cancels also a calculation whose number it does not know yet', async () => {
    const { store, controller, named } = openWindow({ secondsPerPoint: 600 });
    await controller.begin();
    const started = controller.compute();
    controller.cancel();
    await started;
    expect(store.get().run?.status).toBe('cancelled');
    expect(named('calculation:cancel')).toHaveLength(1);
  });

  it('opens results with their study, their sentence and their curves', async () => {
    const { store, controller } = openWindow();
    const results = sampleResults(['RHF', 'FCI']);
    await controller.openText('any.json', JSON.stringify(results));
    expect(store.get().run).toMatchObject({ status: 'opened', results });
    expect(store.get().run?.sentence).toContain('with RHF and FCI');
    expect(store.get().draft.levels).toEqual(['RHF', 'FCI']);
  });

  it('leaves the window as it was when a file is refused, and says why', async () => {
    const { store, controller } = openWindow();
    await controller.begin();
    const { draft } = store.get();
    await controller.openText('odd.study.json', '{ "format": "farwell/study", ');
    expect(store.get().draft).toBe(draft);
    expect(store.get().notice).toMatchObject({ title: 'odd.study.json cannot be opened' });
    expect(store.get().notice?.lines[0]).toContain('line 1');
  });

  it('says that a file was not saved, and why', async () => {
    const { store, controller } = openWindow();
    await controller.save({ suggestedName: 'a.csv', type: 'text/csv', content: () => '' });
    expect(store.get().notice).toMatchObject({
      title: 'a.csv was not saved',
      lines: [expect.stringContaining('no room')],
    });
  });
});
