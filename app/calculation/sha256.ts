import { createHash } from 'node:crypto';

/** @returns 64 hexadecimal digits */
export function sha256(text: string): string {
  return createHash('sha256').update(text).digest('hex');
}
