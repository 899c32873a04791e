import type { LevelFindings, StudyResults, VibrationalState } from '#engine';
import { planFigure } from '../../app/report/figure-plan';
import { reportDocument } from '../../app/report/report-content';
import type { ReportDocument } from '../../app/report/report-document';
import { studySentence } from '../../app/study/sentence';
import { sampleResults } from './sample-results';

/** The report of some results, named a, b, … */
export function documentOf(...results: readonly StudyResults[]): ReportDocument {
  const names = results.map((_, index) => String.fromCharCode('a'.charCodeAt(0) + index));
  const figure = planFigure(results, names);
  return reportDocument({
    results,
    names,
    sentences: results.map(({ study }) => studySentence(study)),
    figure: 'plan' in figure ? { key: figure.plan.key } : figure,
  });
}

/** All words of a report, a line a block, a row or a note. */
export function textOf({ heading, blocks }: ReportDocument): string {
  const lines = blocks.flatMap((block): readonly string[] => {
    switch (block.kind) {
      case 'section':
        return [block.heading];
      case 'paragraph':
        return [block.text];
      case 'figure':
        return [block.caption];
      case 'table':
        return [block.table.heading, ...block.table.rows.map((row) => row.join(' | ')), ...block.table.notes];
      case 'list':
        return block.items.map(({ lead, text }) => `${lead}: ${text}`);
      default:
        return block.references.map((reference, index) => `[${index + 1}] ${reference}`);
    }
  });
  return [heading, ...lines].join('\n');
}

const estimate = (value: number) => ({ value, uncertainty: 1e-3 });

/** Results with a minimum, constants and so many vibrational levels, all of plausible size and none computed. */
export function withSpectroscopy(count: number, changes: Partial<StudyResults> = {}): StudyResults {
  const results = sampleResults(['FCI']);
  const levels = Array.from(
    { length: count },
    (_, v): VibrationalState => ({
      v,
      energyPerCm: 2000 * (v + 0.5),
      rotationalConstantPerCm: 60 - v,
      uncertaintyPerCm: 1e-4,
    }),
  );
  const FCI: LevelFindings = {
    ...results.findings.FCI!,
    constants: {
      equilibriumDistanceAngstrom: estimate(0.75),
      forceConstantNewtonPerMetre: estimate(555),
      diatomic: {
        masses: 'atomic',
        reducedMassDalton: 0.5,
        harmonicWavenumberPerCm: estimate(4300.5),
        anharmonicityPerCm: estimate(111),
        rotationalConstantPerCm: estimate(59),
        vibrationRotationCouplingPerCm: estimate(2.7),
        centrifugalDistortionPerCm: estimate(0.0446),
      },
    },
    vibration: {
      kind: 'found',
      levels,
      zeroPointPerCm: 1000,
      boundLevels: count,
      converged: true,
      beyondComputedRange: [count - 1],
      interpolationErrorPerCm: 0.004,
      pointsAdded: 0,
      reducedMassDalton: 0.5,
    },
  };
  return { ...results, findings: { FCI }, ...changes };
}
