import { isCell } from './cells';
import type { EngineCell, EngineFunction } from './engine';

/**
 * `A1#`, the cells that the formula in A1 fills, on whatever sheet A1 is: the engine's own version
 * takes the zone of that cell, but on the sheet of the formula that asks.
 *
 * @param codes the error codes the engine knows
 */
export function spilledRange(codes: ReadonlySet<string>): EngineFunction {
  return {
    description: 'The cells that a formula fills.',
    args: [{ name: 'cell', description: 'The cell with the formula.', type: ['ANY', 'RANGE'], acceptMatrix: true, acceptErrors: true }],
    hidden: true,
    compute(argument) {
      const cell: EngineCell | undefined = argument === undefined || isCell(argument) ? argument : argument[0][0];
      const position = cell?.position;
      if (cell === undefined || position === undefined) return { value: '#REF', message: 'A cell is expected before #.' };
      if (typeof cell.value === 'string' && codes.has(cell.value)) return cell;
      const zone = this.getters.getSpreadZone(position);
      if (zone === undefined) return { value: '#REF', message: 'The cell before # holds no formula that fills further cells.' };
      const origin = this.__originCellPosition;
      if (origin !== undefined) {
        this.updateDependencies?.(origin);
        this.addDependencies?.(origin, [this.getters.getRangeFromZone(position.sheetId, zone)]);
      }
      return Array.from({ length: zone.right - zone.left + 1 }, (_, i) =>
        Array.from({ length: zone.bottom - zone.top + 1 }, (__, j) =>
          this.getFormulaResult({ sheetId: position.sheetId, col: zone.left + i, row: zone.top + j }),
        ),
      );
    },
  };
}
