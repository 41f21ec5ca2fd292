import type { Case } from './case';
import { coverBest, readPlan } from './coverBest';
import { improve } from './improve';
import type { Plan } from './plan';
import { coverFaults } from './proof';
import { reduce, type NotFlow, type Reduction } from './reduce';

/** A best plan with the flow it was read from. */
export interface Solution {
  readonly reduction: Reduction;
  /** Residual capacities over the half arcs of the reduction's network. */
  readonly residual: Int32Array;
  readonly plan: Plan;
  /** Faults found in the proof that no plan is better, in cover or in any later aim; empty: proven. */
  readonly faults: readonly string[];
}

/** @returns the best plan, or why the case is not a flow */
export function solve(kase: Case): Solution | NotFlow {
  const reduction = reduce(kase);
  if ('crossing' in reduction) return reduction;
  const residual = coverBest(reduction);
  const faults = improve(kase, reduction, residual);
  return {
    reduction,
    residual,
    plan: readPlan(kase, reduction, residual),
    faults: [...coverFaults(reduction, residual), ...faults],
  };
}
