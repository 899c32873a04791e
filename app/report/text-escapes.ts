const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/** Text as content or attribute of HTML, XML and SVG. */
export const escapeMarkup = (text: string): string =>
  text.replace(/[&<>"]/g, (character) => ENTITIES[character]!);

/** A printed number with a true minus sign. */
export const withMinus = (number: string): string => number.replace(/^-/, '−');
