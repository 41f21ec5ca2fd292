/** Pixels a character takes, about, and beside the text. */
const CHARACTER = 7;
const MARGIN = 12;

/** The width of a column for so many characters. */
export function widthInPixels(characters: number): number {
  return characters * CHARACTER + MARGIN;
}
