import { availableParallelism } from 'node:os';
import process from 'node:process';

/** Threads that compute at the same time unless a command says otherwise: `FARWELL_WORKERS`, else one for every core. */
export function usualWorkers(environment: Readonly<NodeJS.ProcessEnv> = process.env): number {
  const { FARWELL_WORKERS: chosen = '' } = environment;
  return /^[1-9]\d{0,3}$/.test(chosen) ? Number(chosen) : availableParallelism();
}
