import { createHash } from 'node:crypto';

/** @returns 64 hexadecimal digits */
export function sha256(content: string | Uint8Array): string {
  return createHash('sha256').update(content).digest('hex');
}
