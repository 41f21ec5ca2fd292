import { DEFAULT_ORDER, type Case } from '../cover/case';
import type { TableName } from './fault';

/** Something a case uses beyond covering: where it stands, as far as that is one place. */
export interface UsedFeature {
  readonly feature: string;
  readonly table: TableName;
}

/** What the case really uses of the features that only later stages answer. */
export function usedFeatures(kase: Case): readonly UsedFeature[] {
  const used: UsedFeature[] = [];
  const add = (uses: boolean, feature: string, table: TableName): void => {
    if (uses) used.push({ feature, table });
  };
  add(kase.ranked, 'the Rank column', 'Pairs');
  add(kase.people.some(({ minimum }) => minimum > 0), 'the Minimum column', 'People');
  add(kase.people.some(({ carried }) => carried > 0), 'the Carried column', 'People');
  add(kase.duties.some(({ times }) => times.length > 0), 'Start and End', 'Duties');
  add(kase.duties.some(({ load }) => load !== 1), 'a Load other than 1', 'Duties');
  add(kase.clashes.length > 0, 'the rule Clash', 'Rules');
  add(kase.together.length > 0, 'the rule Together', 'Rules');
  add(kase.rest > 0, 'the rule Rest', 'Rules');
  add(kase.order.join() !== DEFAULT_ORDER.join(), 'the rule Order', 'Rules');
  add(kase.current !== null, 'a current plan', 'Current');
  return used;
}
