import { explainStudy, type LevelExplanation, type StudyExplanation } from '#engine';
import { affordableWorkers, programBytes } from '../calculation/memory';
import { readStudyFile } from '../calculation/read-study-file';
import { machineSpeeds } from '../calculation/speeds';
import { studySentence } from '../study/sentence';
import { programSeconds } from '../study/whole-study';
import type { Invocation } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import type { Terminal } from './terminal';
import { alignedTable, bytesText, counted, durationText, grouped, refusalText } from './wording';

/** `farwell check`: says what a study is and costs, without computing it. */
export async function checkCommand(
  { study }: Extract<Invocation, { kind: 'check' }>,
  terminal: Terminal,
): Promise<ExitCode> {
  const file = await readStudyFile(study);
  if (!file.ok) {
    terminal.say(refusalText(study, file.issues));
    return EXIT.refused;
  }
  const explanation = explanationText(
    explainStudy(file.prepared, await machineSpeeds()),
    affordableWorkers(file.prepared).count,
  );
  await terminal.print(`${studySentence(file.prepared.study)}\n\n${explanation}\n`);
  return EXIT.done;
}

/** @param cores - that share the points */
export function explanationText(explanation: StudyExplanation, cores: number): string {
  const { electrons, functions, frozenOrbitals, activeOrbitals, repulsionIntegrals, points, levels } =
    explanation;
  const { furtherBases = [] } = explanation;
  const facts = [
    ['electrons', String(electrons)],
    ['basis functions', grouped(functions)],
    ...(frozenOrbitals > 0
      ? [[activeOrbitals === undefined ? 'frozen core orbitals' : 'frozen orbitals', String(frozenOrbitals)]]
      : []),
    ...(activeOrbitals !== undefined ? [['active orbitals', String(activeOrbitals)]] : []),
    ['repulsion integrals', grouped(repulsionIntegrals)],
    ['points', grouped(points)],
  ];
  const lanes = Math.min(cores, points);
  const total = programSeconds(explanation, lanes);
  const memory = programBytes(explanation, lanes);
  return [
    alignedTable(facts),
    '',
    levelsTable(levels),
    '',
    ...furtherBases.flatMap((basis) => [
      `In ${basis.name}, ${counted(basis.functions, 'basis function')}:`,
      levelsTable(basis.levels),
      '',
    ]),
    `The whole study: about ${durationText(total)} and ${bytesText(memory)} of memory on ${counted(lanes, 'core')}, as fast as this machine computes now.`,
  ].join('\n');
}

function levelsTable(levels: readonly LevelExplanation[]): string {
  return alignedTable([
    ['level', 'determinants', 'memory', 'time a point'],
    ...levels.map(({ level, determinants, bytes, seconds }) => [
      level,
      determinants === undefined ? '–' : grouped(determinants),
      bytesText(bytes),
      durationText(seconds),
    ]),
  ]);
}
