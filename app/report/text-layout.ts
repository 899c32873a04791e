/** Advances of characters in units of the type size, about those of the bundled face, which figures are drawn with. */
const ADVANCES: readonly { readonly characters: RegExp; readonly advance: number }[] = [
  { characters: /[fijlt.,:;'()\s]/, advance: 0.29 },
  { characters: /[r-]/, advance: 0.35 },
  { characters: /[mwMW]/, advance: 0.85 },
  { characters: /[A-Z]/, advance: 0.62 },
];
const OTHER_ADVANCE = 0.54;

/** Width of a line of text, estimated so that figures come out the same on every machine. */
export function textWidth(text: string, size: number): number {
  const advanceOf = (character: string) =>
    ADVANCES.find(({ characters }) => characters.test(character))?.advance ?? OTHER_ADVANCE;
  return size * [...text].reduce((width, character) => width + advanceOf(character), 0);
}

/** Lines that fit the width; a word longer than a line stays whole. */
export function wrapText(text: string, size: number, width: number): string[] {
  const lines: string[] = [];
  for (const word of text.split(/\s+/).filter(Boolean)) {
    const current = lines.at(-1);
    const extended = current === undefined ? word : `${current} ${word}`;
    if (current !== undefined && textWidth(extended, size) <= width) lines[lines.length - 1] = extended;
    else lines.push(word);
  }
  return lines;
}

/** Items set one after the other in rows; gives the place of each and the number of rows. */
export function flowRows(
  widths: readonly number[],
  rowWidth: number,
  gap: number,
): { readonly places: readonly { readonly x: number; readonly row: number }[]; readonly rows: number } {
  let x = 0;
  let row = 0;
  const places = widths.map((width) => {
    if (x > 0 && x + width > rowWidth) {
      x = 0;
      row += 1;
    }
    const place = { x, row };
    x += width + gap;
    return place;
  });
  return { places, rows: widths.length === 0 ? 0 : row + 1 };
}
