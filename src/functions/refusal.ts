import type { Case } from '../cover/case';
import type { LimitSet } from '../cover/limits';
import type { NotFlow } from '../cover/reduce';

/** A case that is well written but cannot be answered here. */
export class Refusal extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'Refusal';
  }
}

/** Says why the case is not a flow. */
export function notFlowMessage(kase: Case, { person, crossing }: NotFlow): string {
  if (crossing === null || person === null) return 'Here loads other than 1, or Together rules, tie seats to each other.';
  return `For ${kase.people[person].name}, ${nameOf(crossing.one)} and ${nameOf(crossing.other)} overlap without one lying inside the other.`;
}

function nameOf({ kind, name }: LimitSet): string {
  return kind === 'conflict' ? name : `the limit on "${name}"`;
}
