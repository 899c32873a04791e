import { describe, expect, it } from 'vitest';
import { HELP, parseArguments } from '../../../app/cli/arguments';
import { commandLineOf } from '../../../app/main/command-line';

describe('commandLineOf', () => {
  it('hands a command on with everything after it', () => {
    expect(commandLineOf(['/opt/Farwell/farwell', 'run', 'a.study.json', '--print'], true)).toEqual([
      'run',
      'a.study.json',
      '--print',
    ]);
  });

  it('leaves out the folder that an unpacked Electron is started with', () => {
    expect(commandLineOf(['/x/electron', '/work/farwell', 'check', 'a.study.json'], false)).toEqual([
      'check',
      'a.study.json',
    ]);
  });

  it('knows every command and option that the help begins a line with', () => {
    const words = [...HELP.matchAll(/^ {2}farwell (\S+)/gm)].map((match) => match[1]!);
    expect(words.length).toBeGreaterThanOrEqual(4);
    for (const word of [...words, 'help', '--help'])
      expect(commandLineOf(['farwell', word], true)).toEqual([word]);
  });

  it.each(['help', '--help', '-h', '--version', '-V'])(
    'hands on %s, which the command line answers',
    (word) => {
      expect(commandLineOf(['farwell', word], true)).toEqual([word]);
      expect(parseArguments([word]).kind).toBe('show');
    },
  );

  it.each([
    [['farwell']],
    [['farwell', '--no-sandbox']],
    [['farwell', '/home/me/run']],
    [['farwell', '-psn_0_1', 'run']],
  ])('opens the window for %j', (argv) => {
    expect(commandLineOf(argv, true)).toBeUndefined();
  });
});
