import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { PreparedStudy } from '#engine';
import { drawFigure, renderSvg } from '../../app/report/render-figure';
import { placeBasis } from '../../engine/basis/place-basis';
import { buildDeterminantSpace } from '../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../engine/configuration-interaction/hamiltonian-product';
import { electronRepulsionTensor } from '../../engine/integrals/electron-repulsion';
import { transformTwoElectron } from '../../engine/integrals/orbital-transformation';
import { randomOrbitalIntegrals } from '../support/random-orbital-integrals';
import { atom, prepare, study } from '../support/studies';
import { connections } from './connections';
import { GROWTH_FIGURE_MILLIMETRES, growthFigure } from './growth-figure';
import { fastestCall } from './measure';
import { secondsOfPoints } from './scan-points';

/** How the time of one kind of work grows with one size. */
export interface Growth {
  readonly work: string;
  /** what grows */
  readonly size: string;
  readonly samples: readonly { readonly size: number; readonly seconds: number }[];
  /** seconds ∝ size^exponent, fitted to the samples */
  readonly exponent: number;
  readonly theoretical: number;
  /** why that is what theory says */
  readonly because: string;
}

type Say = (text: string) => void;

/** Measures everything once; takes a minute or two. */
export async function measureGrowth(say: Say): Promise<readonly Growth[]> {
  const measured: Growth[] = [];
  const measure = async (
    growth: Pick<Growth, 'work' | 'size' | 'theoretical' | 'because'>,
    sizes: readonly number[],
    secondsAt: (
      size: number,
    ) => { size: number; seconds: number } | Promise<{ size: number; seconds: number }>,
  ) => {
    say(`measuring ${growth.work} …`);
    const samples = [];
    for (const size of sizes) samples.push(await secondsAt(size));
    measured.push({ ...growth, samples, exponent: fittedExponent(samples) });
  };

  await measure(
    {
      work: 'repulsion integrals of a chain of hydrogen atoms, 6-31G',
      size: 'functions',
      theoretical: 4,
      because: 'one integral for every two pairs of functions',
    },
    [8, 14, 24, 40],
    (atoms) => {
      const prepared = chain(atoms);
      const basis = placeBasis(prepared.basisSet, prepared.moleculeAt(null));
      return { size: basis.functionCount, seconds: fastestCall(() => electronRepulsionTensor(basis)) };
    },
  );
  await measure(
    {
      work: 'transformation of all integrals to orbitals',
      size: 'functions',
      theoretical: 5,
      because: 'four indices, one after the other, each over all functions',
    },
    [20, 32, 50, 80],
    (functions) => {
      const { twoElectron } = randomOrbitalIntegrals(functions, 1);
      const coefficients = Float64Array.from({ length: functions ** 2 }, (_, i) => Math.cos(i * i));
      const transform = () => transformTwoElectron(twoElectron, coefficients, functions, functions);
      return { size: functions, seconds: fastestCall(transform) };
    },
  );
  await measure(
    {
      work: 'full-CI product of eight electrons, per connection',
      size: 'determinants',
      theoretical: 1,
      because: 'every determinant once, its connections divided out',
    },
    [8, 9, 10, 11, 12, 14, 16],
    (orbitals) => {
      const space = buildDeterminantSpace(orbitals, 4, 4, Number.POSITIVE_INFINITY);
      const [{ apply }] = prepareHamiltonianProduct(space, randomOrbitalIntegrals(orbitals, 1)).sectors;
      const vector = new Float64Array(space.dimension).map((_, i) => Math.cos(i * i));
      const product = new Float64Array(space.dimension);
      const seconds = fastestCall(() => apply(vector, product));
      return { size: space.dimension, seconds: seconds / connections(orbitals, 4) };
    },
  );
  await measure(
    { work: 'points of a scan, one worker', size: 'points', theoretical: 1, because: 'each by itself' },
    [4, 8, 16],
    async (points) => ({ size: points, seconds: await secondsOfPoints(points, 1) }),
  );
  await measure(
    {
      work: 'sixteen points of a scan',
      size: 'workers',
      theoretical: -1,
      because: 'points are independent, and the machine has as many cores',
    },
    [1, 2],
    async (workers) => ({ size: workers, seconds: await secondsOfPoints(16, workers) }),
  );
  return measured;
}

function chain(atoms: number): PreparedStudy {
  const places = Array.from({ length: atoms }, (_, i) => atom('H', 0, 0, 2 * i));
  return prepare(study(places, { basis: '6-31G' }));
}

/** Slope of a straight line through ln(seconds) against ln(size), by least squares. */
export function fittedExponent(samples: Growth['samples']): number {
  const x = samples.map(({ size }) => Math.log(size));
  const y = samples.map(({ seconds }) => Math.log(seconds));
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const [meanX, meanY] = [mean(x), mean(y)];
  const covariance = mean(x.map((value, i) => (value - meanX) * ((y[i] ?? 0) - meanY)));
  return covariance / mean(x.map((value) => (value - meanX) ** 2));
}

const FIGURE = 'app/resources/growth.svg';
const BEGINNING = '<!-- growth: written by `npm run bench -- --growth` -->';
const END = '<!-- end of growth -->';

/** Writes the figure, and the table into the README's section. @returns the files written */
export async function writeGrowth(growth: readonly Growth[]): Promise<readonly string[]> {
  const root = join(import.meta.dirname, '..');
  const description = growth
    .map(({ work, size, exponent }) => `${work}: seconds grow as ${size} to the power ${exponent.toFixed(1)}`)
    .join('; ');
  const figure = await drawFigure(growthFigure(growth), GROWTH_FIGURE_MILLIMETRES);
  mkdirSync(join(root, 'app', 'resources'), { recursive: true });
  writeFileSync(join(root, FIGURE), await renderSvg(figure, { title: 'How cost grows', description }));
  const readme = join(root, 'README.md');
  writeFileSync(readme, withSection(readFileSync(readme, 'utf8'), growthSection(growth)));
  return [FIGURE, 'README.md'];
}

export function growthSection(growth: readonly Growth[]): string {
  const rows = growth.map(({ work, size, samples, exponent, theoretical, because }) => {
    const [first, last] = [samples[0], samples.at(-1)];
    const range = `${first?.size.toLocaleString('en-GB')} to ${last?.size.toLocaleString('en-GB')}`;
    const cells = [work, `${size}, ${range}`, exponent.toFixed(2), `${theoretical}: ${because}`];
    return `| ${cells.join(' | ')} |`;
  });
  return [
    '| work | grows with | fitted exponent | in theory |',
    '|---|---|---|---|',
    ...rows,
    '',
    `![Seconds against size, both on logarithmic scales, with the fitted and the theoretical slopes](${FIGURE})`,
  ].join('\n');
}

function withSection(readme: string, section: string): string {
  const start = readme.indexOf(BEGINNING);
  const end = readme.indexOf(END);
  if (start < 0 || end < start) throw new Error(`README.md holds no “${BEGINNING}” … “${END}”.`);
  return `${readme.slice(0, start + BEGINNING.length)}\n${section}\n${readme.slice(end)}`;
}
