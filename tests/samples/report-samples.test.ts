import { readdirSync, readFileSync } from 'node:fs';
import { HtmlValidate } from 'html-validate';
import { extractText, getDocumentProxy } from 'unpdf';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { runStudy } from '../../app/calculation/run-study';
import type { ReportPart } from '../../app/contract/requests';
import { reportFiles } from '../../app/report/report-files';
import { parseStudy } from '../../app/study/parse-study';
import { studySentence } from '../../app/study/sentence';
import { printedNumbers } from '../support/printed-numbers';
import { launchBrowser } from '../support/real-browser';
import { withSpectroscopy } from '../support/reports';
import { sampleResults } from '../support/sample-results';
import { prepare } from '../support/studies';
import { startHere } from '../support/worker-here';

const FOLDER = new URL('../../sample-molecules/', import.meta.url);
const ENDING = '.study.json';
const names = readdirSync(FOLDER).map((file) => file.slice(0, -ENDING.length));

function readSample(name: string) {
  const reading = parseStudy(readFileSync(new URL(`${name}${ENDING}`, FOLDER), 'utf8'));
  if (!reading.ok) throw new Error(reading.issues[0]?.message);
  return reading.study;
}

/** Results as the sample would have them, but with numbers that were not computed: what counts is their form. */
function resultsInForm(name: string): StudyResults {
  const prepared = prepare(readSample(name));
  const { points } = sampleResults(['RHF', 'CIS', 'CISD', 'FCI']);
  return { ...withSpectroscopy(25), study: prepared.study, points };
}

const contentOf = async (results: StudyResults, name: string, part: ReportPart) =>
  reportFiles([results], [name])
    .find((file) => file.part === part)!
    .content();

/** Numbers of the results, as printed, that the text of the PDF does not have. */
async function missingFromPdf(results: StudyResults, name: string): Promise<readonly string[]> {
  const pdf = await contentOf(results, name, 'pdf');
  const document = await getDocumentProxy(new Uint8Array(pdf as Uint8Array));
  const { text } = await extractText(document, { mergePages: true });
  const words = new Set(text.replaceAll('−', '-').split(/\s+/));
  const expected = printedNumbers(results);
  expect(expected.length).toBeGreaterThan(20);
  return expected.filter((number) => !words.has(number));
}

describe('reports of the sample molecules', () => {
  const validator = new HtmlValidate({ extends: ['html-validate:recommended'] });
  let browser: Awaited<ReturnType<typeof launchBrowser>>;
  beforeAll(async () => {
    browser = await launchBrowser();
  });
  afterAll(() => browser.close());

  it.each(names)('%s: is valid HTML, and opens without a network, its figure drawn', async (name) => {
    const results = resultsInForm(name);
    const html = String(await contentOf(results, name, 'html'));
    const { results: found } = await validator.validateString(html);
    expect(found.flatMap(({ messages }) => messages.map(({ message }) => message))).toEqual([]);

    const page = await browser.newPage({ offline: true });
    const asked: string[] = [];
    const complaints: string[] = [];
    page.on('request', (request) => asked.push(request.url()));
    page.on('console', (message) => complaints.push(message.text()));
    page.on('pageerror', (error) => complaints.push(error.message));
    await page.setContent(html);
    expect(await page.locator('h1').textContent()).toBe(studySentence(results.study));
    const { width = 0, height = 0 } = (await page.locator('figure svg').boundingBox()) ?? {};
    expect(width).toBeGreaterThan(400);
    expect(height).toBeGreaterThan(200);
    expect({ asked, complaints }).toEqual({ asked: [], complaints: [] });
    await page.close();
  });

  it.each(names)('%s: its PDF has the numbers of its results', async (name) => {
    const results = resultsInForm(name);
    expect(await missingFromPdf(results, name)).toEqual([]);
  });

  it('heh-plus: computed, its PDF has the numbers of its results', async () => {
    const { scan, ...study } = readSample('heh-plus');
    if (!scan || 'values' in scan) throw new Error('no range');
    const prepared = prepare({ ...study, scan: { ...scan, count: 9 }, basis: 'STO-3G' });
    const outcome = await runStudy({ prepared }, { startWorker: startHere, workers: 1 });
    if (outcome.kind !== 'done') throw new Error(outcome.kind);
    expect(await missingFromPdf(outcome.results, 'heh-plus')).toEqual([]);
  });
});
