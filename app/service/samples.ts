import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { SampleSummary } from '../contract/requests';
import { parseStudy } from '../study/parse-study';
import { studySentence } from '../study/sentence';
import { Refusal } from './refusal';

const ENDING = '.study.json';

/** The studies in the folder, in the order of their file names. */
export async function listSamples(folder: string): Promise<readonly SampleSummary[]> {
  const ids = await listIds(folder);
  return Promise.all(
    ids.map(async (id) => {
      const parsed = parseStudy(await readSample(folder, id));
      if (!parsed.ok) throw new Error(`The sample ${id} is refused: ${parsed.issues[0]?.message}`);
      return {
        id,
        title: parsed.study.title ?? id,
        sentence: studySentence(parsed.study),
      };
    }),
  );
}

/** @param id - only ever compared with the names that are there, so that it cannot lead out of the folder */
export async function openSample(
  folder: string,
  id: string,
): Promise<{ readonly name: string; readonly text: string }> {
  if (!(await listIds(folder)).includes(id)) {
    throw new Refusal({
      code: 'sample.unknown',
      place: '',
      message: `There is no sample named “${id}”.`,
      remedy: 'Choose one from the list.',
    });
  }
  return { name: `${id}${ENDING}`, text: await readSample(folder, id) };
}

async function listIds(folder: string): Promise<readonly string[]> {
  const names = await readdir(folder);
  return names
    .filter((name) => name.endsWith(ENDING))
    .map((name) => name.slice(0, -ENDING.length))
    .sort();
}

function readSample(folder: string, id: string): Promise<string> {
  return readFile(join(folder, `${id}${ENDING}`), 'utf8');
}
