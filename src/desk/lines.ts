/**
 * A text as rows of one cell each, none longer than so many letters unless a word is: sheets that are
 * printed or sent show no more of a cell than its column is wide.
 */
export function inLines(text: string, length: number): string[][] {
  const lines = [''];
  for (const word of text.split(' ')) {
    const longer = `${lines.at(-1)} ${word}`.trim();
    if (longer.length <= length) lines[lines.length - 1] = longer;
    else lines.push(word);
  }
  return lines.map((line) => [line]);
}
