import type { CellStyle, Color, ConditionalRule, Sheet } from 'hucre';
import { isAlarm } from './alarms';
import type { BookCheck, BookCondition } from './book';
import { given, readColour, writeColour } from './styles';

/** A formula of a file as typed, without equals sign; the row is that of the first cell it holds for. */
export type Spell = (stored: string, row: number) => string;

/** Kinds of conditional formats of which the file library does not read all. */
const HALF_READ: ReadonlySet<string> = new Set(['top10', 'aboveAverage']);
const COLOUR = /^[0-9a-f]{6,8}$/iu;

/** The input checks of a sheet. */
export function readChecks({ dataValidations = [] }: Sheet, spell: Spell): BookCheck[] {
  return dataValidations.map(({ range, formula1, formula2, ...rule }) => ({
    ranges: rangesOf(range),
    rule: {
      ...rule,
      ...(formula1 === undefined ? {} : { formula1: spell(formula1, firstRow(range)) }),
      ...(formula2 === undefined ? {} : { formula2: spell(formula2, firstRow(range)) }),
    },
  }));
}

/** The conditional formats of a sheet but for the alarms, the weightiest first. */
export function readConditions({ conditionalRules = [] }: Sheet, spell: Spell, theme: readonly string[]): BookCondition[] {
  return conditionalRules
    .filter((rule) => !isAlarm(rule) && isWhole(rule))
    .sort((a, b) => a.priority - b.priority)
    .map(({ range, formula = [], style, type, operator, stopIfTrue, text, colorScale, dataBar, iconSet }) => ({
      ranges: rangesOf(range),
      rule: {
        type,
        ...given({ operator, stopIfTrue, text, colorScale, dataBar, iconSet }),
        ...(style === undefined ? {} : { style: withPlainColours(style, theme) as CellStyle }),
        formulas: [formula].flat().map((one) => spell(one, firstRow(range))),
      },
    }));
}

/** True for a conditional format of which the file library reads all. */
export function isWhole({ type, colorScale, dataBar }: ConditionalRule): boolean {
  const colours = [...(colorScale?.colors ?? []), ...(dataBar === undefined ? [] : [dataBar.color])];
  return !HALF_READ.has(type) && colours.every((colour) => COLOUR.test(colour));
}

/** Colours of the theme are told apart by their number alone, and the saved file has another theme. */
function withPlainColours(part: unknown, theme: readonly string[]): unknown {
  if (typeof part !== 'object' || part === null) return part;
  if ('rgb' in part || 'theme' in part || 'indexed' in part) {
    const colour = readColour(part as Color, theme);
    return colour === undefined ? part : writeColour(colour);
  }
  return Object.fromEntries(Object.entries(part).map(([key, inner]) => [key, withPlainColours(inner, theme)]));
}

function rangesOf(list: string): string[] {
  return list.split(/\s+/u).filter((range) => range !== '');
}

function firstRow(list: string): number {
  return Number(/\d+/u.exec(list)?.[0] ?? 1) - 1;
}
