import type { CellFunction } from '../../functions/declaration';
import { invoke } from '../../functions/invoke';
import type { Journal } from '../../functions/journal';
import { NAMESPACE } from '../../functions/registry';
import { columnLetters, formatAddress } from '../address';
import { registerBulk } from './bulk';
import { CYCLE, fromSpill, isCell, toRange } from './cells';
import type { Engine, EngineArgument, EngineCell, EngineContext, EngineFunction } from './engine';
import { spilledRange } from './spilledRange';

/** Error codes that sheets at large know and the engine does not. */
const FURTHER_ERRORS = ['#VALUE!', '#REF!', '#CALC!', '#BUSY!'];

/**
 * Registers the functions with the sheet engine as DUTY.ASSIGN and so on. To be called before a model is made.
 *
 * @param recalculate called when answers that were searched for have come
 */
export function registerInEngine(engine: Engine, functions: readonly CellFunction[], journal: Journal, recalculate: () => void): void {
  const { functionRegistry, errorTypes } = engine.registries;
  for (const code of FURTHER_ERRORS) errorTypes.add(code);
  for (const fn of functions) functionRegistry.replace(`${NAMESPACE}.${fn.id}`, describe(fn, journal, errorTypes, recalculate));
  functionRegistry.replace('SPILLED.RANGE', spilledRange(errorTypes));
  registerBulk(engine);
}

function describe(fn: CellFunction, journal: Journal, codes: ReadonlySet<string>, recalculate: () => void): EngineFunction {
  return {
    description: fn.summary,
    args: fn.parameters.map(({ name, description, optional }) => ({
      name,
      description,
      type: ['ANY', 'RANGE'],
      acceptMatrix: true,
      acceptErrors: true,
      ...(optional ? { optional } : {}),
    })),
    compute(...args) {
      // What the engine makes of an exception of its own carries an address of its publisher: none may escape.
      try {
        if (args.some(holdsCycle)) {
          return { value: CYCLE, message: `DUTY.${fn.id} is among its own inputs: point it at ranges that do not hold its cell.` };
        }
        const ranges = fn.parameters.map((_, i) => toRange(args[i], codes));
        const answer = invoke(fn, ranges, addressOf(this), journal);
        if (answer.kind === 'busy') {
          void answer.settled.then((isWorthAsking) => {
            if (isWorthAsking) recalculate();
          });
          return { value: '#BUSY!', message: 'The best plan is being searched for. The pane shows how far it is.' };
        }
        return answer.kind === 'fault' ? { value: '#VALUE!', message: answer.message } : fromSpill(answer.spill);
      } catch (error) {
        return { value: '#VALUE!', message: `DUTY.${fn.id} could not run here: ${String(error)}` };
      }
    },
  };
}

/** True where an argument needs the result of the formula that asks. */
function holdsCycle(argument: EngineArgument): boolean {
  if (argument === undefined) return false;
  const isCycle = ({ value }: EngineCell): boolean => value === CYCLE;
  return isCell(argument) ? isCycle(argument) : argument.some((column) => column.some(isCycle));
}

function addressOf({ getters, __originCellPosition: position }: EngineContext): string {
  if (position === undefined) return '';
  const cell = `${columnLetters(position.col)}${position.row + 1}`;
  return formatAddress({ sheet: getters.getSheetName(position.sheetId), cell });
}
