import type { Case } from '../cover/case';
import type { TableName } from './fault';

/** What later stages answer, by a short name of its own. */
export type Feature = 'times' | 'load' | 'clash' | 'together' | 'rest';

/** The first row of its range, from 1, in which a feature is used; a case itself knows no rows. */
export type FeatureRows = Readonly<Partial<Record<Feature, number | undefined>>>;

/** Something a case uses that is not answered yet, and where. */
export interface UsedFeature {
  /** As people call it, to go on with in a sentence. */
  readonly feature: string;
  readonly table: TableName;
  /** The first row of the range that uses it; null where that is not known. */
  readonly row: number | null;
}

/**
 * What the case really uses of the features that only later stages answer.
 *
 * @param rows where they are used, as `Reading.featureRows` gives it
 */
export function usedFeatures(kase: Case, rows: FeatureRows = {}): readonly UsedFeature[] {
  const used: UsedFeature[] = [];
  const add = (uses: boolean, id: Feature, feature: string, table: TableName): void => {
    if (uses) used.push({ feature, table, row: rows[id] ?? null });
  };
  add(kase.duties.some(({ times }) => times.length > 0), 'times', 'Start and End', 'Duties');
  add(kase.duties.some(({ load }) => load !== 1), 'load', 'a Load other than 1', 'Duties');
  add(kase.clashes.length > 0, 'clash', 'the rule Clash', 'Rules');
  add(kase.together.length > 0, 'together', 'the rule Together', 'Rules');
  add(kase.rest > 0, 'rest', 'the rule Rest', 'Rules');
  return used;
}
