import type { Case } from '../cover/case';
import type { Finding, InputFault } from './fault';
import type { FeatureRows } from './features';

/** What reading the ranges of a case gave. */
export interface Reading {
  /** Null exactly where `faults` is not empty. */
  readonly case: Case | null;
  /** In the order of the tables, then of the rows. */
  readonly faults: readonly InputFault[];
  readonly findings: readonly Finding[];
  /** Where each feature is first used, for `usedFeatures`. */
  readonly featureRows: FeatureRows;
}
