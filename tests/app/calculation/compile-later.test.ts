import { execFileSync } from 'node:child_process';
import process from 'node:process';
import { describe, expect, it } from 'vitest';
import { flagFor } from '../../../app/calculation/compile-later';

describe('flagFor', () => {
  it('gives a flag that this Node takes, where its V8 is the one it was measured with', () => {
    const flag = flagFor(process.versions.v8);
    const run = () =>
      execFileSync(process.execPath, [...(flag ? [flag] : []), '-p', '1'], { encoding: 'utf8' });
    expect(run()).toBe('1\n');
    expect(flagFor('11.3.244.8-node.30')).toMatch(/^--interrupt-budget=\d+$/);
  });

  it('leaves other versions alone', () => {
    expect(flagFor('12.4.254.21-node.33')).toBeUndefined();
    expect(flagFor('1.3.0')).toBeUndefined();
  });
});
