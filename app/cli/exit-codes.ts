/** What the exit status says; scripts rely on the numbers. */
export const EXIT = {
  /** everything done and converged */
  done: 0,
  /** done, but some level at some point did not converge */
  unconverged: 1,
  /** the input was refused */
  refused: 2,
  /** interrupted; what was finished is kept */
  interrupted: 3,
  /** anything else */
  failed: 4,
} as const;

export type ExitCode = (typeof EXIT)[keyof typeof EXIT];
