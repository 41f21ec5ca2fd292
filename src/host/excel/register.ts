import type { CellFunction } from '../../functions/declaration';
import { invoke } from '../../functions/invoke';
import type { Answer, Journal } from '../../functions/journal';
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
function handlerOf(fn: CellFunction, journal: Journal): (...args: unknown[]) => unknown[][] | Promise<unknown[][]> {
  return (...args) => {
    const invocation = args.at(-1) as Partial<CustomFunctions.Invocation> | null | undefined;
    const ranges = fn.parameters.map((_, i) => toRange(args[i]));
    const ask = (): Answer => invoke(fn, ranges, invocation?.address ?? '', journal);
    const answer = ask();
    // What is known at once is handed over at once: only a search makes Excel wait.
    if (answer.kind !== 'busy') return hand(answer);
    // Without an address, calls of several cells cannot be told apart.
    const isWanted = (last: Answer): boolean => (invocation?.address ?? '') === '' || journal.isLast(last);
    return settle(answer, ask, isWanted);
  };
}

/** Asks again whenever the search has got on, until there is an answer or the cell has been given other inputs. */
async function settle(first: Answer, ask: () => Answer, isWanted: (last: Answer) => boolean): Promise<unknown[][]> {
  let answer = first;
  while (answer.kind === 'busy') {
    const isWorthAsking = await answer.settled;
    // The cell is calculated anew with other inputs: nobody looks at this answer.
    // eslint-disable-next-line @typescript-eslint/only-throw-error -- Excel's own error class is no Error
    if (!isWorthAsking || !isWanted(answer)) throw new CustomFunctions.Error(CustomFunctions.ErrorCode.notAvailable, 'Superseded by a newer calculation.');
    answer = ask();
  }
  return hand(answer);
}

function hand(answer: Exclude<Answer, { kind: 'busy' }>): unknown[][] {
  // eslint-disable-next-line @typescript-eslint/only-throw-error -- Excel's own error class is no Error
  if (answer.kind === 'fault') throw new CustomFunctions.Error(CustomFunctions.ErrorCode.invalidValue, answer.message);
  return answer.spill as unknown[][];
}

/** A parameter of matrix form; a single value counts as a range of one cell. */
function toRange(argument: unknown): Range | null {
  if (argument === null || argument === undefined) return null;
  return Array.isArray(argument) ? (argument as Range) : [[argument]];
}
