import { describe, expect, it } from 'vitest';
import { atom, compute, correlated, hartreeFock, singles, study } from '../../support/studies';

/*
 * H2 in a minimal basis in closed form (Szabo and Ostlund, sec. 3.5.2, 4.1 and 3.8.7), from integrals over the two
 * 1s functions written here by hand with the printed STO-3G expansion: no code of the engine is used for them.
 */
const EXPONENTS = [3.425250914, 0.6239137298, 0.168855404];
const WEIGHTS = [0.1543289673, 0.5353281423, 0.4446345422];

/** Error function to double precision: its Maclaurin series below 3, the continued fraction of erfc above. */
function errorFunction(x: number): number {
  if (x < 3) {
    let term = x;
    let sum = x;
    for (let n = 1; n < 120; n++) {
      term *= -(x * x) / n;
      sum += term / (2 * n + 1);
    }
    return (2 / Math.sqrt(Math.PI)) * sum;
  }
  let fraction = 0;
  for (let n = 120; n >= 1; n--) fraction = n / 2 / (x + fraction);
  return 1 - Math.exp(-x * x) / Math.sqrt(Math.PI) / (x + fraction);
}

/** F0(t) = ½√(π/t)·erf(√t). */
const boys = (t: number) =>
  t < 1e-8 ? 1 - t / 3 : 0.5 * Math.sqrt(Math.PI / t) * errorFunction(Math.sqrt(t));

type Primitive = { readonly a: number; readonly w: number; readonly z: number };

/** Integrals over two contracted 1s functions on a line, and the closed form's energies. */
function closedForm(distance: number) {
  const at = (z: number): Primitive[] =>
    EXPONENTS.map((a, k) => ({ a, z, w: WEIGHTS[k] * ((2 * a) / Math.PI) ** 0.75 }));
  const functions = [at(0), at(distance)];
  const pair = (p: Primitive, q: Primitive) => {
    const s = p.a + q.a;
    const reduced = (p.a * q.a) / s;
    return {
      s,
      z: (p.a * p.z + q.a * q.z) / s,
      reduced,
      r2: (p.z - q.z) ** 2,
      weight: p.w * q.w * Math.exp(-reduced * (p.z - q.z) ** 2),
    };
  };
  const sumPairs = (i: number, j: number, f: (x: ReturnType<typeof pair>) => number) =>
    functions[i].reduce((sum, p) => sum + functions[j].reduce((inner, q) => inner + f(pair(p, q)), 0), 0);
  const overlap = (i: number, j: number) => sumPairs(i, j, (x) => x.weight * (Math.PI / x.s) ** 1.5);
  const core = (i: number, j: number) =>
    sumPairs(i, j, (x) => {
      const kinetic = x.reduced * (3 - 2 * x.reduced * x.r2) * (Math.PI / x.s) ** 1.5;
      const attraction =
        [0, distance].reduce((sum, z) => sum + boys(x.s * (x.z - z) ** 2), 0) * ((2 * Math.PI) / x.s);
      return x.weight * (kinetic - attraction);
    });
  const repulsion = (i: number, j: number, k: number, l: number) =>
    sumPairs(i, j, (x) =>
      sumPairs(k, l, (y) => {
        const t = ((x.s * y.s) / (x.s + y.s)) * (x.z - y.z) ** 2;
        return (x.weight * y.weight * 2 * Math.PI ** 2.5 * boys(t)) / (x.s * y.s * Math.sqrt(x.s + y.s));
      }),
    );
  const s11 = overlap(0, 0);
  const s = overlap(0, 1) / s11;
  const h = { same: core(0, 0) / s11, cross: core(0, 1) / s11 };
  const r = {
    '1111': repulsion(0, 0, 0, 0) / s11 ** 2,
    '1122': repulsion(0, 0, 1, 1) / s11 ** 2,
    '2111': repulsion(1, 0, 0, 0) / s11 ** 2,
    '2121': repulsion(1, 0, 1, 0) / s11 ** 2,
  };
  const h11 = (h.same + h.cross) / (1 + s);
  const h22 = (h.same - h.cross) / (1 - s);
  const half = r['1111'] / 2 + r['1122'] / 2;
  const j11 = (half + r['2121'] + 2 * r['2111']) / (1 + s) ** 2;
  const j22 = (half + r['2121'] - 2 * r['2111']) / (1 - s) ** 2;
  const j12 = (half - r['2121']) / (1 - s * s);
  const k12 = (r['1111'] - r['1122']) / 2 / (1 - s * s);
  const e1 = h11 + j11;
  const e2 = h22 + 2 * j12 - k12;
  const mean = 2 * h11 + j11 + 1 / distance;
  const delta = e2 - e1 + (j11 + j22) / 2 - 2 * j12 + k12;
  return {
    rhf: mean,
    fci: mean + delta - Math.sqrt(delta * delta + k12 * k12),
    singlet: e2 - e1 - j12 + 2 * k12,
    triplet: e2 - e1 - j12,
  };
}

describe('H2 in a minimal basis', () => {
  it.each([0.2, 0.5, 1, 1.4, 2, 3, 5, 7, 10, 30, 100])(
    'independent: RHF, CIS, CISD and full CI equal the closed form at %f bohr',
    (r) => {
      const expected = closedForm(r);
      // the expansion above is printed to ten digits, which the energies inherit
      const tolerance = 2e-9;
      const basis = {
        name: 'printed STO-3G',
        shells: { H: [{ angularMomentum: 0, exponents: EXPONENTS, coefficients: WEIGHTS }] },
      };
      const point = compute(
        study([atom('H'), atom('H', 0, 0, r)], { levels: ['RHF', 'CIS', 'CISD', 'FCI'], basis }),
      );
      expect(Math.abs(hartreeFock(point).energy - expected.rhf)).toBeLessThan(tolerance);
      for (const level of ['CISD', 'FCI']) {
        expect(Math.abs(correlated(point, level).energy - expected.fci)).toBeLessThan(tolerance);
      }
      const [triplet, singlet] = singles(point).states;
      expect([triplet.spin, singlet.spin]).toEqual(['triplet', 'singlet']);
      expect(Math.abs(triplet.excitation - expected.triplet)).toBeLessThan(tolerance);
      expect(Math.abs(singlet.excitation - expected.singlet)).toBeLessThan(tolerance);
    },
  );

  it('identity: far apart full CI is two hydrogen atoms, and RHF is half ionic', () => {
    const { fci, rhf } = closedForm(1000);
    const atomEnergy = -0.4665818503844346; // value from memory: STO-3G, ζ = 1.24, one function
    expect(Math.abs(fci - 2 * atomEnergy)).toBeLessThan(1e-8);
    const point = compute(study([atom('H'), atom('H', 0, 0, 1000)], { levels: ['RHF', 'FCI'] }));
    expect(Math.abs(correlated(point).energy - 2 * atomEnergy)).toBeLessThan(1e-8);
    expect(Math.abs(hartreeFock(point).energy - rhf)).toBeLessThan(1e-8);
  });
});
