import { EngineError } from '#engine';
import type { Handlers, Reply, SerializedError } from '../contract/requests';
import { isRequestName, PAYLOADS } from './payloads';
import { Refusal, WINDOW_OUT_OF_STEP } from './refusal';

/** Where an unforeseen error is written in full; the window only learns that there was one. */
export type Log = (text: string) => void;

const toStandardError: Log = (text) => void process.stderr.write(`${text}\n`);

/**
 * Answers one request, whatever host it came through. Never rejects: refusals and failures are part of the reply.
 *
 * @param name - as received; a name outside the contract is refused
 * @param payload - as received; what does not have the request's form is refused
 */
export async function answer(
  handlers: Handlers,
  name: unknown,
  payload: unknown,
  log: Log = toStandardError,
): Promise<Reply<unknown>> {
  try {
    return { ok: true, value: await handle(handlers, name, payload) };
  } catch (error) {
    return { ok: false, error: serializeError(error, log) };
  }
}

async function handle(handlers: Handlers, name: unknown, payload: unknown): Promise<unknown> {
  if (!isRequestName(name)) {
    throw new Refusal({
      code: 'request.unknown',
      place: '',
      message: `There is no request named “${typeof name === 'string' ? name.slice(0, 80) : typeof name}”.`,
      remedy: WINDOW_OUT_OF_STEP,
    });
  }
  const parsed = PAYLOADS[name].safeParse(payload);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    throw new Refusal({
      code: 'request.malformed',
      place: issue?.path.join('.') ?? '',
      message: `The request “${name}” does not have the form it should have: ${issue?.message ?? 'unreadable'}.`,
      remedy: WINDOW_OUT_OF_STEP,
    });
  }
  // the table of payloads is checked against the contract, so the parsed value is what this handler takes
  return (handlers[name] as (request: unknown) => unknown)(parsed.data);
}

/** An error as the window may see it: refusals in full, anything else without its inside. */
export function serializeError(error: unknown, log: Log = toStandardError): SerializedError {
  if (error instanceof EngineError || error instanceof Refusal) {
    const { code, place, message, remedy } = error;
    return { code, place, message, remedy };
  }
  log(error instanceof Error ? (error.stack ?? error.message) : String(error));
  return {
    code: 'internal',
    place: '',
    message: 'Something failed inside the program.',
    remedy: 'Try again. If it happens again, report it together with the study and what the terminal shows.',
  };
}
