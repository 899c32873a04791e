import type { Handlers } from '../../app/contract/requests';

/** Handlers for a test of what lies around them: each refuses to be called, except those given. */
export function quietHandlers(given: Partial<Handlers> = {}): Handlers {
  const refuse = (): never => {
    throw new Error('This request is no part of the test.');
  };
  return {
    'program:describe': refuse,
    'samples:list': refuse,
    'samples:open': refuse,
    'basis:list': refuse,
    'basis:show': refuse,
    'study:check': refuse,
    'calculation:start': refuse,
    'report:make': refuse,
    'calculation:cancel': refuse,
    ...given,
  };
}
