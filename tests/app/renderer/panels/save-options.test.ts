import { describe, expect, it } from 'vitest';
import { saveOptions } from '../../../../app/renderer/panels/save-options';
import { draftFromStudy } from '../../../../app/renderer/state/draft-from-study';
import { INITIAL_STATE, type WindowState } from '../../../../app/renderer/state/window-state';
import { studyCsv } from '../../../../app/study/csv';
import { parseResults } from '../../../../app/study/parse-results';
import { parseStudy } from '../../../../app/study/parse-study';
import { sampleResults, sampleStudy } from '../../../support/sample-results';

const results = sampleResults();
const state: WindowState = {
  ...INITIAL_STATE,
  draft: draftFromStudy(sampleStudy),
  run: {
    status: 'done',
    study: results.study,
    sentence: 'Pull.',
    text: '',
    points: results.points,
    total: results.points.length,
    progress: undefined,
    results,
    error: undefined,
  },
};
const makeReport = async (of: typeof results, name: string, part: string) =>
  new Blob([`${part} of ${of.points.length} points for ${name}`]);
const fileOf = (id: string, of: WindowState = state) =>
  saveOptions(of, makeReport).find((option) => option.id === id)?.file;

describe('what can be saved', () => {
  it('is a study that opens as it was', async () => {
    const file = fileOf('study');
    expect(file?.suggestedName).toBe('two-hydrogen-atoms-come-together.study.json');
    expect(parseStudy(String(await file?.content()))).toEqual({ ok: true, study: sampleStudy });
  });

  it('is results and a table with every digit', async () => {
    expect(parseResults(String(await fileOf('results')?.content()))).toMatchObject({ ok: true, results });
    expect(await fileOf('table')?.content()).toBe(studyCsv(results));
  });

  it('is the report in its parts, made by the host', async () => {
    const file = fileOf('pdf');
    expect(file?.suggestedName).toBe('two-hydrogen-atoms-come-together.report.pdf');
    expect(await ((await file!.content()) as Blob).text()).toBe(
      'pdf of 37 points for two-hydrogen-atoms-come-together',
    );
    expect(fileOf('pdf', { ...state, run: { ...state.run!, results: undefined } })).toBeUndefined();
  });

  it('is the geometry at the cursor', async () => {
    const at = { ...state, view: { ...state.view, cursor: 6 } };
    expect(await fileOf('geometry', at)?.content()).toBe(
      '# H₂, 1 Å; x y z in angstrom\nH      0.0000000000     0.0000000000     0.0000000000\nH      0.0000000000     0.0000000000     1.0000000000\n',
    );
  });

  it('is nothing that is not there or would not open again', () => {
    const wrong = { ...state, draft: { ...state.draft, scan: { ...state.draft.scan, to: 'six' } } };
    expect(fileOf('study', wrong)).toBeUndefined();
    const fresh = { ...state, run: undefined };
    expect(['results', 'table', 'svg', 'png'].map((id) => fileOf(id, fresh))).toEqual(
      Array(4).fill(undefined),
    );
    const cancelled = { ...state, run: { ...state.run!, status: 'cancelled' as const, results: undefined } };
    expect(fileOf('results', cancelled)).toBeUndefined();
    expect(fileOf('svg', cancelled)).toBeDefined();
  });
});
