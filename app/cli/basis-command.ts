import { describeBasis, EngineError, listBasisSets } from '#engine';
import type { Invocation } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import type { Terminal } from './terminal';
import { refusalText } from './wording';

/** `farwell basis`: the sets there are, or one of them in the form in which a study can spell it out. */
export async function basisCommand(
  { name }: Extract<Invocation, { kind: 'basis' }>,
  terminal: Terminal,
): Promise<ExitCode> {
  if (name === undefined) {
    const entries = listBasisSets().map(
      (set) => `${set.name}\n  ${set.description}\n  ${set.elements.join(' ')}\n`,
    );
    await terminal.print(entries.join(''));
    return EXIT.done;
  }
  try {
    const { name: fullName, harmonics, shells, citations, notes } = describeBasis(name);
    await terminal.print(`${JSON.stringify({ name: fullName, shells, harmonics }, null, 2)}\n`);
    for (const line of [...citations, ...notes]) terminal.say(line);
    return EXIT.done;
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    terminal.say(refusalText(`the basis set “${name}”`, [{ ...error.toJSON(), place: '' }]));
    return EXIT.refused;
  }
}
