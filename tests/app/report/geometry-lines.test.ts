import { describe, expect, it } from 'vitest';
import { geometryLines } from '../../../app/report/geometry-lines';
import { sampleResults } from '../../support/sample-results';

const results = sampleResults();

describe('geometryLines', () => {
  it('gives one point in spite of the last bits of its coordinate', () => {
    const lines = geometryLines(results, 0.7).split('\n');
    expect(lines[0]).toBe('# H₂, H–H distance 0.7 Å; x y z in angstrom');
    expect(lines[2]).toMatch(/^H +0\.0000000000 +0\.0000000000 +0\.7000000000$/);
  });

  it('gives all points, set apart by empty lines', () => {
    const blocks = geometryLines(results, 'all').trimEnd().split('\n\n');
    expect(blocks).toHaveLength(37);
    for (const block of blocks) expect(block.split('\n')).toHaveLength(3);
  });

  it('leaves out ghosts, which have no nucleus', () => {
    const [first] = results.points;
    const [atom, ghost] = first!.atoms;
    const points = [{ ...first!, atoms: [atom!, { ...ghost!, ghost: true }] }];
    expect(
      geometryLines({ ...results, points }, 'all')
        .trimEnd()
        .split('\n'),
    ).toHaveLength(2);
  });

  it('refuses a place where nothing was computed', () => {
    expect(() => geometryLines(results, 0.75)).toThrowError(
      expect.objectContaining({
        code: 'report.noSuchPoint',
        message: 'No point was computed at 0.75 Å.',
        remedy: 'The nearest are 0.7 Å and 0.8 Å; `--geometry all` gives every one.',
      }),
    );
  });
});
