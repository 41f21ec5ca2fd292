import type { CellFunction } from '../../functions/declaration';
import { invoke } from '../../functions/invoke';
import type { Journal } from '../../functions/journal';
import type { Range } from '../../sheet/range';

/**
 * Registers the functions with Excel under their ids. On a page without Office's script nothing
 * happens.
 */
export function registerInExcel(functions: readonly CellFunction[], journal: Journal): void {
  if (typeof CustomFunctions === 'undefined') return;
  for (const fn of functions) CustomFunctions.associate(fn.id, handlerOf(fn, journal));
}

/** What Excel calls: one argument a parameter, null where it was left out, and the invocation last. */
function handlerOf(fn: CellFunction, journal: Journal): (...args: unknown[]) => unknown[][] {
  return (...args) => {
    const invocation = args.at(-1) as Partial<CustomFunctions.Invocation> | null | undefined;
    const ranges = fn.parameters.map((_, i) => toRange(args[i]));
    const answer = invoke(fn, ranges, invocation?.address ?? '', journal);
    // eslint-disable-next-line @typescript-eslint/only-throw-error -- Excel's own error class is no Error
    if (answer.kind === 'fault') throw new CustomFunctions.Error(CustomFunctions.ErrorCode.invalidValue, answer.message);
    return answer.spill as unknown[][];
  };
}

/** A parameter of matrix form; a single value counts as a range of one cell. */
function toRange(argument: unknown): Range | null {
  if (argument === null || argument === undefined) return null;
  return Array.isArray(argument) ? (argument as Range) : [[argument]];
}
