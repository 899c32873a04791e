import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeBase64 } from '../../../engine/kernels/base64';

describe('decodeBase64', () => {
  it('independent: gives back the bytes that Node encoded, whatever the padding', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 40 }), (bytes) => {
        expect(decodeBase64(Buffer.from(bytes).toString('base64'))).toEqual(bytes);
      }),
      { seed: 1 },
    );
  });
});
