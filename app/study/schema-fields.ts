import { z } from 'zod';

/*
 * Pieces to build schemas from, whose issues are worded here: every leaf carries one sentence end that says what the
 * value must be ("must be a whole number from 2 to 10 000"), which `explainIssues` completes with place and value.
 */

// the window's content-security policy forbids code made from text
z.config({ jitless: true });

/** What a refused value carries for `explainIssues` beyond its sentence. */
export interface IssueParams {
  readonly code: 'study.unknownKey' | 'level.unknown';
  /** the words that would have been right */
  readonly known: readonly string[];
}

/** A value that must be what `expectation` says. */
export function leaf<T>(expectation: string, isRight: (value: unknown) => boolean) {
  return z.custom<T>(isRight, { error: `must be ${expectation}` });
}

export const isFiniteNumber = (value: unknown): value is number =>
  typeof value === 'number' && Number.isFinite(value);
const withSpaces = (value: number) => String(value).replace(/\B(?=(\d{3})+$)/g, ' ');

export const number = leaf<number>('a number', isFiniteNumber);
export const integer = leaf<number>('a whole number', (value) => Number.isSafeInteger(value));
export const countingNumber = leaf<number>(
  'a whole number above 0',
  (value) => Number.isSafeInteger(value) && (value as number) > 0,
);
export const yesOrNo = leaf<boolean>('true or false', (value) => typeof value === 'boolean');

export function wholeNumber(smallest: number, largest: number) {
  return leaf<number>(
    `a whole number from ${withSpaces(smallest)} to ${withSpaces(largest)}`,
    (value) => Number.isInteger(value) && (value as number) >= smallest && (value as number) <= largest,
  );
}

export function text(longest: number) {
  return leaf<string>(
    `a text of at most ${withSpaces(longest)} characters`,
    (value) => typeof value === 'string' && value.length <= longest,
  );
}

export const name = leaf<string>(
  'a name of 1 to 200 characters',
  (value) => typeof value === 'string' && value.trim() !== '' && value.length <= 200,
);

/** A list that is not empty. */
export function list<T>(item: z.ZodType<T>, what: string, most: number) {
  const expectation = `must be a list of 1 to ${withSpaces(most)} ${what}`;
  return z.array(item, { error: expectation }).min(1, expectation).max(most, expectation);
}

/** An object with these keys and no others: every further key is an issue of its own that knows the right ones. */
export function closed<S extends z.ZodRawShape>(shape: S, known: readonly string[] = Object.keys(shape)) {
  const params: IssueParams = { code: 'study.unknownKey', known };
  const unknownKey = z.custom<never>(() => false, { params: { ...params } });
  // a catch-all that nothing passes adds no keys to the type
  return z.object(shape, { error: 'must be an object { … }' }).catchall(unknownKey) as unknown as ReturnType<
    typeof z.strictObject<S>
  >;
}

/** Picks the schema by what the value looks like, so that its issues speak of the form that was meant. */
export function oneOf<T>(choose: (value: unknown) => z.ZodType<T>): z.ZodType<T> {
  return z.unknown().transform((value, context): T => {
    const result = choose(value).safeParse(value);
    if (result.success) return result.data;
    for (const issue of result.error.issues) context.issues.push({ ...issue, input: value } as never);
    return z.NEVER;
  });
}

export const hasKey = (value: unknown, ...keys: readonly string[]) =>
  typeof value === 'object' && value !== null && keys.some((key) => Object.hasOwn(value, key));
