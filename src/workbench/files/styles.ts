import { resolveThemeColor, type BorderSide, type BorderStyle, type CellStyle, type Color } from 'hucre';
import type { BookBorder, BookLine, BookStyle, BookUnseen } from './book';

/** The usual font and its size in points; they are not stored with a cell. */
export const USUAL_FONT = { name: 'Calibri', size: 11 };
/** The number files have in place of an angle for letters below each other. */
const UPRIGHT = 255;
const SIDES = ['top', 'right', 'bottom', 'left'] as const;
const LINES: Readonly<Record<string, BookLine['style']>> = {
  thin: 'thin',
  hair: 'thin',
  medium: 'medium',
  thick: 'thick',
  double: 'thick',
  dotted: 'dotted',
};
/** The palette of older files from number 8 on; source: ECMA-376 part 1, 18.8.27. */
const PALETTE = (
  '000000 ffffff ff0000 00ff00 0000ff ffff00 ff00ff 00ffff 800000 008000 000080 808000 800080 008080 c0c0c0 808080 9999ff ' +
  '993366 ffffcc ccffff 660066 ff8080 0066cc ccccff 000080 ff00ff ffff00 00ffff 800080 800000 008080 0000ff 00ccff ccffff ' +
  'ccffcc ffff99 99ccff ff99cc cc99ff ffcc99 3366ff 33cccc 99cc00 ffcc00 ff9900 ff6600 666699 969696 003366 339966 003300 ' +
  '333300 993300 993366 333399 333333'
).split(' ');

/**
 * @param theme the colours of the file's theme, by number
 * @param usual the font of cells that say nothing of it
 * @returns null for the usual look
 */
export function readStyle(style: CellStyle | undefined, theme: readonly string[], usual = USUAL_FONT): BookStyle | null {
  if (style === undefined) return null;
  const { font, fill, alignment, border } = style;
  const solid = fill?.type === 'pattern' && fill.pattern === 'solid' ? readColour(fill.fgColor, theme) : undefined;
  const horizontal = alignment?.horizontal;
  const vertical = alignment?.vertical;
  const read = given({
    bold: font?.bold === true ? true : undefined,
    italic: font?.italic === true ? true : undefined,
    underline: font?.underline !== undefined && font.underline !== false ? true : undefined,
    strikethrough: font?.strikethrough === true ? true : undefined,
    colour: unless('#000000', readColour(font?.color, theme)),
    fill: solid,
    size: unless(usual.size, font?.size),
    align: horizontal === 'left' || horizontal === 'center' || horizontal === 'right' ? horizontal : undefined,
    vertical: vertical === 'center' ? ('middle' as const) : vertical === 'top' ? vertical : undefined,
    wrap: alignment?.wrapText === true ? true : undefined,
    border: readBorder(border, theme),
    rotation: unless(0, unless(UPRIGHT, alignment?.textRotation)),
    unseen: readUnseen(style, usual.name),
  });
  return Object.keys(read).length === 0 ? null : read;
}

function readUnseen({ font, alignment }: CellStyle, usualName: string): BookUnseen | undefined {
  const horizontal = alignment?.horizontal;
  const unseen = given({
    font: unless(usualName, font?.name),
    underline: typeof font?.underline === 'string' && font.underline !== 'single' ? font.underline : undefined,
    script: font?.vertAlign,
    indent: unless(0, alignment?.indent),
    shrink: alignment?.shrinkToFit === true ? (true as const) : undefined,
    horizontal:
      horizontal === undefined || horizontal === 'general' || horizontal === 'left' || horizontal === 'center' || horizontal === 'right'
        ? undefined
        : horizontal,
    upright: alignment?.textRotation === UPRIGHT ? (true as const) : undefined,
  });
  return Object.keys(unseen).length === 0 ? undefined : unseen;
}

/** @returns null for the usual look */
export function writeStyle(style: BookStyle | null, format: string | null): CellStyle | null {
  if (style === null && format === null) return null;
  const { bold, italic, underline, strikethrough, colour, fill, size, align, vertical, wrap, border, rotation, unseen } = style ?? {};
  const font = given({
    bold,
    italic,
    underline: underline === true ? (unseen?.underline ?? true) : undefined,
    strikethrough,
    size,
    name: unseen?.font,
    vertAlign: unseen?.script,
    color: colour === undefined ? undefined : writeColour(colour),
  });
  const alignment = given({
    horizontal: align ?? unseen?.horizontal,
    vertical: vertical === 'middle' ? ('center' as const) : vertical,
    wrapText: wrap,
    indent: unseen?.indent,
    shrinkToFit: unseen?.shrink,
    textRotation: rotation ?? (unseen?.upright === true ? UPRIGHT : undefined),
  });
  return given({
    font: Object.keys(font).length > 0 ? font : undefined,
    alignment: Object.keys(alignment).length > 0 ? alignment : undefined,
    fill: fill === undefined ? undefined : ({ type: 'pattern', pattern: 'solid', fgColor: writeColour(fill) } as const),
    border: border === undefined ? undefined : writeBorder(border),
    numFmt: format ?? undefined,
  });
}

/** Colours of files as `#rrggbb`: plain ones (`FFAABBCC`, `AABBCC`), those of the theme, those of the palette. */
export function readColour(color: Color | undefined, theme: readonly string[]): string | undefined {
  if (color === undefined) return undefined;
  if (color.rgb !== undefined) return /^[0-9a-f]{6,8}$/iu.test(color.rgb) ? `#${color.rgb.slice(-6).toLowerCase()}` : undefined;
  if (color.theme !== undefined && theme[color.theme] !== undefined) {
    return `#${resolveThemeColor([...theme], color.theme, color.tint).toLowerCase()}`;
  }
  const plain = color.indexed === undefined ? undefined : PALETTE[color.indexed < 8 ? color.indexed : color.indexed - 8];
  return plain === undefined ? undefined : `#${plain}`;
}

/** A colour as files hold it. */
export function writeColour(colour: string): Color {
  return { rgb: `FF${colour.slice(1).toUpperCase()}` };
}

function readBorder(border: BorderStyle | undefined, theme: readonly string[]): BookBorder | undefined {
  const lines = SIDES.flatMap((side) => {
    const line = border?.[side];
    return line === undefined ? [] : [[side, { style: LINES[line.style] ?? 'dashed', colour: readColour(line.color, theme) ?? '#000000' }]];
  });
  return lines.length === 0 ? undefined : (Object.fromEntries(lines) as BookBorder);
}

function writeBorder(border: BookBorder): BorderStyle {
  const sides = SIDES.flatMap((side): [string, BorderSide][] => {
    const line = border[side];
    return line === undefined ? [] : [[side, { style: line.style, color: writeColour(line.colour) }]];
  });
  return Object.fromEntries(sides);
}

/** What is really given: no entries that are undefined. */
export function given<T extends object>(entries: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(entries).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>;
  };
}

function unless<T>(usual: T, value: T | undefined): T | undefined {
  return value === usual ? undefined : value;
}
