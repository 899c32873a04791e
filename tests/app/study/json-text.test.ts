import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LONGEST_TEXT, readJson } from '../../../app/study/json-text';

function issues(text: string) {
  const reading = readJson(text);
  return reading.ok ? [] : reading.issues;
}

const message = (text: string) =>
  issues(text)
    .map((issue) => issue.message)
    .join(' ');

describe('readJson', () => {
  it('reads whatever JSON.parse reads, to the same value', () => {
    fc.assert(
      fc.property(fc.json(), (text) => {
        const reading = readJson(text);
        const hasForbiddenKey = /"(__proto__|constructor|prototype)":/.test(text);
        if (!hasForbiddenKey) expect(reading).toMatchObject({ ok: true });
        if (reading.ok) expect(reading.value).toEqual(JSON.parse(text));
      }),
      { seed: 20261201 },
    );
  });

  it('accepts nothing that JSON.parse refuses', () => {
    const sound = '{"a": [1, -2.5e3, true, null], "b": {"c": "x\\n"}}';
    fc.assert(
      fc.property(fc.nat(sound.length), fc.nat(3), fc.string({ maxLength: 3 }), (at, cut, insert) => {
        const text = sound.slice(0, at) + insert + sound.slice(at + cut);
        let isJson = true;
        try {
          JSON.parse(text);
        } catch {
          isJson = false;
        }
        if (!isJson) expect(issues(text).length).toBeGreaterThan(0);
      }),
      { seed: 20261201, numRuns: 2000 },
    );
  });

  it('knows the line of every value, and of the nearest thing around a missing one', () => {
    const reading = readJson('{\n "a": [\n  1,\n  {"b": 2}\n ]\n}');
    if (!reading.ok) throw new Error('refused');
    expect(reading.lineOf(['a'])).toBe(2);
    expect(reading.lineOf(['a', 1, 'b'])).toBe(4);
    expect(reading.lineOf(['a', 1, 'missing'])).toBe(4);
    expect(reading.lineOf(['missing'])).toBe(1);
  });

  it.each([
    ['a list', '{\n "a": [1,\n 2', 'The text ends on line 3, column 3, before the [ of line 2 is closed.'],
    ['a comma', '{"a": 1,', 'The text ends on line 1, column 9, before the { of line 1 is closed.'],
    ['a colon', '{"a":', 'The text ends on line 1, column 6, before the { of line 1 is closed.'],
    ['a text', '{"a": "b', 'The text ends on line 1, column 9, before the { of line 1 is closed.'],
    ['a word', '{"a": tr', 'The text ends on line 1, column 7, before the { of line 1 is closed.'],
    ['a number', '{"a": -', 'The text ends on line 1, column 7, before the { of line 1 is closed.'],
  ])('says where a file cut off after %s ends', (_, text, expected) => {
    expect(message(text)).toBe(expected);
  });

  it('takes every beginning of a file for cut off', () => {
    const text = '{\n "a": [-1.5e-3, true, "x"],\n "b": {"c": null}\n}';
    for (let end = 1; end < text.length; end++)
      expect(message(text.slice(0, end))).toContain('The text ends on line');
  });

  it.each([
    ['{"a": 1,}', 'Line 1, column 9: there is a comma before the closing }.'],
    ['{\n// why\n}', 'Line 2, column 1: JSON has no comments.'],
    ['{"a": 1 # why\n}', 'Line 1, column 9: JSON has no comments.'],
    ['{"a": NaN}', 'Line 1, column 7: NaN is not a number.'],
    ['{"a": -Infinity}', 'Line 1, column 7: -Infinity is not a number.'],
    ['{"a": 01}', 'Line 1, column 7: a number begins with 0.'],
    ['{"a": .5}', 'Line 1, column 7: a number begins with “.”.'],
    ["{'a': 1}", 'Line 1, column 2: a text begins with a single quote.'],
    ['{a: 1}', 'Line 1, column 2: “a” is not in quotes.'],
    ['{"a" 1}', 'Line 1, column 6: 1 was not expected here.'],
    ['{"a": "x\ny"}', 'Line 1, column 7: a text has a line break or tab inside.'],
    ['{} {}', 'Line 1, column 4: { was not expected here.'],
    ['  \n', 'The file is empty.'],
  ])('says what is wrong with %j', (text, expected) => {
    expect(message(text)).toBe(expected);
  });

  it('refuses keys given twice, which JSON.parse would lose, with both lines', () => {
    expect(issues('{"a": {"b": 1,\n "b": 2}}')).toEqual([
      {
        code: 'json.duplicateKey',
        place: 'a.b',
        message: 'a.b is given twice (lines 1 and 2).',
        remedy: 'Keep one of them.',
      },
    ]);
  });

  it('refuses keys that reach into the program, however they are spelled, and changes no prototype', () => {
    for (const key of ['__proto__', 'constructor', 'prototype', '\\u005f_proto__']) {
      expect(issues(`{"a": {"${key}": {"polluted": true}}}`)).toMatchObject([{ code: 'json.forbiddenKey' }]);
    }
    expect('polluted' in {}).toBe(false);
  });

  it('refuses numbers that a double cannot hold', () => {
    expect(issues('{"a": [1, -1e999]}')).toMatchObject([{ code: 'json.number', place: 'a[1]' }]);
  });

  it('reads a file with a byte-order mark', () => {
    expect(readJson('\uFEFF{}')).toMatchObject({ ok: true, value: {} });
  });

  it('refuses what is too long or too deep without parsing it', () => {
    expect(issues(' '.repeat(LONGEST_TEXT + 1))).toMatchObject([{ code: 'json.tooLarge' }]);
    expect(issues('['.repeat(LONGEST_TEXT))).toMatchObject([{ code: 'json.tooDeep' }]);
    expect(issues('{"a":'.repeat(100_000))).toMatchObject([{ code: 'json.tooDeep' }]);
  });

  it('reads the longest text there may be, whatever it consists of', () => {
    const filled = (unit: string) => unit.repeat(Math.floor((LONGEST_TEXT - 10) / unit.length));
    expect(readJson(`"${filled('a')}"`)).toMatchObject({ ok: true });
    expect(readJson(`"${filled('\\\\')}"`)).toMatchObject({ ok: true });
    expect(message(`"${filled('\\"')}`)).toContain('The text ends');
    expect(issues(`[${filled('"\n",')}1]`)).toHaveLength(1);
    expect(issues(`{${filled('"a":1,')}"b":1}`)).toHaveLength(50);
  });
});
