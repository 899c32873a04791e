/** With a full stop, if it does not end in a sign of its own. */
export const ended = (sentence: string): string => (/[.!?]$/.test(sentence) ? sentence : `${sentence}.`);

export const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** `90 %` */
export const percent = (share: number): string => `${Number((100 * share).toFixed(1))} %`;

/** `RHF, CISD and FCI` */
export const enumerated = (items: readonly string[]): string =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
