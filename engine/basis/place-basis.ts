import { EngineError } from '../errors';
import type { Atom } from '../molecule/molecule';
import type { BasisSet } from './basis-set';
import type { Harmonics, PlacedBasis, PlacedShell, ShellDefinition } from './contracted-gaussian';
import { elementMissing } from './element-missing';
import { primitiveNorm, selfOverlap, withoutZeros } from './normalisation';

/** Functions of a shell: 2l + 1 solid harmonics or (l + 1)(l + 2)/2 Cartesian products. */
export function shellFunctionCount(angularMomentum: number, harmonics: Harmonics): number {
  return harmonics === 'spherical'
    ? 2 * angularMomentum + 1
    : ((angularMomentum + 1) * (angularMomentum + 2)) / 2;
}

/**
 * Puts a basis set's shells on the atoms of a molecule, ghosts included: every contracted function is normalised,
 * primitives with coefficient 0 are left out.
 *
 * @throws EngineError `basis.elementMissing` if the set has no entry for an atom, `basis.empty` if no functions
 * result
 */
export function placeBasis(
  basisSet: BasisSet,
  molecule: { readonly atoms: readonly Pick<Atom, 'symbol' | 'position'>[] },
): PlacedBasis {
  const shells: PlacedShell[] = [];
  let functionCount = 0;
  for (const [atom, { symbol, position }] of molecule.atoms.entries()) {
    if (!Object.hasOwn(basisSet.elements, symbol)) {
      throw elementMissing(basisSet.name, symbol, Object.keys(basisSet.elements));
    }
    for (const definition of basisSet.elements[symbol]) {
      const count = shellFunctionCount(definition.angularMomentum, basisSet.harmonics);
      shells.push({
        atom,
        centre: position,
        angularMomentum: definition.angularMomentum,
        ...primitivesOf(definition),
        firstFunction: functionCount,
        functionCount: count,
      });
      functionCount += count;
    }
  }
  if (functionCount === 0) {
    throw new EngineError(
      'basis.empty',
      'The basis has no functions.',
      'Give at least one shell to at least one element of the molecule.',
      {},
      'basis',
    );
  }
  return { shells, functionCount, harmonics: basisSet.harmonics };
}

const primitivesOfDefinition = new WeakMap<
  ShellDefinition,
  Pick<PlacedShell, 'exponents' | 'coefficients'>
>();

/** Made once for a definition, so that its shells at every geometry share their arrays. */
function primitivesOf(definition: ShellDefinition): Pick<PlacedShell, 'exponents' | 'coefficients'> {
  let primitives = primitivesOfDefinition.get(definition);
  if (!primitives) {
    primitives = normalisedPrimitives(definition);
    primitivesOfDefinition.set(definition, primitives);
  }
  return primitives;
}

/** Exponents and the factors of the bare primitives x^l exp(−αr²) in the normalised contraction of x^l. */
function normalisedPrimitives(definition: ShellDefinition): Pick<PlacedShell, 'exponents' | 'coefficients'> {
  const { angularMomentum, exponents, coefficients } = withoutZeros(definition);
  const norm = 1 / Math.sqrt(selfOverlap(definition));
  return {
    exponents: Float64Array.from(exponents),
    coefficients: Float64Array.from(
      coefficients,
      (coefficient, i) => norm * coefficient * primitiveNorm(exponents[i], angularMomentum),
    ),
  };
}
