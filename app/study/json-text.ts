import { parse as parseTree, type ValueNode } from '@humanwhocodes/momoa';
import type { StudyIssue } from '../contract/requests';
import { findBrackets, findBrokenText, syntaxIssue } from './json-syntax';
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

/** More issues than this help nobody. */
export const MOST_ISSUES = 50;

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
  const broken = findBrokenText(json);
  const issues = broken ? [broken] : [];
  const value = readValue(root, [], lines, issues);
  if (issues.length > 0) return { ok: false, issues: issues.slice(0, MOST_ISSUES) };
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
