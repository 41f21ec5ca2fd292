import type { Case } from '../cover/case';
import type { NotNested } from '../cover/reduce';
import type { UsedFeature } from '../sheet/features';

/** A case that is well written but needs something this version does not answer yet. */
export class Refusal extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'Refusal';
  }
}

/** @returns a refusal that names the first such feature and how to go on without it; null where there is none */
export function refusalOf(features: readonly UsedFeature[]): Refusal | null {
  if (features.length === 0) return null;
  const [{ feature, table, row }] = features;
  const where = row === null ? `${table} table` : `${table} table, row ${row} of the range`;
  return new Refusal(
    `${where}: ${feature} is not taken into account by this version, and an answer that ignored it ` +
      'would be wrong. Clear it to get an answer without it.',
  );
}

/** Says whose limits cross, and which two. */
export function crossingMessage(kase: Case, { person, crossing: { one, other } }: NotNested): string {
  return (
    `The limits on "${one.name}" and "${other.name}" overlap for ${kase.people[person].name} without one ` +
    'lying inside the other; this version answers only limits inside limits (slots inside groups). ' +
    'Put whole slots into one group, or drop one of the two limits.'
  );
}
