const MINUS = '\u2212';
const THIN_SPACE = '\u2009';

/**
 * A number for a column aligned by its decimal point: fixed decimals, a true minus, thin spaces between
 * thousands once there are five digits. Not finite: a dash, never "NaN".
 */
export function formatFixed(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return '–';
  const [whole = '', fraction] = Math.abs(value).toFixed(decimals).split('.');
  const grouped = whole.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE);
  const digits = fraction === undefined ? grouped : `${grouped}.${fraction}`;
  const isZero = !/[1-9]/.test(digits);
  return value < 0 && !isZero ? MINUS + digits : digits;
}

/** As few decimals, up to `most`, as write every one of the numbers as closely as `most` decimals would. */
export function commonDecimals(values: readonly number[], most: number): number {
  const needed = values.map((value) => (value.toFixed(most).split('.')[1] ?? '').replace(/0+$/, '').length);
  return Math.max(0, ...needed);
}

/** A small number by its power of ten: 3.2 × 10⁻⁹. */
export function formatScientific(value: number, digits = 1): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const [mantissa = '', exponent = ''] = value.toExponential(digits).split('e');
  return `${mantissa.replace('-', MINUS)} × 10${superscript(Number(exponent))}`;
}

/** A number as someone would type it, without trailing zeros. */
export const formatPlain = (value: number, significant = 10): string =>
  Number.isFinite(value) ? String(Number(value.toPrecision(significant))).replace('-', MINUS) : '–';

const SUPERSCRIPTS: Readonly<Record<string, string>> = {
  '-': '⁻',
  0: '⁰',
  1: '¹',
  2: '²',
  3: '³',
  4: '⁴',
  5: '⁵',
  6: '⁶',
  7: '⁷',
  8: '⁸',
  9: '⁹',
};

const superscript = (integer: number): string =>
  [...String(integer)].map((character) => SUPERSCRIPTS[character]).join('');

/** Seconds as a person says them: "8 s", "3 min", "2 h 10 min". */
export function formatDuration(seconds: number): string {
  if (seconds < 1) return 'under a second';
  if (seconds < 90) return `${Math.round(seconds)} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 90) return `${minutes} min`;
  return `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}

/** Bytes as a person says them: "640 kB", "1.2 GB" (decimal prefixes). */
export function formatBytes(bytes: number): string {
  const prefixes = ['B', 'kB', 'MB', 'GB', 'TB'];
  const power = Math.min(prefixes.length - 1, Math.max(0, Math.floor(Math.log10(Math.max(1, bytes)) / 3)));
  const scaled = bytes / 1000 ** power;
  return `${scaled >= 100 || power === 0 ? Math.round(scaled) : Number(scaled.toPrecision(2))} ${prefixes[power]}`;
}
