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
