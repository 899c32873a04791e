import { describe, expect, it } from 'vitest';
import { EngineError } from '#engine';
import { failureOf } from '../../../app/calculation/failure';

describe('failureOf', () => {
  it('keeps what the engine says', () => {
    const error = new EngineError('study.states', 'No states.', 'Ask for one.', { states: 0 }, 'states');
    expect(failureOf(error)).toEqual({
      code: 'study.states',
      place: 'states',
      message: 'No states.',
      remedy: 'Ask for one.',
    });
  });

  it('knows when memory ran out, however V8 says it', () => {
    for (const allocate of [() => new Float64Array(2 ** 53), () => new ArrayBuffer(2 ** 53)]) {
      let thrown: unknown;
      try {
        allocate();
      } catch (error) {
        thrown = error;
      }
      expect(failureOf(thrown)).toMatchObject({ code: 'calculation.outOfMemory' });
    }
  });

  it('says of anything else that the program is to blame', () => {
    expect(failureOf(new TypeError('x is undefined'))).toMatchObject({ code: 'internal' });
    expect(failureOf('text').message).toContain('text');
  });
});
