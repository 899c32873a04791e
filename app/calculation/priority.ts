import { constants, setPriority } from 'node:os';

/**
 * Makes computing give way to whatever the user is doing. Called by a worker thread for itself: on Linux a priority
 * belongs to a thread, so that the host and its window keep theirs. macOS and Windows know priorities of whole
 * processes only; there the host has little to do, and its window runs in another process.
 */
export function giveWay(): void {
  const self = 0;
  try {
    setPriority(self, constants.priority.PRIORITY_BELOW_NORMAL);
  } catch {
    // a sandbox may forbid it: then it computes as everybody else
  }
}
