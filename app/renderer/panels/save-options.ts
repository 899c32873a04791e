import { studyCsv } from '../../study/csv';
import { parseStudy } from '../../study/parse-study';
import { serialiseStudy } from '../../study/serialise';
import { figureAsPng, figureAsSvg, printFigure } from '../charts/print-figure';
import { fileStem } from '../files/file-stem';
import type { FileToSave } from '../files/save-file';
import { studyText } from '../state/study-text';
import type { Run, WindowState } from '../state/window-state';

export interface SaveOption {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  /** absent: there is nothing to save yet */
  readonly file: FileToSave | undefined;
}

/** What can be saved of the window as it is. */
export function saveOptions({ draft, run, view }: WindowState): readonly SaveOption[] {
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
  ];
}
