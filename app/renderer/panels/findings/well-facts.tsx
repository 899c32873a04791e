import type { LevelFindings, ReferenceWeightFinding, Study } from '#engine';
import { depthReference } from '../../../study/fragments-text';
import { formatPlain } from '../../numbers';
import { type Fact, Facts } from '../facts';
import { energyText, type PositionText, positionText, type ShownUnits } from './shown-units';

interface WellFactsProps extends ShownUnits {
  readonly findings: LevelFindings;
  readonly study: Study;
}

/** Minimum, depth and limits of a level's curve, each with what it rests on, or why it is not there. */
export function WellFacts({ findings, study, lengthUnit, energyUnit }: WellFactsProps) {
  const { minimum, wellDepth, dissociation, counterpoise, instabilityOnset, referenceWeight } = findings;
  const where = positionText(study, lengthUnit);
  const energy = (hartree: number) => energyText(hartree, energyUnit);
  const limit = wellDepth && depthReference(study.molecule, wellDepth, dissociation, (x) => where(x, 5));
  const facts: readonly Fact[] = [
    ...(minimum.kind === 'found'
      ? ([
          ['Equilibrium distance', <Uncertain key="re" where={where} of={minimum} />],
          ['Energy there', energy(minimum.energy)],
          ...(minimum.others ?? []).map(
            (other): Fact => [
              `Higher minimum, at ${where(other.equilibriumDistance, 6)}`,
              energy(other.energy),
            ],
          ),
        ] satisfies Fact[])
      : []),
    wellDepth && [`Well depth, against ${limit}`, energy(wellDepth.value)],
    counterpoise?.kind === 'found'
      ? [
          <abbr
            key="counterpoise"
            title={`Each fragment gains from the other’s basis functions, together ${energy(counterpoise.error)} at the minimum; the depth less that (Boys, Bernardi 1970)`}
          >
            Well depth, counterpoise-corrected
          </abbr>,
          energy(counterpoise.wellDepth),
        ]
      : undefined,
    dissociation?.kind === 'found' && dissociation.farEndAbove !== undefined
      ? [
          <abbr key="above" title="What still binds there, the size-consistency error of the level, or both">
            Far end above separate fragments
          </abbr>,
          energy(dissociation.farEndAbove),
        ]
      : undefined,
    instabilityOnset?.kind === 'found'
      ? [
          <abbr
            key="onset"
            title="The lowest eigenvalue of the triplet orbital Hessian passes zero: beyond, different orbitals for different spins lie lower"
          >
            Onset of instability
          </abbr>,
          <Uncertain
            key="onsetAt"
            where={where}
            of={{
              equilibriumDistance: instabilityOnset.coordinate,
              uncertainty: instabilityOnset.uncertainty,
            }}
          />,
        ]
      : undefined,
    referenceWeight && weightFact(referenceWeight, where),
  ];
  const absent = [
    ...(instabilityOnset?.kind === 'none'
      ? [`No onset of instability: ${withoutStop(instabilityOnset.reason)}.`]
      : []),
    ...(minimum.kind === 'found' ? [] : [whyNoMinimum(minimum, where)]),
    ...(minimum.kind === 'found' && minimum.onKink
      ? ['The curve has a kink at its minimum, so that there are no constants of the well.']
      : []),
    ...(minimum.kind === 'found' && wellDepth === undefined
      ? ['No well depth: the far end has not converged.']
      : []),
    ...(counterpoise?.kind === 'none'
      ? [`No counterpoise correction: ${withoutStop(counterpoise.reason)}.`]
      : []),
  ];
  return (
    <>
      <Facts facts={facts} />
      {absent.map((sentence) => (
        <p key={sentence} className="absent">
          {sentence}
        </p>
      ))}
    </>
  );
}

function Uncertain({
  where,
  of: { equilibriumDistance, uncertainty },
}: {
  readonly where: PositionText;
  readonly of: { readonly equilibriumDistance: number; readonly uncertainty: number };
}) {
  return (
    <>
      {where(equilibriumDistance, 6)}
      <span className="hint"> ± {where(uncertainty, 1)}</span>
    </>
  );
}

function weightFact(finding: ReferenceWeightFinding, where: PositionText): Fact {
  const percent = `${formatPlain(100 * finding.threshold, 3)} %`;
  const name = (
    <abbr key="weight" title="Beyond, a single determinant describes less than this of the wave function">
      Reference weight falls below {percent}
    </abbr>
  );
  if (finding.kind === 'none') return [name, <span key="none">{withoutStop(finding.reason)}</span>];
  return [
    name,
    <Uncertain
      key="at"
      where={where}
      of={{ equilibriumDistance: finding.coordinate, uncertainty: finding.uncertainty }}
    />,
  ];
}

export function whyNoMinimum(
  minimum: Exclude<LevelFindings['minimum'], { readonly kind: 'found' }>,
  where: PositionText,
): string {
  switch (minimum.kind) {
    case 'atEdge':
      return `No minimum inside the range: the lowest point is its edge, ${where(minimum.coordinate, 5)}. Widen the range there.`;
    case 'several':
      return `Several minima, near ${minimum.near.map((place) => where(place, 5)).join(', ')}. Narrow the range to one of them.`;
    case 'none':
      return `No minimum: ${withoutStop(minimum.reason)}.`;
  }
}

const withoutStop = (sentence: string) => sentence.replace(/\.$/, '');
