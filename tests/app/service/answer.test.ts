import { describe, expect, it } from 'vitest';
import { EngineError } from '#engine';
import { answer } from '../../../app/service/answer';
import { quietHandlers } from '../../support/handlers';

const FORBIDDEN_LOG = (text: string) => {
  throw new Error(`nothing should be logged: ${text}`);
};

describe('answer', () => {
  it('gives the handler’s value, waited for', async () => {
    const handlers = quietHandlers({
      'calculation:cancel': async ({ id }) => ({ cancelled: id === 4 }),
    });
    expect(await answer(handlers, 'calculation:cancel', { id: 4 }, FORBIDDEN_LOG)).toEqual({
      ok: true,
      value: { cancelled: true },
    });
  });

  it.each<unknown>(['files:read', '__proto__', 'constructor', '', 7, null, undefined, {}, { toString: 1 }])(
    'refuses the name %j',
    async (name) => {
      expect(await answer(quietHandlers(), name, undefined, FORBIDDEN_LOG)).toMatchObject({
        ok: false,
        error: { code: 'request.unknown' },
      });
    },
  );

  it.each([
    ['study:check', undefined],
    ['study:check', { text: 7 }],
    ['study:check', { text: '', more: 1 }],
    ['study:check', ['']],
    ['samples:open', { id: null }],
    ['calculation:cancel', { id: 1.5 }],
    ['calculation:cancel', { id: Number.NaN }],
    ['program:describe', { anything: 1 }],
  ])('refuses %s with the payload %j', async (name, payload) => {
    expect(await answer(quietHandlers(), name, payload, FORBIDDEN_LOG)).toMatchObject({
      ok: false,
      error: { code: 'request.malformed' },
    });
  });

  it('passes on a refusal of the engine with its place and remedy', async () => {
    const handlers = quietHandlers({
      'basis:show': ({ name }) => {
        throw new EngineError(
          'basis.unknown',
          `There is no basis set “${name}”.`,
          'List them.',
          { name },
          'basis',
        );
      },
    });
    expect(await answer(handlers, 'basis:show', { name: 'x' }, FORBIDDEN_LOG)).toEqual({
      ok: false,
      error: {
        code: 'basis.unknown',
        place: 'basis',
        message: 'There is no basis set “x”.',
        remedy: 'List them.',
      },
    });
  });

  it('hides an unforeseen error from the window and writes it to the log in full', async () => {
    const handlers = quietHandlers({
      'samples:list': () => {
        throw new Error('ENOENT: /home/someone/private');
      },
    });
    const logged: string[] = [];
    const reply = await answer(handlers, 'samples:list', undefined, (text) => logged.push(text));
    expect(reply).toMatchObject({ ok: false, error: { code: 'internal' } });
    expect(JSON.stringify(reply)).not.toMatch(/private|at .*\.ts/);
    expect(logged.join()).toContain('private');
  });
});
