import { buildProgram } from './built-program';

/** One build serves every file; and no test finds what another, or yesterday's, has computed. */
export function setup(): void {
  process.env.FARWELL_CACHE = 'off';
  buildProgram();
}
