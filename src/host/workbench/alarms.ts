import { formatZone, parseZone } from '../address';
import { ALARM } from '../port';
import type { EngineModel } from './engine';

/** A conditional format as the engine keeps it. */
export interface EngineCondition {
  readonly id: string;
  readonly ranges: readonly string[];
  readonly rule: object;
  readonly stopIfTrue?: boolean;
  /** The same as a file words it: the engine keeps it, and does not look at it. */
  readonly file?: object;
}

const RULE = {
  type: 'CellIsRule',
  operator: 'beginsWithText',
  values: [ALARM],
  style: { fillColor: '#fbe9df', textColor: '#9c3b12', bold: true },
};

/** Makes a cell, or a rectangle of them, an alarm. */
export function addAlarm(model: EngineModel, sheetId: string, cells: string): void {
  const range = model.getters.getRangeDataFromZone(sheetId, parseZone(cells)!);
  model.dispatch('ADD_CONDITIONAL_FORMAT', { sheetId, ranges: [range], cf: { id: crypto.randomUUID(), rule: RULE } });
}

/** The same for a sheet that is loaded. */
export function loadedAlarms(cells: readonly string[]): EngineCondition[] {
  return cells.map((cell, i) => ({ id: `alarm${i + 1}`, ranges: [cell], rule: RULE }));
}

/** The cells of a sheet that are alarms, such as `B9`. */
export function alarmCells(formats: readonly EngineCondition[] = []): string[] {
  return formats.filter(isEngineAlarm).flatMap(({ ranges }) => ranges.map(plain));
}

/** True for a conditional format that is one of our alarms. */
export function isEngineAlarm({ rule }: EngineCondition): boolean {
  return 'values' in rule && Array.isArray(rule.values) && rule.values[0] === ALARM;
}

function plain(range: string): string {
  const zone = parseZone(range.slice(range.lastIndexOf('!') + 1).replaceAll('$', ''));
  return zone === null ? range : formatZone(zone);
}
