import type { PlacedBasis, PlacedShell } from '../../engine/basis/contracted-gaussian';
import type { Vector3 } from '../../engine/molecule/molecule';
import { gaussHermite, gaussLegendre } from './quadrature';

/** x^i y^j z^k exp(−αr²) about a centre. */
export interface Primitive {
  readonly powers: Vector3;
  readonly exponent: number;
  readonly centre: Vector3;
}

/** A contracted Cartesian function: Σ coefficient · primitive. */
export type CartesianFunction = readonly { readonly coefficient: number; readonly primitive: Primitive }[];

const hermite = gaussHermite(12);
const legendre = gaussLegendre(80);
const AXES: readonly number[] = [0, 1, 2];

/** A shell to be placed: coefficients multiply normalised primitives. */
export interface ShellSketch {
  readonly centre: Vector3;
  readonly l: number;
  readonly exponents: readonly number[];
  readonly coefficients?: readonly number[];
  /** take the coefficients as they are instead of normalising the contracted function */
  readonly keepNorm?: boolean;
}

/** ∫ x^(2l) exp(−p r²) d³r */
function selfOverlap(l: number, p: number): number {
  let moment = (Math.PI / p) ** 1.5;
  for (let n = 1; n <= l; n++) moment *= (2 * n - 1) / (2 * p);
  return moment;
}

/** Places shells by hand, for tests that must not depend on the basis library. */
export function placedBasis(
  sketches: readonly ShellSketch[],
  harmonics: PlacedBasis['harmonics'] = 'cartesian',
): PlacedBasis {
  let firstFunction = 0;
  const shells = sketches.map(
    ({ centre, l, exponents, coefficients = exponents.map(() => 1), keepNorm = false }, atom) => {
      const bare = coefficients.map((c, i) => c / Math.sqrt(selfOverlap(l, 2 * exponents[i])));
      let norm = keepNorm ? 1 : 0;
      bare.forEach((c, i) => {
        if (keepNorm) return;
        bare.forEach((d, j) => {
          norm += c * d * selfOverlap(l, exponents[i] + exponents[j]);
        });
      });
      const functionCount = harmonics === 'spherical' || l < 2 ? 2 * l + 1 : ((l + 1) * (l + 2)) / 2;
      const shell: PlacedShell = {
        atom,
        centre,
        angularMomentum: l,
        exponents: Float64Array.from(exponents),
        coefficients: Float64Array.from(bare, (c) => c / Math.sqrt(norm)),
        firstFunction,
        functionCount,
      };
      firstFunction += functionCount;
      return shell;
    },
  );
  return { shells, functionCount: firstFunction, harmonics };
}

/** The same shells all on one atom, so that those with the same exponents are computed together. */
export function onOneAtom(basis: PlacedBasis): PlacedBasis {
  return { ...basis, shells: basis.shells.map((shell) => ({ ...shell, atom: 0 })) };
}

/** The same shells each on an atom of its own, so that no two are computed together. */
export function onSeparateAtoms(basis: PlacedBasis): PlacedBasis {
  return { ...basis, shells: basis.shells.map((shell, atom) => ({ ...shell, atom })) };
}

/** The functions of a Cartesian basis written out, each normalised by its own numerical self-overlap. */
export function cartesianFunctions(basis: PlacedBasis): CartesianFunction[] {
  return basis.shells.flatMap((shell) => {
    const functions: CartesianFunction[] = [];
    for (let i = shell.angularMomentum; i >= 0; i--) {
      for (let j = shell.angularMomentum - i; j >= 0; j--) {
        const powers: Vector3 = [i, j, shell.angularMomentum - i - j];
        const bare = Array.from(shell.exponents, (exponent, n) => ({
          coefficient: shell.coefficients[n],
          primitive: { powers, exponent, centre: shell.centre },
        }));
        const norm = Math.sqrt(contracted([bare, bare], ([a, b]) => overlapByQuadrature(a, b)));
        functions.push(bare.map((term) => ({ ...term, coefficient: term.coefficient / norm })));
      }
    }
    return functions;
  });
}

/** An integral over contracted functions as the sum over their primitives. */
export function contracted(
  functions: readonly CartesianFunction[],
  integral: (primitives: readonly Primitive[]) => number,
): number {
  const sum = (chosen: readonly Primitive[], coefficient: number): number => {
    if (chosen.length === functions.length) return coefficient * integral(chosen);
    return functions[chosen.length].reduce(
      (total, term) => total + sum([...chosen, term.primitive], coefficient * term.coefficient),
      0,
    );
  };
  return sum([], 1);
}

const value = ({ powers, centre }: Primitive, axis: number, x: number) => (x - centre[axis]) ** powers[axis];

/**
 * ∫ f(x) exp(−Σ α (x − c)²) dx along one axis by a Gauss–Hermite rule, exact for the polynomials f that occur.
 */
function lineIntegral(
  gaussians: readonly { readonly exponent: number; readonly centre: number }[],
  f: (x: number) => number,
): number {
  const p = gaussians.reduce((sum, g) => sum + g.exponent, 0);
  const middle = gaussians.reduce((sum, g) => sum + g.exponent * g.centre, 0) / p;
  const rest = gaussians.reduce((sum, g) => sum + g.exponent * (g.centre - middle) ** 2, 0);
  let sum = 0;
  hermite.nodes.forEach((node, i) => {
    sum += hermite.weights[i] * f(middle + node / Math.sqrt(p));
  });
  return (sum * Math.exp(-rest)) / Math.sqrt(p);
}

const along = (primitives: readonly Primitive[], axis: number) =>
  primitives.map(({ exponent, centre }) => ({ exponent, centre: centre[axis] }));

/** ⟨a| x^moments |b⟩ about an origin. */
export function momentByQuadrature(a: Primitive, b: Primitive, moments: Vector3, origin: Vector3): number {
  return AXES.reduce(
    (product, axis) =>
      product *
      lineIntegral(
        along([a, b], axis),
        (x) => value(a, axis, x) * value(b, axis, x) * (x - origin[axis]) ** moments[axis],
      ),
    1,
  );
}

export function overlapByQuadrature(a: Primitive, b: Primitive): number {
  return momentByQuadrature(a, b, [0, 0, 0], [0, 0, 0]);
}

/** −½ ⟨a| ∇² b⟩ with the second derivative of x^i exp(−αx²) written out. */
export function kineticByQuadrature(a: Primitive, b: Primitive): number {
  const second = (axis: number) => (x: number) => {
    const i = b.powers[axis];
    const y = x - b.centre[axis];
    const lowered = i < 2 ? 0 : i * (i - 1) * y ** (i - 2);
    return lowered - 2 * b.exponent * (2 * i + 1) * y ** i + 4 * b.exponent ** 2 * y ** (i + 2);
  };
  return AXES.reduce(
    (sum, derived) =>
      sum -
      0.5 *
        AXES.reduce(
          (product, axis) =>
            product *
            lineIntegral(along([a, b], axis), (x) =>
              axis === derived ? value(a, axis, x) * second(axis)(x) : value(a, axis, x) * value(b, axis, x),
            ),
          1,
        ),
    0,
  );
}

/** ∫_0^∞ g(u) du with u = s √(scale/(1 − s²)), which makes Coulomb integrands entire in s. */
function coulombTransform(scale: number, g: (u: number) => number): number {
  return (
    (2 / Math.sqrt(Math.PI)) *
    legendre.nodes.reduce((sum, s, i) => {
      const rest = 1 - s * s;
      return sum + legendre.weights[i] * g(s * Math.sqrt(scale / rest)) * Math.sqrt(scale) * rest ** -1.5;
    }, 0)
  );
}

/** ⟨a| 1/|r − C| |b⟩ through 1/r = 2/√π ∫ exp(−u²r²) du, each axis by quadrature. */
export function attractionByQuadrature(a: Primitive, b: Primitive, nucleus: Vector3): number {
  return coulombTransform(a.exponent + b.exponent, (u) =>
    AXES.reduce(
      (product, axis) =>
        product *
        lineIntegral(
          [...along([a, b], axis), { exponent: u * u, centre: nucleus[axis] }],
          (x) => value(a, axis, x) * value(b, axis, x),
        ),
      1,
    ),
  );
}

/** (ab|cd) through 1/r₁₂ = 2/√π ∫ exp(−u²r₁₂²) du; along an axis the inner integral over x₂, then x₁. */
export function repulsionByQuadrature([a, b, c, d]: readonly Primitive[]): number {
  const p = a.exponent + b.exponent;
  const q = c.exponent + d.exponent;
  return coulombTransform((p * q) / (p + q), (u) =>
    AXES.reduce((product, axis) => product * pairIntegral([a, b], [c, d], axis, u), 1),
  );
}

function pairIntegral(
  [a, b]: readonly Primitive[],
  [c, d]: readonly Primitive[],
  axis: number,
  u: number,
): number {
  const p = a.exponent + b.exponent;
  const q = c.exponent + d.exponent;
  const P = (a.exponent * a.centre[axis] + b.exponent * b.centre[axis]) / p;
  const Q = (c.exponent * c.centre[axis] + d.exponent * d.centre[axis]) / q;
  // p(x₁−P)² + q(x₂−Q)² + u²(x₁−x₂)² = inner (x₂−m(x₁))² + outer (x₁−M)² + rest
  const inner = q + u * u;
  const reduced = (q * u * u) / inner;
  const outer = p + reduced;
  const M = (p * P + reduced * Q) / outer;
  const rest = ((p * reduced) / outer) * (P - Q) ** 2;
  let sum = 0;
  hermite.nodes.forEach((node, i) => {
    const x1 = M + node / Math.sqrt(outer);
    const m = (q * Q + u * u * x1) / inner;
    let innerSum = 0;
    hermite.nodes.forEach((innerNode, j) => {
      const x2 = m + innerNode / Math.sqrt(inner);
      innerSum += hermite.weights[j] * value(c, axis, x2) * value(d, axis, x2);
    });
    sum += hermite.weights[i] * value(a, axis, x1) * value(b, axis, x1) * innerSum;
  });
  const separation =
    ((a.exponent * b.exponent) / p) * (a.centre[axis] - b.centre[axis]) ** 2 +
    ((c.exponent * d.exponent) / q) * (c.centre[axis] - d.centre[axis]) ** 2;
  return (sum * Math.exp(-rest - separation)) / Math.sqrt(outer * inner);
}
