import type { CellStyle, ConditionalRule } from 'hucre';
import { isEngineAlarm, type EngineCondition } from '../../host/workbench/alarms';
import type { Engine, EngineStyle } from '../../host/workbench/engine';
import type { BookCondition } from './book';
import { isReadable, OPERATORS, toEngineRange, toFileRange } from './rules';
import { toStored } from './spelling';
import { given, readStyle } from './styles';

/** Kinds that files word as a formula. */
const BY_FORMULA: ReadonlySet<string> = new Set([
  'expression',
  'containsText',
  'notContainsText',
  'beginsWith',
  'endsWith',
  'containsBlanks',
  'notContainsBlanks',
]);
/** The ends of a scale of colours by those of the engine. */
const POINTS = { min: 'value', max: 'value', num: 'number', percent: 'percentage', percentile: 'percentile' } as const;
/** A condition that never holds, for formats that the engine only carries along. */
const KEPT_ONLY = { type: 'CellIsRule', operator: 'customFormula', values: ['FALSE'], style: {} };

/** Conditional formats as the engine loads them. What it cannot draw it keeps for the file. */
export function toEngineConditions(conditions: readonly BookCondition[], engine: Engine): EngineCondition[] {
  return conditions.map(({ ranges, rule }, i) => ({
    id: `condition${i + 1}`,
    ranges: ranges.map(toEngineRange),
    rule: drawn(rule, ranges, engine) ?? KEPT_ONLY,
    ...given({ stopIfTrue: rule.stopIfTrue }),
    file: rule,
  }));
}

/** The same from the engine, but for the alarms. */
export function fromEngineConditions(conditions: readonly EngineCondition[] = []): BookCondition[] {
  return conditions.flatMap((condition) => {
    const { ranges: own, rule, file } = condition;
    if (file === undefined || isEngineAlarm(condition)) return [];
    const ranges = own.map(toFileRange);
    const stored = file as BookCondition['rule'];
    const values = 'values' in rule && Array.isArray(rule.values) ? (rule.values as string[]) : [];
    const formulas = stored.formulas.map((formula, i) => (values[i]?.startsWith('=') ? values[i].slice(1) : formula));
    return [{ ranges, rule: { ...stored, formulas } }];
  });
}

/**
 * Conditional formats as a file stores them.
 *
 * @param first the priority of the first one
 */
export function writeConditions(conditions: readonly BookCondition[], first: number): ConditionalRule[] {
  return conditions.map(({ ranges, rule: { formulas, ...rule } }, i) => ({
    ...rule,
    range: ranges.join(' '),
    priority: first + i,
    ...(formulas.length === 0 ? {} : { formula: formulas.map((formula) => toStored(`=${formula}`)) }),
  }));
}

/** What the engine draws; null where it can draw nothing like it. */
function drawn(rule: BookCondition['rule'], ranges: readonly string[], engine: Engine): object | null {
  const style = engineStyle(rule.style);
  const { formulas, type } = rule;
  if (!formulas.every((formula) => isReadable(formula, ranges, engine))) return null;
  if (BY_FORMULA.has(type)) return formulas.length === 0 ? null : { type: 'CellIsRule', operator: 'customFormula', values: [`=${formulas[0]}`], style };
  if (type === 'cellIs') return { type: 'CellIsRule', operator: OPERATORS[rule.operator ?? 'equal'], values: formulas.map((formula) => `=${formula}`), style };
  if (type === 'duplicateValues' || type === 'uniqueValues') return { type: 'CellIsRule', operator: type, values: [], style };
  if (rule.colorScale !== undefined) return scaleOf(rule.colorScale);
  return rule.dataBar === undefined ? null : { type: 'DataBarRule', color: colourNumber(rule.dataBar.color) };
}

function scaleOf({ cfvo, colors }: NonNullable<ConditionalRule['colorScale']>): object | null {
  const points = cfvo.map(({ type, value }, i) => ({ type: POINTS[type], color: colourNumber(colors[i]), ...given({ value }) }));
  if (points.length === 2) return { type: 'ColorScaleRule', minimum: points[0], maximum: points[1] };
  return points.length === 3 ? { type: 'ColorScaleRule', minimum: points[0], midpoint: points[1], maximum: points[2] } : null;
}

/** `FFAABBCC` as a number, without its first two digits. */
function colourNumber(colour: string): number {
  return Number.parseInt(colour.slice(-6), 16);
}

/** Of the fills of conditional formats only the background colour is drawn. */
function engineStyle(style: CellStyle | undefined): EngineStyle {
  const { fill } = style ?? {};
  const background = fill?.type === 'pattern' ? (fill.bgColor ?? fill.fgColor) : undefined;
  const shown = readStyle({ ...style, ...given({ fill: background && ({ type: 'pattern', pattern: 'solid', fgColor: background } as const) }) }, []);
  const { bold, italic, underline, strikethrough, colour } = shown ?? {};
  return given({ bold, italic, underline, strikethrough, textColor: colour, fillColor: shown?.fill });
}
