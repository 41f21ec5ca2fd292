import type { Seat } from './case';

/** Who holds which seat. */
export interface Plan {
  /** Every seat held, sorted like the pairs of the case (name order of duty, then of person). */
  readonly seats: readonly (Seat & { readonly fixed: boolean })[];
  /** Seats held of each duty, by duty number; more than its need only where Fixed rows say so. */
  readonly heldOfDuty: Int32Array;
  /** Seats held by each person, by person number. */
  readonly heldByPerson: Int32Array;
  /** Sum of needs. */
  readonly needed: number;
  /** Sum over duties of the smaller of need and seats held. */
  readonly covered: number;
}
