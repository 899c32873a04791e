import { describe, expect, it } from 'vitest';
import { computePoint, findLevelMinimum, type LevelFindings, studyCautions } from '#engine';
import { atom, prepare, study } from '../../support/studies';

const bond = (values: readonly number[]) => ({ scan: { coordinate: { bonds: [[0, 1]] }, values } }) as const;
const ATOM = { atoms: [0], charge: 0, multiplicity: 2, energy: -0.5, level: 'ROHF' };
const H2 = [atom('H'), atom('H', 0, 0, 1.4)];

function codesOf(...[atoms, changes]: Parameters<typeof study>) {
  const prepared = prepare(study(atoms, changes));
  const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
  const findings = Object.fromEntries(
    prepared.study.levels.map((level) => [level, findLevelMinimum(prepared, level, points)]),
  );
  return studyCautions(prepared, points, [], findings)
    .filter(({ code }) => /^(limit|range|sizeConsistency|minimum|depth|safety)/.test(code))
    .map(({ code, level }) => (level ? `${code} ${level}` : code));
}

describe('studyCautions of whole curves', () => {
  it('identity: RHF of H2 tends to a wrong limit, full CI does not', () => {
    const levels = ['RHF', 'FCI'];
    expect(codesOf(H2, { levels, ...bond([1, 1.2, 1.4, 1.6, 2, 4, 12]) })).toEqual([
      'limit.wrong RHF',
      'range.shortForLevels RHF',
      'range.shortForLevels FCI',
      'depth.fragments',
      'safety.measuredData',
    ]);
  });

  it('identity: a curve that ends while it still binds is too short', () => {
    expect(codesOf(H2, { levels: ['FCI'], ...bond([1, 1.2, 1.4, 1.6, 2, 2.5]) })).toEqual([
      'range.short FCI',
      'range.shortForLevels FCI',
      'depth.fragments',
      'safety.measuredData',
    ]);
  });

  it('identity: a curve without its minimum has it at the edge', () => {
    expect(codesOf(H2, { levels: ['FCI'], ...bond([2, 3, 4]) })).toEqual(['minimum.atEdge FCI']);
  });

  const found = (farEndAbove: number, depth = 0.2): LevelFindings => ({
    minimum: { kind: 'found', equilibriumDistance: 1.4, energy: -1.2, uncertainty: 0 },
    dissociation: { kind: 'found', energy: -1, fragments: [ATOM, ATOM], farEndAbove },
    wellDepth: { value: depth, against: 'fragments', farEnd: 6, valueAgainstFarEnd: depth + farEndAbove },
  });
  const cautionsOn = (findings: Readonly<Record<string, LevelFindings>>) => {
    const prepared = prepare(study(H2, { levels: Object.keys(findings), ...bond([1, 6]) }));
    return studyCautions(prepared, [], [], findings).filter(({ code }) => !code.startsWith('basis'));
  };

  it('identity: a far end above its fragments is an error of size of CISD, a wrong limit of RHF, a short range of others', () => {
    const cautions = cautionsOn({
      RHF: found(0.1),
      UHF: found(0.1),
      CISD: found(0.1),
      FCI: found(0.1),
      MP2: found(0.003),
    });
    expect(cautions.map(({ code, level }) => (level ? `${code} ${level}` : code))).toEqual([
      'limit.wrong RHF',
      'range.short UHF',
      'sizeConsistency.large CISD',
      'range.short FCI',
      'depth.fragments',
      'safety.measuredData',
    ]);
    const [wrong] = cautions;
    expect(wrong?.numbers?.map(({ value }) => value)).toEqual([0.1, 0.5, 0.02]);
  });

  it('identity: a superposition error that is known is given with the caution about depths', () => {
    const superposition = { energyInWholeBasis: -0.501, error: 0.001 };
    const counterpoise = {
      kind: 'found',
      fragments: [superposition, superposition],
      error: 0.002,
      wellDepth: 0.198,
    } as const;
    const [depth] = cautionsOn({ FCI: { ...found(0), counterpoise } });
    expect(depth).toMatchObject({ code: 'depth.fragments', numbers: [{ value: 0.002, unit: 'hartree' }] });
  });

  it('identity: a minimum where the curve is not smooth is said with how far it may be off', () => {
    const minimum = {
      kind: 'found',
      equilibriumDistance: 1.4,
      energy: -1.2,
      uncertainty: 0.01,
      onKink: true,
    } as const;
    const [kink] = cautionsOn({ MP2: { ...found(0), minimum } });
    expect(kink).toMatchObject({ code: 'curve.kink', level: 'MP2', numbers: [{ value: 0.01 }] });
  });
});
