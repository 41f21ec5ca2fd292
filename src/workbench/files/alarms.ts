import type { WriteSheet } from 'hucre';
import { ALARM } from '../../host/port';
import { writeColour } from './styles';

type Rule = NonNullable<WriteSheet['conditionalRules']>[number];

/** Alarms as a file stores them: conditional formats, of whose fills only the background colour is drawn. */
export function alarmRules(cells: readonly string[]): Rule[] {
  return cells.map((range, i) => ({
    type: 'expression',
    priority: i + 1,
    range,
    formula: alarmFormula(range),
    style: {
      font: { bold: true, color: writeColour('#9c3b12') },
      fill: { type: 'pattern', pattern: 'solid', bgColor: writeColour('#fbe9df') },
    },
  }));
}

/** True for a conditional format that is one of our alarms. */
export function isAlarm({ type, formula, range }: Pick<Rule, 'type' | 'formula' | 'range'>): boolean {
  const [first] = Array.isArray(formula) ? formula : [formula];
  return type === 'expression' && first === alarmFormula(range);
}

/** Asked of the first cell of a range; a file means the others by it too. */
function alarmFormula(range: string): string {
  const [cell] = range.split(':');
  return `LEFT(${cell},${ALARM.length})="${ALARM}"`;
}
