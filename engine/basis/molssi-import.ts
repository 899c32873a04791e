import { EngineError } from '../errors';
import { ELEMENTS } from '../molecule/elements';
import type { BasisSet, Citation } from './basis-set';
import type { Harmonics, ShellDefinition } from './contracted-gaussian';
import { normalisationNotes, withoutZeros } from './normalisation';
import { shellProblem } from './shell-check';

const SCHEMA_TYPES = ['complete', 'minimal'];
const SCHEMA_VERSIONS = ['0.1'];
const ROLES = ['orbital'];
const FUNCTION_TYPES = ['gto', 'gto_spherical', 'gto_cartesian'];
const REMEDY = 'Give a basis set of Gaussians in the MolSSI JSON schema, version 0.1.';
/** Numbers are written as text in the schema: sign, digits with an optional point, exponent with E. */
const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/**
 * Reads a basis set in the open MolSSI basis-set JSON schema, version 0.1, forms `complete` and `minimal`
 * (B. P. Pritchard, D. Altarawy, B. Didier, T. D. Gibson, T. L. Windus, J. Chem. Inf. Model. 59, 4814 (2019)).
 * Elements heavier than argon are passed over; keys that the schema does not have are ignored.
 *
 * @param text - content of the file
 * @param fileName - as the study names it, for messages
 * @returns every element from H to Ar of the file; shells with several rows are split
 * @throws EngineError `basis.file` naming the place in the file: another schema or version, a role other than
 * `orbital`, Slater-type shells, effective core potentials, angular momenta too high, shells of both spherical and
 * Cartesian kind, rows of the wrong length, anything that is not a finite number, contractions that vanish
 */
export function parseMolssiBasis(text: string, fileName: string): BasisSet {
  const file = new BasisFile(fileName);
  const root = file.parse(text);
  const marker = file.object(root.molssi_bse_schema, 'molssi_bse_schema');
  file.oneOf(marker.schema_type, SCHEMA_TYPES, 'molssi_bse_schema.schema_type');
  file.oneOf(marker.schema_version, SCHEMA_VERSIONS, 'molssi_bse_schema.schema_version');
  if (root.role !== undefined) file.oneOf(root.role, ROLES, 'role');
  const name = typeof root.name === 'string' && root.name.trim() !== '' ? root.name : fileName;

  const entries = file.object(root.elements, 'elements');
  const elements = new Map<string, ShellDefinition[]>();
  const citationKeys = new Set<string>();
  for (const { symbol, atomicNumber } of ELEMENTS) {
    if (!Object.hasOwn(entries, atomicNumber)) continue;
    const where = `elements.${atomicNumber}`;
    const element = file.object(entries[atomicNumber], where);
    for (const key of ['ecp_potentials', 'ecp_electrons']) {
      if (element[key] === undefined) continue;
      throw file.refusal(
        `${where}.${key}`,
        `${symbol} has an effective core potential, which cannot be used.`,
        'Use an all-electron basis set.',
      );
    }
    const shells = file.list(element.electron_shells, `${where}.electron_shells`);
    elements.set(
      symbol,
      shells.flatMap((shell, i) => file.shells(shell, symbol, `${where}.electron_shells[${i}]`)),
    );
    for (const key of file.citationKeys(element.references, `${where}.references`)) citationKeys.add(key);
  }
  if (elements.size === 0) {
    throw file.refusal(
      'elements',
      'there is no element from H to Ar.',
      'Use a set for the elements in question.',
    );
  }
  return {
    name,
    harmonics: file.harmonics,
    elements: Object.fromEntries(elements),
    citations: [...citationKeys].map((key): Citation => ({ key, text: `${key} (as named in ${fileName})` })),
    notes: normalisationNotes(elements),
  };
}

type JsonObject = Readonly<Record<string, unknown>>;

/** A file being read: every value is checked on the way and refused with its place. */
class BasisFile {
  readonly #name: string;
  #harmonics: Harmonics | undefined;

  constructor(name: string) {
    this.#name = name;
  }

  /** what the shells of l ≥ 2 read so far say */
  get harmonics(): Harmonics {
    return this.#harmonics ?? 'spherical';
  }

  refusal(where: string, message: string, remedy: string): EngineError<'basis.file'> {
    const text = `${this.#name}${where === '' ? '' : `, ${where}`}: ${message}`;
    return new EngineError('basis.file', text, remedy, { file: this.#name }, 'basis.file');
  }

  parse(text: string): JsonObject {
    let root: unknown;
    try {
      root = JSON.parse(text);
    } catch {
      throw this.refusal('', 'this is not JSON, or it is cut short.', REMEDY);
    }
    return this.object(root, '');
  }

  object(value: unknown, where: string): JsonObject {
    if (typeof value === 'object' && value !== null && !Array.isArray(value)) return value as JsonObject;
    throw this.#unexpected(value, where, 'an object');
  }

  list(value: unknown, where: string): readonly unknown[] {
    if (Array.isArray(value)) return value;
    throw this.#unexpected(value, where, 'a list');
  }

  oneOf(value: unknown, allowed: readonly string[], where: string): string {
    if (typeof value === 'string' && allowed.includes(value)) return value;
    throw this.#unexpected(value, where, allowed.map((word) => `"${word}"`).join(' or '));
  }

  citationKeys(references: unknown, where: string): string[] {
    if (references === undefined) return [];
    return this.list(references, where).flatMap((reference, i) => {
      const keys = this.object(reference, `${where}[${i}]`).reference_keys;
      return this.list(keys, `${where}[${i}].reference_keys`).map(String);
    });
  }

  /** the contracted functions of one entry of `electron_shells` */
  shells(value: unknown, symbol: string, where: string): ShellDefinition[] {
    const shell = this.object(value, where);
    if (shell.function_type === 'sto') {
      throw this.refusal(
        `${where}.function_type`,
        `${symbol} has Slater-type shells, which cannot be used.`,
        'Use a basis set of Gaussians.',
      );
    }
    const functionType = this.oneOf(shell.function_type, FUNCTION_TYPES, `${where}.function_type`);
    const momenta = this.list(shell.angular_momentum, `${where}.angular_momentum`).map((l, i) => {
      if (typeof l === 'number') return l;
      throw this.#unexpected(l, `${where}.angular_momentum[${i}]`, 'a number');
    });
    const exponents = this.#numbers(shell.exponents, `${where}.exponents`);
    const rows = this.list(shell.coefficients, `${where}.coefficients`).map((row, i) =>
      this.#numbers(row, `${where}.coefficients[${i}]`),
    );
    if (rows.length === 0 || (momenta.length !== 1 && momenta.length !== rows.length)) {
      throw this.refusal(
        where,
        `${momenta.length} angular momenta do not go with ${rows.length} rows of coefficients.`,
        'Give one angular momentum, or one for each row.',
      );
    }
    if (momenta.some((l) => l > 1)) this.#settleHarmonics(functionType, where);
    return rows.map((coefficients, row) => {
      const contraction = { angularMomentum: momenta[row] ?? momenta[0], exponents, coefficients };
      const problem = shellProblem(contraction);
      if (problem)
        throw this.refusal(`${where}, row ${row}`, `${symbol}: ${problem.message}`, problem.remedy);
      return withoutZeros(contraction);
    });
  }

  #numbers(value: unknown, where: string): number[] {
    return this.list(value, where).map((text, i) => {
      const number = typeof text === 'string' && NUMBER.test(text) ? Number(text) : Number.NaN;
      if (Number.isFinite(number)) return number;
      throw this.#unexpected(text, `${where}[${i}]`, 'a number written as text, such as "0.15E+01"');
    });
  }

  #settleHarmonics(functionType: string, where: string): void {
    const harmonics: Harmonics = functionType === 'gto_cartesian' ? 'cartesian' : 'spherical';
    this.#harmonics ??= harmonics;
    if (this.#harmonics === harmonics) return;
    throw this.refusal(
      `${where}.function_type`,
      'spherical and Cartesian shells stand side by side.',
      'Make every shell of d and above "gto_spherical", or every one "gto_cartesian".',
    );
  }

  #unexpected(value: unknown, where: string, wanted: string): EngineError<'basis.file'> {
    const found = value === undefined ? 'nothing' : JSON.stringify(value).slice(0, 60);
    return this.refusal(where, `${found} stands where ${wanted} is needed.`, REMEDY);
  }
}
