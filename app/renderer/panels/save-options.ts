import type { StudyResults } from '#engine';
import type { ReportPart } from '../../contract/requests';
import { studyCsv } from '../../study/csv';
import { geometryText } from '../../study/geometry-text';
import { parseStudy } from '../../study/parse-study';
import { serialiseStudy } from '../../study/serialise';
import { figureAsPng, figureAsSvg, printFigure } from '../charts/print-figure';
import { fileStem } from '../files/file-stem';
import type { FileToSave } from '../files/save-file';
import { cursorIndex } from '../state/cursor';
import { studyText } from '../state/study-text';
import type { Run, View, WindowState } from '../state/window-state';
import { positionText } from './findings/shown-units';

/** Parts of the report for one results file that are one file each. */
const REPORT_PARTS = [
  {
    part: 'pdf',
    name: 'Report, PDF',
    description: 'figure, findings, method, references and cautions',
    ending: 'report.pdf',
    type: 'application/pdf',
  },
  {
    part: 'html',
    name: 'Report, HTML',
    description: 'the same as one page for a browser',
    ending: 'report.html',
    type: 'text/html',
  },
  {
    part: 'figurePdf',
    name: 'Figure, PDF',
    description: 'one column of a journal wide, 85 mm',
    ending: 'figure.pdf',
    type: 'application/pdf',
  },
  {
    part: 'latex',
    name: 'Tables, LaTeX',
    description: 'findings and energies, for a manuscript',
    ending: 'tex',
    type: 'application/x-tex',
  },
] as const satisfies readonly {
  readonly part: ReportPart;
  readonly name: string;
  readonly description: string;
  readonly ending: string;
  readonly type: string;
}[];

export interface SaveOption {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  /** absent: there is nothing to save yet */
  readonly file: FileToSave | undefined;
}

function geometryFile(run: Run, view: View, stem: string): FileToSave | undefined {
  const index = cursorIndex(run, view.cursor);
  const point = index === undefined ? undefined : run.points[index];
  if (!point) return undefined;
  const { study } = run;
  const where =
    point.coordinate === null ? '' : positionText(study, study.molecule.unit)(point.coordinate, 10);
  return {
    suggestedName: `${stem}.geometry.txt`,
    type: 'text/plain',
    content: () => geometryText(study, point, where),
  };
}

export type MakeReport = (results: StudyResults, name: string, part: ReportPart) => Promise<Blob>;

/**
 * What can be saved of the window as it is.
 *
 * @param makeReport - asks the host for a part of the report
 */
export function saveOptions(
  { draft, run, view }: WindowState,
  makeReport: MakeReport,
): readonly SaveOption[] {
  const study = parseStudy(studyText(draft).text);
  const studyStem = fileStem(draft.title, draft.atoms.map(({ element }) => element).join(''));
  const runStem = run === undefined ? '' : fileStem(run.study.title ?? '', run.sentence);
  const hasPoints = run?.points.some((point) => point !== undefined) ?? false;
  const figure = (drawn: Run) =>
    printFigure(
      {
        study: drawn.study,
        points: drawn.points,
        hiddenLevels: view.hiddenLevels,
        levelsOf: view.showsVibration ? drawn.results : undefined,
        energyUnit: view.energyUnit,
        energyReference: view.energyReference,
        lengthUnit: view.lengthUnit ?? drawn.study.molecule.unit,
      },
      drawn.sentence,
    );
  return [
    {
      id: 'study',
      name: 'Study',
      description: study.ok
        ? 'the sentence, to open or run again'
        : 'once what is wrong in the sentence is corrected',
      file: study.ok
        ? {
            suggestedName: `${studyStem}.study.json`,
            type: 'application/json',
            content: () => serialiseStudy(study.study),
          }
        : undefined,
    },
    {
      id: 'results',
      name: 'Results',
      description: 'every number with all its digits',
      file: run?.results && {
        suggestedName: `${runStem}.results.json`,
        type: 'application/json',
        content: () => `${JSON.stringify(run.results)}\n`,
      },
    },
    {
      id: 'table',
      name: 'Table, CSV',
      description: 'energies in hartree, one row a point',
      file: run?.results && {
        suggestedName: `${runStem}.csv`,
        type: 'text/csv',
        content: () => studyCsv(run.results!),
      },
    },
    {
      id: 'svg',
      name: 'Figure, SVG',
      description: 'both charts in the units shown, for print',
      file:
        run && hasPoints
          ? {
              suggestedName: `${runStem}.svg`,
              type: 'image/svg+xml',
              content: () => figureAsSvg(figure(run)),
            }
          : undefined,
    },
    {
      id: 'png',
      name: 'Figure, PNG',
      description: 'the same as dots, for slides and mail',
      file:
        run && hasPoints
          ? { suggestedName: `${runStem}.png`, type: 'image/png', content: () => figureAsPng(figure(run)) }
          : undefined,
    },
    ...REPORT_PARTS.map(({ part, name, description, ending, type }) => ({
      id: part,
      name,
      description,
      file: run?.results && {
        suggestedName: `${runStem}.${ending}`,
        type,
        content: () => makeReport(run.results!, runStem, part),
      },
    })),
    {
      id: 'geometry',
      name: 'Geometry',
      description: 'at the cursor, as lines of element x y z',
      file: run && geometryFile(run, view, runStem),
    },
  ];
}
