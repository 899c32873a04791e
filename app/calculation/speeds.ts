import { mkdirSync, readFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import writeFileAtomic from 'write-file-atomic';
import {
  computePoint,
  countWork,
  NOMINAL_SPEEDS,
  type PreparedStudy,
  prepareStudy,
  type Speeds,
  type Study,
  UNATTENDED,
  type WorkKind,
} from '#engine';
import { cacheSettings } from './cache-settings';
import { sha256 } from './sha256';
import { type StageTime, startStageClock } from './stage-clock';
import { codeKey } from './study-key';

/** A molecule of which every stage takes long enough to be measured, and all together a tenth of a second. */
const SAMPLE: Study = {
  format: 'farwell/study',
  version: 1,
  molecule: {
    unit: 'bohr',
    atoms: [
      { element: 'O', at: [0, 0, 0] },
      { element: 'H', at: [0, 1.43, 1.11] },
      { element: 'H', at: [0, -1.43, 1.11] },
    ],
  },
  basis: '6-31G',
  levels: ['RHF', 'CISDT'],
  frozenCore: true,
};

const KIND_OF: Readonly<Record<StageTime['stage'], WorkKind>> = {
  integrals: 'integrals',
  'self-consistency': 'fields',
  stability: 'fields',
  'scale factors': 'fields',
  transformation: 'transformation',
  'CI model space': 'modelSpace',
  'CI product': 'products',
  symmetry: 'rest',
  rest: 'rest',
};

/**
 * How fast this machine computes: measured once, then kept in the cache's folder until program, Node or processor
 * change.
 */
export async function machineSpeeds(): Promise<Speeds> {
  const folder = cacheSettings()?.folder;
  const machine = sha256(JSON.stringify([codeKey(), process.version, cpus()[0]?.model]));
  const path = folder === undefined ? undefined : join(folder, `speeds-${machine.slice(0, 16)}.json`);
  const known = path === undefined ? undefined : readSpeeds(path);
  if (known) return known;
  const measured = measureSpeeds();
  if (folder !== undefined && path !== undefined) {
    try {
      mkdirSync(folder, { recursive: true });
      await writeFileAtomic(path, `${JSON.stringify(measured)}\n`);
    } catch {
      // measured again next time
    }
  }
  return measured;
}

/** Undefined unless the file holds a speed of every kind. */
function readSpeeds(path: string): Speeds | undefined {
  try {
    const read = JSON.parse(readFileSync(path, 'utf8')) as Record<string, unknown>;
    const isWhole = Object.keys(NOMINAL_SPEEDS).every(
      (kind) => typeof read[kind] === 'number' && read[kind] > 0,
    );
    return isWhole ? (read as Speeds) : undefined;
  } catch {
    return undefined;
  }
}

/** So long a point of the sample is repeated, seconds: the first ones compile the code, as those of a study do. */
const WARMING_SECONDS = 1;

/** Seconds of every kind of operation, from the fastest of a few points of a sample. */
export function measureSpeeds(): Speeds {
  const preparation = prepareStudy(SAMPLE);
  if (!preparation.ok) throw preparation.errors[0] ?? new Error('The sample was refused.');
  const { prepared } = preparation;
  const begin = performance.now();
  let fastest = timesOf(prepared);
  while (performance.now() - begin < 1000 * WARMING_SECONDS) {
    const times = timesOf(prepared);
    if (total(times) < total(fastest)) fastest = times;
  }
  const work = countWork(prepared).together;
  return Object.fromEntries(
    Object.entries(work).map(([kind, count]) => [kind, (fastest.get(kind as WorkKind) ?? 0) / count]),
  ) as Speeds;
}

/** Seconds that the kinds of work of one point take. */
function timesOf(prepared: PreparedStudy): ReadonlyMap<WorkKind, number> {
  const clock = startStageClock();
  computePoint(prepared, null, { control: { ...UNATTENDED, onStage: clock.listener } });
  const times = new Map<WorkKind, number>();
  for (const { stage, seconds } of clock.take()) {
    times.set(KIND_OF[stage], (times.get(KIND_OF[stage]) ?? 0) + seconds);
  }
  return times;
}

const total = (times: ReadonlyMap<WorkKind, number>) =>
  [...times.values()].reduce((sum, seconds) => sum + seconds, 0);
