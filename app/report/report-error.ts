/** A report that cannot be made from the results given; the fields are those of every refusal. */
export class ReportError extends Error {
  override readonly name = 'ReportError';
  readonly code: string;
  /** the results file concerned */
  readonly place: string;
  readonly remedy: string;

  constructor(code: string, place: string, message: string, remedy: string) {
    super(message);
    this.code = code;
    this.place = place;
    this.remedy = remedy;
  }
}
