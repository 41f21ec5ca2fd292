import type { FeatureRows } from './features';
import type { DutiesTable } from './readDuties';
import type { Rule } from './readRules';

/** The tables in which a feature can be used. */
interface FeatureTables {
  readonly dutiesTable: DutiesTable;
  readonly rules: readonly Rule[];
}

/** The first row that uses each feature, whether or not the case then keeps what it says. */
export function featureRows({ dutiesTable, rules }: FeatureTables): FeatureRows {
  const duties = dutiesTable.kind === 'table' ? dutiesTable.entries : [];
  return {
    times: duties.find(({ times }) => times.length > 0)?.row,
    load: duties.find(({ load }) => load !== 1)?.row,
    clash: rules.find(({ word }) => word === 'Clash')?.row,
    together: rules.find(({ word }) => word === 'Together')?.row,
    rest: rules.find((rule) => rule.word === 'Rest' && rule.minutes > 0)?.row,
  };
}
