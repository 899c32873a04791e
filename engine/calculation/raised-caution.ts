import type { Caution, CautionNumber } from './result';

/** A caution as this version raises it: with what it means and what to do. */
export type RaisedCaution = Caution & Required<Pick<Caution, 'meaning' | 'remedy'>>;

export const number = (name: string, value: number, unit = ''): CautionNumber => ({ name, value, unit });
