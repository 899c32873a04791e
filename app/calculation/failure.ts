import { EngineError } from '#engine';
import type { SerializedError } from '../contract/requests';

/** Why a worker gave up, as data and in the user's words. */
export function failureOf(error: unknown): SerializedError {
  if (error instanceof EngineError) {
    const { code, place, message, remedy } = error;
    return { code, place, message, remedy };
  }
  const text = error instanceof Error ? error.message : String(error);
  if (isOutOfMemory(error)) {
    return {
      code: 'calculation.outOfMemory',
      place: '',
      message: `Memory ran out (${text}).`,
      remedy: 'Use fewer workers, a smaller basis set, a frozen core or a smaller CI level.',
    };
  }
  return {
    code: 'internal',
    place: '',
    message: `Something failed inside the program: ${text}`,
    remedy: 'Please report this together with the study.',
  };
}

/** What V8 says where an array, or the memory of a kernel, cannot be had. */
function isOutOfMemory(error: unknown): boolean {
  return (
    error instanceof RangeError &&
    /allocation failed|Invalid (typed )?array (buffer )?length|could not (allocate|grow)/i.test(error.message)
  );
}
