const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/** Text as content or attribute of HTML, XML and SVG. */
export const escapeMarkup = (text: string): string =>
  text.replace(/[&<>"]/g, (character) => ENTITIES[character]!);

/** The text that `escapeMarkup` was given. */
export const unescapeMarkup = (markup: string): string =>
  Object.entries(ENTITIES).reduceRight(
    (text, [character, entity]) => text.replaceAll(entity, character),
    markup,
  );

/** A printed number with a true minus sign, which zero has not. */
export const withMinus = (number: string): string =>
  /^-0(\.0*)?$/.test(number) ? number.slice(1) : number.replace(/^-/, '−');
