/** Characters of a cell quoted in a message before the rest is cut off. */
const QUOTED = 40;

/** Text that shows nothing: white space, zero-width characters and direction marks. */
const NOTHING = /^[\s\u00AD\u200B-\u200F\u202A-\u202E\u2060-\u2064\u2066-\u206F]*$/u;

/**
 * A cell as a plain value. A host may hand over a number together with its format, or a value of
 * another data type, as an object: what counts is the basic value inside. Error cells stay objects.
 */
export function plainCell(cell: unknown): unknown {
  if (typeof cell !== 'object' || cell === null || !('basicValue' in cell)) return cell;
  const { type, basicType, basicValue } = cell as Record<string, unknown>;
  if (type === 'Error' || basicType === 'Error') return cell;
  return ['string', 'number', 'boolean'].includes(typeof basicValue) ? basicValue : cell;
}

/** The code of an error cell, such as #N/A; null for any other cell. Hosts hand errors over as objects. */
export function errorCode(cell: unknown): string | null {
  if (typeof cell !== 'object' || cell === null) return null;
  for (const field of ['basicValue', 'code', 'errorCode', 'message']) {
    const value = (cell as Record<string, unknown>)[field];
    if (typeof value === 'string' && value.startsWith('#')) return value;
  }
  return '#ERROR!';
}

/** True for an empty cell, and for text that shows nothing. */
export function isBlank(cell: unknown): boolean {
  if (typeof cell === 'string') {
    // Nearly every cell begins with a printable ASCII character.
    const first = cell.charCodeAt(0);
    return !(first > 0x20 && first < 0x7f) && NOTHING.test(cell);
  }
  return cell === null || cell === undefined;
}

/** True for a cell that says nothing in a name or label: blank, or the 0 older desktops hand over for blank. */
export function isBlankName(cell: unknown): boolean {
  return cell === 0 || isBlank(cell);
}

/** The text of a cell that is no error: a number by its shortest form, a truth value as TRUE or FALSE. */
export function cellText(cell: unknown): string {
  if (typeof cell === 'string') return cell;
  if (typeof cell === 'boolean') return cell ? 'TRUE' : 'FALSE';
  return isBlank(cell) ? '' : String(cell);
}

/** A cell as a message quotes it. */
export function quoteCell(cell: unknown): string {
  const code = errorCode(cell);
  if (code !== null) return `the error ${code}`;
  if (isBlank(cell)) return 'a blank cell';
  if (typeof cell !== 'string') return cellText(cell);
  return quote(cell);
}

/** A text in quotation marks, cut where it is long. */
export function quote(text: string): string {
  const flat = text.replace(/\s+/gu, ' ').trim();
  const characters = Array.from(flat);
  return characters.length <= QUOTED ? `"${flat}"` : `"${characters.slice(0, QUOTED).join('')}…"`;
}
