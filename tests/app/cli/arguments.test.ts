import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { HELP, type Invocation, parseArguments } from '../../../app/cli/arguments';

const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };

function misuse(...argv: string[]): Extract<Invocation, { kind: 'misuse' }> {
  const invocation = parseArguments(argv);
  if (invocation.kind !== 'misuse') throw new Error(`accepted: ${JSON.stringify(invocation)}`);
  expect(invocation.message).not.toMatch(/^error/);
  expect(invocation.remedy).not.toBe('');
  return invocation;
}

describe('parseArguments', () => {
  it('reads every command with its options, in any order', () => {
    expect(parseArguments(['run', 'a.study.json'])).toEqual({
      kind: 'run',
      study: 'a.study.json',
      print: false,
      cache: true,
      timings: false,
    });
    expect(parseArguments(['run', '--workers=3', 'a', '--out', 'd'])).toEqual({
      kind: 'run',
      study: 'a',
      print: false,
      cache: true,
      timings: false,
      workers: 3,
      out: 'd',
    });
    expect(parseArguments(['run', 'a', '--print', '--no-cache', '--timings'])).toEqual({
      kind: 'run',
      study: 'a',
      print: true,
      cache: false,
      timings: true,
    });
    expect(parseArguments(['check', 'a'])).toEqual({ kind: 'check', study: 'a' });
    expect(parseArguments(['basis'])).toEqual({ kind: 'basis' });
    expect(parseArguments(['basis', 'sto-3g'])).toEqual({ kind: 'basis', name: 'sto-3g' });
    expect(parseArguments(['report', 'a', 'b', '--out', 'd'])).toEqual({
      kind: 'report',
      results: ['a', 'b'],
      out: 'd',
      hasCaption: true,
    });
    expect(
      parseArguments(['report', 'a', '--width', '85', '--height=62.5', '--no-caption', '--out', 'd']),
    ).toEqual({ kind: 'report', results: ['a'], out: 'd', width: 85, height: 62.5, hasCaption: false });
    expect(parseArguments(['report', 'a', '--geometry', '0.9'])).toMatchObject({ geometry: 0.9 });
    expect(parseArguments(['report', 'a', '--geometry', 'all'])).toMatchObject({ geometry: 'all' });
    expect(parseArguments(['check', '--', '-odd-name'])).toEqual({ kind: 'check', study: '-odd-name' });
  });

  it('shows help and version when asked', () => {
    for (const argv of [['--help'], ['-h'], ['help'], ['help', 'run'], ['run', '--help']]) {
      expect(parseArguments(argv)).toEqual({ kind: 'show', text: HELP });
    }
    expect(parseArguments(['--version'])).toEqual({ kind: 'show', text: `${version}\n` });
  });

  it('refuses a missing or unknown command, and names the one that may be meant', () => {
    expect(misuse().message).toBe('A command is missing.');
    expect(misuse('rnu', 'a')).toMatchObject({
      message: 'There is no command “rnu”.',
      remedy: 'Did you mean run?',
    });
    expect(misuse('xyzzy').remedy).toContain('--help');
  });

  it('refuses an unknown option, and names the one that may be meant', () => {
    expect(misuse('run', 'a', '--wokers', '2')).toMatchObject({
      message: 'There is no option “--wokers” here.',
      remedy: 'Did you mean --workers?',
    });
    expect(misuse('check', 'a', '--print').message).toContain('--print');
  });

  it('refuses too few and too many files', () => {
    for (const command of ['run', 'check', 'report'])
      expect(misuse(command).message).toContain(`farwell ${command}`);
    expect(misuse('run', 'a', 'b').message).toContain('one file');
    expect(misuse('basis', 'a', 'b').message).toContain('one file or name');
  });

  it('refuses options without or with a wrong value, and those that exclude each other', () => {
    expect(misuse('run', 'a', '--out').message).toBe('A value is missing after “--out”.');
    for (const count of ['0', '-1', '1.5', '1e3', 'two', '', '1025', '0x10']) {
      expect(misuse('run', 'a', `--workers=${count}`).message).toBe(`“${count}” is no number of workers.`);
    }
    expect(misuse('run', 'a', '--print', '--out', 'd').message).toBe(
      '“--print” writes no files, so “--out” has no meaning with it.',
    );
    for (const size of ['39', '501', '85mm', '', '-85']) {
      expect(misuse('report', 'a', `--width=${size}`)).toEqual({
        kind: 'misuse',
        message: `“${size}” is no size of a figure.`,
        remedy: 'Give millimetres from 40 to 500, as `--width 85 --height 60`.',
      });
    }
    expect(misuse('report', 'a', '--geometry', 'there').message).toContain('“there” is no place');
    expect(misuse('report', 'a', '--geometry', '1', '--width', '85').message).toBe(
      '“--geometry” writes no files, so “--width” has no meaning with it.',
    );
  });
});
