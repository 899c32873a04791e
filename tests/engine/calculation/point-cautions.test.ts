import { describe, expect, it } from 'vitest';
import type { Study } from '#engine';
import { atom, compute, study } from '../../support/studies';

function cautionsOf(...request: Parameters<typeof study>) {
  return compute(study(...request)).cautions;
}

const stretched = [atom('H'), atom('H', 0, 0, 5)];
const codes = (cautions: ReturnType<typeof cautionsOf>) =>
  cautions.map(({ code, level }) => (level ? `${code} ${level}` : code));

describe('pointCautions', () => {
  it('identity: stretched H2 has an unstable RHF, a contaminated UHF and a weak reference; H2 at rest has none', () => {
    const levels = ['RHF', 'UHF', 'FCI'];
    expect(codes(cautionsOf(stretched, { levels }))).toEqual([
      'rhf.unstable',
      'uhf.contaminated UHF',
      'reference.weightLow FCI',
    ]);
    expect(cautionsOf([atom('H'), atom('H', 0, 0, 1.4)], { levels })).toEqual([]);
  });

  it('identity: each says what raised it beyond which bound, what it means and what to do', () => {
    for (const { numbers = [], meaning, remedy } of cautionsOf(stretched, {
      levels: ['RHF', 'UHF', 'FCI'],
    })) {
      expect(numbers.length).toBeGreaterThanOrEqual(2);
      expect(numbers.every(({ value }) => Number.isFinite(value))).toBe(true);
      expect(meaning).toMatch(/\.$/);
      expect(remedy).toMatch(/\.$/);
    }
  });

  it('identity: of separate H atoms ⟨S²⟩ of UHF is 1, of RHF the weight in full CI one half', () => {
    const cautions = cautionsOf([atom('H'), atom('H', 0, 0, 30)], { levels: ['UHF', 'FCI'] });
    const valueIn = (code: string) => cautions.find((caution) => caution.code === code)?.numbers?.[0]?.value;
    expect(valueIn('uhf.contaminated')).toBeCloseTo(1, 6);
    expect(valueIn('reference.weightLow')).toBeCloseTo(0.5, 6);
  });

  it('identity: contamination is of no concern where nothing stands on UHF, and of that which does', () => {
    expect(codes(cautionsOf(stretched, { levels: ['RHF'] }))).toEqual(['rhf.unstable']);
    const onUnrestricted = { levels: ['CISD'], orbitals: 'unrestricted' } as const;
    expect(codes(cautionsOf(stretched, onUnrestricted))).toContain('uhf.contaminated CISD');
    // stretched HF⁺ is a doublet whose UHF mixes in a quartet
    const ion: Partial<Study> & { charge: number } = { charge: 1, levels: ['MP2'], basis: 'STO-3G' };
    expect(codes(cautionsOf([atom('F'), atom('H', 0, 0, 6)], ion))).toContain('uhf.contaminated MP2');
  });

  it('identity: functions that hardly differ are left out, with the overlap that was too small', () => {
    const shells = [{ angularMomentum: 0, smallest: 0.5, ratio: 1.002, count: 3 }];
    const [caution] = cautionsOf([atom('He')], { basis: { name: 'mine', evenTempered: { He: shells } } });
    expect(caution).toMatchObject({ code: 'basis.nearlyDependent' });
    const [dropped, smallest, bound] = caution?.numbers?.map(({ value }) => value) ?? [];
    expect(dropped).toBeGreaterThanOrEqual(1);
    expect(smallest).toBeLessThan(bound ?? 0);
  });
});
