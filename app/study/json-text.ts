import { parse as parseTree, type ValueNode } from '@humanwhocodes/momoa';
import type { StudyIssue } from '../contract/requests';
import { type Path, placeOf } from './place';

export type JsonReading =
  | {
      readonly ok: true;
      readonly value: unknown;
      /** line on which the value at a path, or else the nearest thing around it, begins; counted from 1 */
      readonly lineOf: (path: Path) => number;
    }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

/** Longest text read, in characters: a study with 10 000 listed values and a basis set takes a quarter of it. */
export const LONGEST_TEXT = 1_000_000;

/** Deepest nesting read; a study needs eight. Keeps the recursion of the parser bounded. */
const DEEPEST_NESTING = 64;

/** Keys that would reach into the objects of the program itself. */
const FORBIDDEN_KEYS: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype']);

/**
 * Reads strict JSON so that nothing is lost silently: a key given twice, a number beyond the range of a double or
 * a key such as `__proto__` is an issue, and every value keeps its line. All issues of a well-formed text are
 * collected; of an ill-formed one only the first can be known.
 */
export function readJson(text: string): JsonReading {
  if (text.length > LONGEST_TEXT) {
    return refuse(
      'json.tooLarge',
      `The text is ${(text.length / 1e6).toPrecision(3)} million characters long; at most ${LONGEST_TEXT / 1e6} million are read.`,
      'A study is a small file: check that this is the right one.',
    );
  }
  // editors on Windows may put a byte-order mark in front
  const json = text.startsWith('\uFEFF') ? text.slice(1) : text;
  const brackets = findBrackets(json);
  if (brackets.deepest > DEEPEST_NESTING) {
    return refuse(
      'json.tooDeep',
      `Brackets are nested ${brackets.deepest} deep.`,
      'A study needs no more than eight levels: check that this is the right file.',
    );
  }
  let root: ValueNode;
  try {
    root = parseTree(json, { mode: 'json' }).body;
  } catch {
    return { ok: false, issues: [syntaxIssue(json, brackets.unclosed)] };
  }
  const lines = new Map<string, number>();
  const issues = findBrokenTexts(json);
  const value = readValue(root, [], lines, issues);
  if (issues.length > 0) return { ok: false, issues };
  const lineOf = (path: Path): number =>
    lines.get(placeOf(path)) ?? (path.length > 0 ? lineOf(path.slice(0, -1)) : 1);
  return { ok: true, value, lineOf };
}

function refuse(code: string, message: string, remedy: string): JsonReading {
  return { ok: false, issues: [{ code, place: '', message, remedy }] };
}

function readValue(node: ValueNode, path: Path, lines: Map<string, number>, issues: StudyIssue[]): unknown {
  const { line } = node.loc.start;
  const place = placeOf(path);
  if (!lines.has(place)) lines.set(place, line);
  switch (node.type) {
    case 'Array':
      return node.elements.map((element, index) => readValue(element.value, [...path, index], lines, issues));
    case 'Object': {
      const object: Record<string, unknown> = {};
      for (const { name, value } of node.members) {
        const key = name.type === 'String' ? name.value : name.name;
        const keyPath = [...path, key];
        const keyLine = name.loc.start.line;
        if (FORBIDDEN_KEYS.has(key)) {
          issues.push({
            code: 'json.forbiddenKey',
            place: placeOf(keyPath),
            message: `The key “${key}” is not allowed (line ${keyLine}).`,
            remedy: 'Remove it.',
          });
        } else if (Object.hasOwn(object, key)) {
          issues.push({
            code: 'json.duplicateKey',
            place: placeOf(keyPath),
            message: `${placeOf(keyPath)} is given twice (lines ${lines.get(placeOf(keyPath))} and ${keyLine}).`,
            remedy: 'Keep one of them.',
          });
        } else {
          lines.set(placeOf(keyPath), keyLine);
          object[key] = readValue(value, keyPath, lines, issues);
        }
      }
      return object;
    }
    case 'Number':
      if (!Number.isFinite(node.value)) {
        issues.push({
          code: 'json.number',
          place,
          message: `${place || 'The number'} is too large (line ${line}).`,
          remedy: 'Give a number below 1.8e308.',
        });
      }
      return node.value;
    case 'Null':
      return null;
    case 'String':
    case 'Boolean':
      return node.value;
    default:
      // NaN and Infinity, which strict JSON does not have
      throw new TypeError(`not JSON: ${node.type}`);
  }
}

/** A text in double quotes, running to the end if unclosed, or one bracket. */
const TEXT_OR_BRACKET = /"(?:[^"\\]|\\[\s\S])*(?:"|$)|[[\]{}]/g;

/** Texts with a bare line break or tab inside, which JSON does not allow but the tree parser lets pass. */
function findBrokenTexts(json: string): StudyIssue[] {
  return [...json.matchAll(TEXT_OR_BRACKET)]
    .filter(([text]) => [...text].some((character) => character < ' '))
    .map(({ index }) => {
      const { line, column } = position(json, index);
      return {
        code: 'json.syntax',
        place: `line ${line}`,
        message: `Line ${line}, column ${column}: a text has a line break or tab inside.`,
        remedy: 'Close the text on its line, or write a line break inside it as \\n.',
      };
    });
}

interface OpenBracket {
  readonly bracket: string;
  readonly offset: number;
}

function findBrackets(json: string): { readonly deepest: number; readonly unclosed: readonly OpenBracket[] } {
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

function syntaxIssue(json: string, unclosed: readonly OpenBracket[]): StudyIssue {
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
