import type { Requests } from '../contract/requests';
import { ReportError } from '../report/report-error';
import { parseResults } from '../study/parse-results';
import { Refusal } from './refusal';

type MakeReport = Requests['report:make'];

/** One column of a journal: the window saves one figure at a time. */
const WIDTH_MILLIMETRES = 85;

/** Makes the files of one part of a report. */
export async function makeReport({
  results: texts,
  part,
  options = {},
}: Parameters<MakeReport>[0]): Promise<ReturnType<MakeReport>> {
  const results = texts.map(({ text }) => {
    const parsed = parseResults(text);
    if (!parsed.ok) throw new Refusal(parsed.issues[0]!);
    return parsed.results;
  });
  // drawing needs far more code than all other requests together
  const { reportFiles } = await import('../report/report-files');
  try {
    const files = reportFiles(
      results,
      texts.map(({ name }) => name),
      { widthMillimetres: WIDTH_MILLIMETRES, ...options },
    ).filter((file) => file.part === part);
    return {
      files: await Promise.all(
        files.map(async ({ name, content }) => ({
          name,
          base64: Buffer.from(await content()).toString('base64'),
        })),
      ),
    };
  } catch (error) {
    throw error instanceof ReportError ? new Refusal(error) : error;
  }
}
