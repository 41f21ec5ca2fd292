import { isCell } from '../../host/workbench/cells';
import type { Engine, EngineModel } from '../../host/workbench/engine';
import type { Book } from './book';
import { toEngineData, type Room } from './toEngine';

/** Of what an answer needs, this much more is kept free, for it may grow. */
const GROWTH = 1.5;

/** A model of the book whose sheets are large enough for what their formulas fill. */
export function makeModel(book: Book, engine: Engine): EngineModel {
  const model = new engine.Model(toEngineData(book, engine));
  const room = missingRoom(book, model);
  return room.size === 0 ? model : new engine.Model(toEngineData(book, engine, room));
}

/** What the formulas that found no room would fill, by sheet. */
function missingRoom(book: Book, { getters }: EngineModel): Map<string, Room> {
  const needed = new Map<string, Room>();
  for (const { name, cells } of book.sheets) {
    const sheetId = getters.getSheetIdByName(name);
    for (const { row, column, formula } of cells) {
      if (formula === null || sheetId === undefined) continue;
      const position = { sheetId, col: column, row };
      if (getters.getEvaluatedCell(position).value !== '#SPILL!') continue;
      const result = getters.evaluateFormulaResult(sheetId, formula, position);
      if (isCell(result)) continue;
      const before = needed.get(name) ?? { rows: 0, columns: 0 };
      needed.set(name, {
        rows: Math.max(before.rows, row + Math.ceil(result[0].length * GROWTH)),
        columns: Math.max(before.columns, column + Math.ceil(result.length * GROWTH)),
      });
    }
  }
  return needed;
}
