import type { DataValidation } from 'hucre';
import type { EngineCheck } from '../../host/workbench/checks';
import type { Engine } from '../../host/workbench/engine';
import type { BookCheck, BookName } from './book';
import { isReadable, KEPT_ONLY, OPERATORS, toEngineRange, toFileRange } from './rules';
import { toStored } from './spelling';
import { given } from './styles';

/** The engine's comparisons of dates; that a date is not one is none of them. */
const DATE_OPERATORS: Readonly<Partial<Record<NonNullable<DataValidation['operator']>, string>>> = {
  between: 'dateIsBetween',
  notBetween: 'dateIsNotBetween',
  equal: 'dateIs',
  greaterThan: 'dateIsAfter',
  greaterThanOrEqual: 'dateIsOnOrAfter',
  lessThan: 'dateIsBefore',
  lessThanOrEqual: 'dateIsOnOrBefore',
};
const RANGE = /^(?:(?:'(?:[^']|'')+'|[\p{L}_][\p{L}\p{N}_.]*)!)?\$?[A-Z]{1,3}\$?\d+(?::\$?[A-Z]{1,3}\$?\d+)?$/iu;
/** How the engine reads a date that is no formula. */
const DATE_FORMAT = 'm/d/yyyy';
/** The kinds whose formulas the engine holds, and brings along when rows are inserted. */
const WITH_FORMULAS: ReadonlySet<unknown> = new Set(['whole', 'decimal', 'time', 'date', 'custom']);

type Criterion = EngineCheck['criterion'];

/** Input checks as the engine loads them. What it cannot check it keeps for the file, and lets anything be typed. */
export function toEngineChecks(checks: readonly BookCheck[], names: readonly BookName[], engine: Engine): EngineCheck[] {
  return checks.map(({ ranges, rule }, i) => ({
    id: `check${i + 1}`,
    ranges: ranges.map(toEngineRange),
    isBlocking: rule.showErrorMessage === true && (rule.errorStyle ?? 'stop') === 'stop',
    criterion: criterionOf(rule, ranges, names, engine) ?? KEPT_ONLY,
    file: rule,
  }));
}

/** The same from the engine. */
export function fromEngineChecks(checks: readonly EngineCheck[] = []): BookCheck[] {
  return checks.flatMap(({ ranges: own, criterion, file }) => {
    if (file === undefined) return [];
    const ranges = own.map(toFileRange);
    const rule = file as BookCheck['rule'];
    if (!WITH_FORMULAS.has(rule.type)) return [{ ranges, rule }];
    const [formula1, formula2] = criterion.values.map((value) => (value.startsWith('=') ? value.slice(1) : undefined));
    return [{ ranges, rule: { ...rule, ...given({ formula1, formula2 }) } }];
  });
}

/** Input checks as a file stores them. */
export function writeChecks(checks: readonly BookCheck[] = []): DataValidation[] {
  const spelled = (formula: string): string => toStored(`=${formula}`);
  return checks.map(({ ranges, rule }) => ({
    ...rule,
    range: ranges.join(' '),
    ...(rule.formula1 === undefined ? {} : { formula1: spelled(rule.formula1) }),
    ...(rule.formula2 === undefined ? {} : { formula2: spelled(rule.formula2) }),
  }));
}

/** What the engine checks; null where it cannot check this. */
function criterionOf(rule: BookCheck['rule'], ranges: readonly string[], names: readonly BookName[], engine: Engine): Criterion | null {
  if (rule.type === 'list') return listOf(rule, names);
  if (rule.type === 'textLength') return null;
  const operator = rule.operator ?? 'between';
  const count = rule.type !== 'custom' && operator.toLowerCase().endsWith('between') ? 2 : 1;
  const operands = [rule.formula1, rule.formula2].slice(0, count).filter((formula) => formula !== undefined);
  if (operands.length < count || !operands.every((formula) => isReadable(formula, ranges, engine))) return null;
  if (rule.type === 'custom') return { type: 'customFormula', values: operands.map((formula) => `=${formula}`) };
  if (rule.type !== 'date') return { type: OPERATORS[operator], values: operands.map((formula) => typed(formula)) };
  const type = DATE_OPERATORS[operator];
  return type === undefined ? null : { type, values: operands.map((formula) => typedDate(formula, engine)), dateValue: 'exactDate' };
}

function listOf({ values, formula1 }: BookCheck['rule'], names: readonly BookName[]): Criterion | null {
  if (values !== undefined) return { type: 'isValueInList', values: values.map((value) => value.trim()), displayStyle: 'arrow' };
  const named = names.find(({ name }) => name.toLowerCase() === formula1?.toLowerCase())?.reference;
  const range = named ?? formula1;
  return range !== undefined && RANGE.test(range) ? { type: 'isValueInRange', values: [range], displayStyle: 'arrow' } : null;
}

function typed(formula: string): string {
  return Number.isFinite(Number(formula)) ? formula : `=${formula}`;
}

function typedDate(formula: string, { helpers, constants }: Engine): string {
  const number = Number(formula);
  return Number.isFinite(number) ? helpers.formatValue(number, { format: DATE_FORMAT, locale: constants.DEFAULT_LOCALE }) : `=${formula}`;
}
