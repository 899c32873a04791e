import { describe, expect, it } from 'vitest';
import { computePoint, type Stage, UNATTENDED } from '#engine';
import { inStage } from '../../engine/stages';
import { atom, prepare, study } from '../support/studies';

const prepared = prepare(
  study([atom('He'), atom('H', 0, 0, 1.5)], { charge: 1, levels: ['RHF', 'CIS', 'FCI'] }),
);

describe('inStage', () => {
  it('identity: every stage that begins ends, inside the one that it began in, and the levels are told apart', () => {
    const open: Stage[] = [];
    const met = new Set<string>();
    const onStage = (stage: Stage, moment: 'begins' | 'ends') => {
      if (moment === 'ends') return void expect(open.pop()).toBe(stage);
      open.push(stage);
      met.add(open.map((part) => (typeof part === 'string' ? part : part.level)).join(' > '));
    };
    const watched = computePoint(prepared, null, { control: { ...UNATTENDED, onStage } });
    expect(open).toEqual([]);
    expect([...met]).toEqual(
      expect.arrayContaining([
        'integrals',
        'self-consistency',
        'self-consistency > stability',
        'transformation',
        'RHF',
        'CIS',
        'FCI',
        'FCI > CI model space',
      ]),
    );
    expect(watched).toEqual(computePoint(prepared, null));
  });

  it('identity: a stage ends although its work throws', () => {
    const moments: string[] = [];
    const fail = () => {
      throw new Error('no');
    };
    expect(() => inStage({ onStage: (_, moment) => moments.push(moment) }, 'integrals', fail)).toThrow('no');
    expect(moments).toEqual(['begins', 'ends']);
  });
});
