const ALPHABET = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';

/** The bytes of padded base64; the engine knows no host that would decode it. */
export function decodeBase64(text: string): Uint8Array {
  const padding = text.endsWith('==') ? 2 : text.endsWith('=') ? 1 : 0;
  const bytes = new Uint8Array((text.length / 4) * 3 - padding);
  const value = new Uint8Array(128);
  for (let i = 0; i < ALPHABET.length; i++) value[ALPHABET.charCodeAt(i)] = i;
  for (let from = 0, to = 0; from < text.length; from += 4, to += 3) {
    let bits = 0;
    for (let k = 0; k < 4; k++) bits = (bits << 6) | value[text.charCodeAt(from + k)];
    bytes[to] = bits >> 16;
    bytes[to + 1] = bits >> 8;
    bytes[to + 2] = bits;
  }
  return bytes;
}
