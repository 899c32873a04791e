import type { Study } from '#engine';

/** Keys in the order in which a study reads best; keys of the user's own making keep their order. */
const KEY_ORDER = [
  'format version title notes molecule scan basis levels states frozenCore active orbitals convergence findings',
  'unit atoms charge multiplicity',
  'element at isotope ghost',
  'coordinate from to',
  'name file scaleFactors optimiseScale shells evenTempered harmonics',
  'angularMomentum exponents coefficients smallest ratio',
  'count values',
  'electrons orbitals',
  'rotation isotopologues referenceWeight counterpoise bases',
]
  .join(' ')
  .split(' ');

const LONGEST_LINE = 100;

/** A study as the text of its file: two-space JSON in a fixed order of keys, short lists and objects on one line. */
export function serialiseStudy(study: Study): string {
  return `${layOut(study, '')}\n`;
}

function layOut(value: unknown, indent: string): string {
  const entries = entriesOf(value);
  if (!entries) return JSON.stringify(value);
  const [open, close] = Array.isArray(value) ? '[]' : '{}';
  const inner = `${indent}  `;
  const parts = entries.map(([key, item]) => `${key}${layOut(item, inner)}`);
  const padding = Array.isArray(value) ? '' : ' ';
  const oneLine =
    parts.length > 0 ? `${open}${padding}${parts.join(', ')}${padding}${close}` : `${open}${close}`;
  if (indent !== '' && oneLine.length <= LONGEST_LINE - indent.length && !oneLine.includes('\n'))
    return oneLine;
  return `${open}\n${parts.map((part) => inner + part).join(',\n')}\n${indent}${close}`;
}

/** What is inside a list or object, with the text that goes before each item; undefined for a plain value. */
function entriesOf(value: unknown): (readonly [string, unknown])[] | undefined {
  if (Array.isArray(value)) return value.map((item) => ['', item]);
  if (typeof value !== 'object' || value === null) return undefined;
  const rank = (key: string) => (KEY_ORDER.includes(key) ? KEY_ORDER.indexOf(key) : KEY_ORDER.length);
  return Object.entries(value)
    .filter(([, item]) => item !== undefined)
    .sort(([a], [b]) => rank(a) - rank(b))
    .map(([key, item]) => [`${JSON.stringify(key)}: `, item]);
}
