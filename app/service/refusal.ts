import type { SerializedError } from '../contract/requests';

/** A request that the service itself refuses; the engine's own refusals are EngineErrors. */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  readonly code: string;
  readonly place: string;
  readonly remedy: string;

  constructor({ code, place, message, remedy }: SerializedError) {
    super(message);
    this.code = code;
    this.place = place;
    this.remedy = remedy;
  }
}

/** For a message that our own window could not have sent. */
export const WINDOW_OUT_OF_STEP =
  'Close the window and start the program again, so that both are of the same version.';
