import { computePoint, type PreparedStudy, type Stage, type StudyAtom } from '#engine';
import { buildDeterminantSpace } from '../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../engine/configuration-interaction/hamiltonian-product';
import { makeEvenOrOdd } from '../../engine/configuration-interaction/spin-flip';
import { scratchMemory } from '../../engine/kernels/kernel-memory';
import { UNATTENDED } from '../../engine/termination';
import { inForm } from '../support/kernel-forms';
import { randomArray, seededRandom } from '../support/random';
import { randomOrbitalIntegrals } from '../support/random-orbital-integrals';
import { atom, prepare, study } from '../support/studies';
import { callsPerSecond, type Measurement } from './measure';

const NITROGEN = [atom('N'), atom('N', 0, 0, 2.07)];
const WATER = [atom('O'), atom('H', 0, 1.43, 1.11), atom('H', 0, -1.43, 1.11)];
const METHYL = [
  atom('C', 0, 0, 1.446),
  ...[0, 1, 2].map((k) => {
    const angle = (2 * Math.PI * k) / 3;
    return atom('H', 1.928 * Math.cos(angle), 1.928 * Math.sin(angle), 2.186);
  }),
];
/** Staggered. */
const ETHANE = [...METHYL, ...METHYL.map(({ element, at }) => atom(element, -at[0], -at[1], -at[2]))];

/** CISD of a closed shell: the product, and the whole of it beside the integrals that it stands on. */
export function closedShellDoubles(): Measurement[] {
  return [
    product(5, 25),
    ...besideIntegrals('N2, 6-31G*, frozen core', NITROGEN, '6-31G*'),
    ...besideIntegrals('H2O, cc-pVTZ, frozen core', WATER, 'cc-pVTZ'),
    ...besideIntegrals('C2H6, 6-31G**, frozen core', ETHANE, '6-31G**'),
  ];
}

function product(pairs: number, orbitals: number): Measurement {
  const space = buildDeterminantSpace(orbitals, pairs, pairs, 2);
  const integrals = randomOrbitalIntegrals(orbitals, 1);
  const rate = () =>
    scratchMemory().scope(() => {
      const { sector, apply } = prepareHamiltonianProduct(space, integrals).sectors[0];
      const vector = randomArray(sector.dimension, seededRandom(2));
      makeEvenOrOdd(sector, vector, 1);
      const result = new Float64Array(sector.dimension);
      return callsPerSecond(() => apply(vector, result));
    });
  return {
    name: `CISD product, ${2 * pairs} electrons in ${orbitals} orbitals, without symmetry`,
    ours: inForm('fast', rate),
    yardstick: inForm('plain', rate),
    unit: 'products/s',
    against: 'plain TypeScript over determinants',
  };
}

function besideIntegrals(name: string, atoms: readonly StudyAtom[], basis: string): Measurement[] {
  const prepared = prepare(study(atoms, { basis, levels: ['RHF', 'CISD'], frozenCore: true }));
  const seconds = fastestStages(prepared);
  const [integrals, transformation] = [seconds.get('integrals')!, seconds.get('transformation')!];
  const measured = { ours: 1 / seconds.get('CISD')!, unit: '1/s' };
  return [
    {
      ...measured,
      name: `CISD of ${name}, beside its integrals`,
      yardstick: 1 / (integrals + transformation),
      against: 'all integrals, over functions and over orbitals',
    },
    {
      ...measured,
      name: `CISD of ${name}, beside those over functions`,
      yardstick: 1 / integrals,
      against: 'all integrals over functions',
    },
  ];
}

/** Seconds of every stage of a point, each of the fastest of several. */
function fastestStages(prepared: PreparedStudy, calls = 6): ReadonlyMap<string, number> {
  const fastest = new Map<string, number>();
  for (let call = 0; call < calls; call++) {
    const seconds = new Map<string, number>();
    const began: number[] = [];
    const onStage = (stage: Stage, moment: 'begins' | 'ends') => {
      if (moment === 'begins') {
        began.push(performance.now());
        return;
      }
      const name = typeof stage === 'string' ? stage : stage.level;
      const taken = (performance.now() - began.pop()!) / 1000;
      seconds.set(name, (seconds.get(name) ?? 0) + taken);
    };
    computePoint(prepared, null, { control: { ...UNATTENDED, onStage } });
    for (const [name, taken] of seconds) {
      fastest.set(name, Math.min(taken, fastest.get(name) ?? Number.POSITIVE_INFINITY));
    }
  }
  return fastest;
}
