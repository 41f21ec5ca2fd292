import type { Case } from '../cover/case';
import type { Finding, InputFault } from './fault';

/** What reading the ranges of a case gave. */
export interface Reading {
  /** Null exactly where `faults` is not empty. */
  readonly case: Case | null;
  /** In the order of the tables, then of the rows. */
  readonly faults: readonly InputFault[];
  readonly findings: readonly Finding[];
}
