import type { CellFunction } from '../../functions/declaration';
import { invoke } from '../../functions/invoke';
import type { Journal } from '../../functions/journal';
import { NAMESPACE } from '../../functions/registry';
import type { Range, Spill } from '../../sheet/range';
import { columnLetters, formatAddress } from '../address';
import type { Engine, EngineArgument, EngineCell, EngineContext, EngineFunction } from './engine';

/** Error codes that sheets know and the engine does not. */
const FURTHER_ERRORS = ['#VALUE!', '#REF!', '#CALC!', '#BUSY!'];

/** Registers the functions with the sheet engine as DUTY.ASSIGN and so on. To be called before a model is made. */
export function registerInEngine(engine: Engine, functions: readonly CellFunction[], journal: Journal): void {
  const { functionRegistry, errorTypes } = engine.registries;
  for (const code of FURTHER_ERRORS) errorTypes.add(code);
  for (const fn of functions) functionRegistry.add(`${NAMESPACE}.${fn.id}`, describe(fn, journal));
  functionRegistry.replace('SPILLED.RANGE', SPILLED_RANGE);
}

function describe(fn: CellFunction, journal: Journal): EngineFunction {
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
      // An argument that is itself an error, such as a name that does not exist, is the answer.
      const broken = args.find((argument): argument is EngineCell => isCell(argument) && isError(argument));
      if (broken !== undefined) return broken;
      const answer = invoke(fn, fn.parameters.map((_, i) => toRange(args[i])), addressOf(this), journal);
      if (answer.kind === 'fault') return { value: '#VALUE!', message: answer.message };
      return fromSpill(answer.spill);
    },
  };
}

function addressOf({ getters, __originCellPosition: position }: EngineContext): string {
  if (position === undefined) return '';
  const cell = `${columnLetters(position.col)}${position.row + 1}`;
  return formatAddress({ sheet: getters.getSheetName(position.sheetId), cell });
}

function isCell(argument: EngineArgument): argument is EngineCell {
  return argument !== undefined && !Array.isArray(argument);
}

function isError({ value }: EngineCell): boolean {
  return typeof value === 'string' && value.startsWith('#');
}

/** The engine's matrices run column by column, ours row by row. */
function toRange(argument: EngineArgument): Range | null {
  if (argument === undefined) return null;
  if (isCell(argument)) return [[toCell(argument)]];
  const [first] = argument;
  return Array.from(first, (_, row) => argument.map((column) => toCell(column[row])));
}

function toCell(cell: EngineCell): unknown {
  const { value } = cell;
  // An error has a message of its own; a text that merely looks like one has not.
  if (typeof value === 'string' && value.startsWith('#') && cell.message !== undefined) return { type: 'Error', basicValue: value };
  return value ?? null;
}

function fromSpill(spill: Spill): EngineCell[][] {
  return Array.from(spill[0], (_, column) => spill.map((row) => ({ value: row[column] })));
}

/**
 * `A1#`, the cells that the formula in A1 fills, on whatever sheet A1 is: the engine's own version
 * looks on the sheet of the formula that asks.
 */
const SPILLED_RANGE: EngineFunction = {
  description: 'The cells that a formula fills.',
  args: [{ name: 'cell (any, range<any>)', description: 'The cell with the formula.', type: ['ANY', 'RANGE'] }],
  hidden: true,
  compute(argument) {
    const cell = argument === undefined || isCell(argument) ? argument : argument[0][0];
    const position = cell?.position;
    if (cell === undefined || position === undefined) return { value: '#REF!', message: 'A cell reference is expected before #.' };
    if (isError(cell)) return cell;
    const origin = this.__originCellPosition;
    if (origin !== undefined) this.updateDependencies?.(origin);
    const zone = this.getters.getSpreadZone(position);
    if (zone === undefined) return { value: '#REF!', message: 'The cell before # holds no formula that fills further cells.' };
    if (origin !== undefined) this.addDependencies?.(origin, [this.getters.getRangeFromZone(position.sheetId, zone)]);
    return Array.from({ length: zone.right - zone.left + 1 }, (_, i) =>
      Array.from({ length: zone.bottom - zone.top + 1 }, (__, j) =>
        this.getFormulaResult({ sheetId: position.sheetId, col: zone.left + i, row: zone.top + j }),
      ),
    );
  },
};
