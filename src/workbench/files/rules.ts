import type { ValidationOperator } from 'hucre';
import type { Engine } from '../../host/workbench/engine';

/** Comparisons of files by those of the engine. */
export const OPERATORS: Readonly<Record<ValidationOperator, string>> = {
  between: 'isBetween',
  notBetween: 'isNotBetween',
  equal: 'isEqual',
  notEqual: 'isNotEqual',
  greaterThan: 'isGreaterThan',
  greaterThanOrEqual: 'isGreaterOrEqualTo',
  lessThan: 'isLessThan',
  lessThanOrEqual: 'isLessOrEqualTo',
};

/** A check that lets everything be typed, for rules that the engine only carries along. */
export const KEPT_ONLY = { type: 'customFormula', values: ['TRUE'] } as const;

const QUOTED = /"(?:[^"]|"")*"/gu;
const FUNCTION = /(?<![\w.'])([A-Z_][A-Z0-9_.]*)(?=\()/giu;

/**
 * Whether the engine can calculate the formula of a rule. One for several ranges it would count from
 * the corner of each, a file from that of the first.
 */
export function isReadable(formula: string, ranges: readonly string[], { CompiledFormula, registries }: Engine): boolean {
  if (Number.isFinite(Number(formula))) return true;
  if (ranges.length !== 1 || CompiledFormula.IsBadExpression(`=${formula}`)) return false;
  const names = formula.replace(QUOTED, '').matchAll(FUNCTION);
  return [...names].every(([, name]) => registries.functionRegistry.contains(name.toUpperCase()));
}

/** The last row and column of a sheet in a file. */
const LAST_ROW = 1_048_576;
const LAST_COLUMN = 'XFD';
const RANGE = /^([A-Z]*)(\d*):([A-Z]*)(\d*)$/iu;

/** A range that reaches the end of a file's sheet as one without an end: the engine looks at every cell of a range. */
export function toEngineRange(range: string): string {
  const [, left, top, right, bottom] = RANGE.exec(range) ?? [];
  if (left === undefined) return range;
  const isToTheEnd = Number(bottom) >= LAST_ROW;
  if (right.toUpperCase() === LAST_COLUMN && !isToTheEnd) return left.toUpperCase() === 'A' ? `${top}:${bottom}` : `${left}${top}:${bottom}`;
  return isToTheEnd ? `${left}${top}:${right}` : range;
}

/** The same the other way round. */
export function toFileRange(range: string): string {
  const [, left, top, right, bottom] = RANGE.exec(range) ?? [];
  if (left === undefined) return range;
  return `${left || 'A'}${top || '1'}:${right || LAST_COLUMN}${bottom || LAST_ROW}`;
}
