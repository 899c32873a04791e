import { describe, expect, it } from 'vitest';
import { EMPTY_DRAFT } from '../../../../app/renderer/state/draft';
import { withCoordinate, withSpacing } from '../../../../app/renderer/state/scan-defaults';

const { scan } = EMPTY_DRAFT;

describe('changing what is scanned', () => {
  it('fills in a range and a bond only where nothing was typed', () => {
    expect(withCoordinate(scan, 'bonds', 2)).toMatchObject({
      coordinate: 'bonds',
      bonds: [[0, 1]],
      from: '0.5',
    });
    expect(withCoordinate(scan, 'angle', 3)).toMatchObject({ coordinate: 'angle', to: '180' });
    expect(withCoordinate({ ...scan, from: '0.4x' }, 'bonds', 2)).toMatchObject({ from: '0.4x', to: '' });
    expect(withCoordinate(scan, 'bonds', 1).bonds).toEqual([]);
  });

  it('carries an even range over into a list, and a list into a range', () => {
    const listed = withSpacing({ ...scan, from: '0.4', to: '1', count: '4' }, 'listed');
    expect(listed.values).toBe('0.4, 0.6, 0.8, 1');
    expect(withSpacing({ ...listed, from: '', to: '', count: '' }, 'even')).toMatchObject({
      from: '0.4',
      to: '1',
      count: '4',
    });
  });

  it('keeps what was typed on the other side', () => {
    expect(withSpacing({ ...scan, values: '1 2', from: 'a' }, 'even')).toMatchObject({
      from: 'a',
      values: '1 2',
    });
    expect(withSpacing({ ...scan, values: '1 2', from: '0', to: '1', count: '2' }, 'listed').values).toBe(
      '1 2',
    );
  });
});
