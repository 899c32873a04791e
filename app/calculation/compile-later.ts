import process from 'node:process';
import { setFlagsFromString } from 'node:v8';

/**
 * Makes V8 compile only what is really hot, in all threads of this process. A point runs through so many functions that
 * small studies spend more time compiling them, once in every worker and on the cores that the workers need, than the
 * compiled code saves: H2 with three levels takes a sixth less. In long calculations the delay of some hundredths of a
 * second in each hot function does not count.
 *
 * Only in the version of V8 where this was measured, that of Node 20: later ones have one compiler more in between.
 */
export function compileLater(): void {
  const flag = flagFor(process.versions.v8);
  if (flag) setFlagsFromString(flag);
}

/** @returns the flag; undefined where none is to be set */
export function flagFor(version: string): string | undefined {
  return version.startsWith('11.3.') ? `--interrupt-budget=${BUDGET}` : undefined;
}

/** Bytes of bytecode that a function runs between two looks at how hot it is; V8's own number is 67584. */
const BUDGET = 800_000;
