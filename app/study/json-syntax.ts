import { parse as parseTree } from '@humanwhocodes/momoa';
import type { StudyIssue } from '../contract/requests';

/** A text in double quotes, running to the end if unclosed, or one bracket. */
const TEXT_OR_BRACKET = /"[^"\\]*(?:\\[\s\S][^"\\]*)*(?:"|$)|[[\]{}]/g;

/** The first text with a bare line break or tab inside, which JSON does not allow but the tree parser lets pass. */
export function findBrokenText(json: string): StudyIssue | undefined {
  for (const { 0: text, index } of json.matchAll(TEXT_OR_BRACKET)) {
    if (![...text].some((character) => character < ' ')) continue;
    const { line, column } = position(json, index);
    return {
      code: 'json.syntax',
      place: `line ${line}`,
      message: `Line ${line}, column ${column}: a text has a line break or tab inside.`,
      remedy: 'Close the text on its line, or write a line break inside it as \\n.',
    };
  }
  return undefined;
}

/** A bracket that the text does not close. */
export interface OpenBracket {
  readonly bracket: string;
  readonly offset: number;
}

/** How deep brackets are nested, and which stay open; those inside texts do not count. */
export function findBrackets(json: string): {
  readonly deepest: number;
  readonly unclosed: readonly OpenBracket[];
} {
  const unclosed: OpenBracket[] = [];
  let deepest = 0;
  for (const match of json.matchAll(TEXT_OR_BRACKET)) {
    const bracket = match[0];
    if (bracket === '[' || bracket === '{') unclosed.push({ bracket, offset: match.index });
    else if (bracket === ']' || bracket === '}') unclosed.pop();
    deepest = Math.max(deepest, unclosed.length);
  }
  return { deepest, unclosed };
}

/** What is wrong with an ill-formed text, where, and what to do. */
export function syntaxIssue(json: string, unclosed: readonly OpenBracket[]): StudyIssue {
  const issue = (place: string, message: string, remedy: string) => ({
    code: 'json.syntax',
    place,
    message,
    remedy,
  });
  if (json.trim() === '')
    return issue('', 'The file is empty.', 'Give a study in JSON; the samples show the form.');
  const offset = firstErrorOffset(json);
  const token = /^[\w.+-]+|^[\s\S]/.exec(json.slice(offset))?.[0] ?? '';
  const { line, column } = position(json, offset);
  const place = `line ${line}`;
  const isUnfinished =
    ['true', 'false', 'null'].some((word) => word.startsWith(token)) ||
    /^-?\d*(\.\d*)?(e[+-]?)?$/i.test(token);
  if (offset + (isUnfinished ? token.length : 0) >= json.trimEnd().length) {
    const open = unclosed.at(-1);
    const before = open
      ? `before the ${open.bracket} of line ${position(json, open.offset).line} is closed`
      : 'too early';
    return issue(
      place,
      `The text ends on line ${line}, column ${column}, ${before}.`,
      'The file is cut off: restore its end, or save it again from where it came.',
    );
  }
  const [what, remedy] = explainToken(token, json.slice(0, offset).trimEnd().at(-1));
  return issue(place, `Line ${line}, column ${column}: ${what}`, remedy);
}

/** Where an ill-formed text stops being JSON: at its end if it is only cut off. */
function firstErrorOffset(json: string): number {
  try {
    // the parser gives no sound position for the end of a text, but does for a character that can stand nowhere
    parseTree(`${json}\0`, { mode: 'json' });
  } catch (error) {
    const { offset } = error as { offset?: unknown };
    if (typeof offset === 'number') return Math.min(offset, json.length);
  }
  return json.length;
}

/** What a token that cannot stand where it does most likely came from. */
function explainToken(token: string, previous: string | undefined): readonly [string, string] {
  if (token === '/' || token === '#')
    return ['JSON has no comments.', 'Remove the comment, or put it in "notes".'];
  if ((token === '}' || token === ']') && previous === ',') {
    return [`there is a comma before the closing ${token}.`, 'Remove the comma.'];
  }
  if (/^[+-]?(nan|inf)/i.test(token)) return [`${token} is not a number.`, 'Give a finite number.'];
  if (/^-?0\d/.test(token)) return ['a number begins with 0.', 'Remove the leading 0.'];
  if (/^[.+]\d/.test(token))
    return [`a number begins with “${token[0]}”.`, 'Begin it with a digit or a minus sign.'];
  if (token === "'") return ['a text begins with a single quote.', 'Put texts in double quotes.'];
  if (/^[A-Za-z_]/.test(token))
    return [`“${token}” is not in quotes.`, 'Put keys and texts in double quotes.'];
  const isStart = /^["{[\d-]/.test(token);
  return [
    `${token === '"' ? 'a text' : token} was not expected here.`,
    isStart ? 'A comma or colon before it may be missing.' : 'Check the text just before it.',
  ];
}

function position(json: string, offset: number): { readonly line: number; readonly column: number } {
  const lines = json.slice(0, offset).split(/\r\n|\n|\r/);
  return { line: lines.length, column: lines.at(-1)!.length + 1 };
}
