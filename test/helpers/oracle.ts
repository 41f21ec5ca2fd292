import loadHighs from 'highs';
import type { Spec, SpecRule } from './spec';

/**
 * The same question as an integer programme, written from the words of the contract and solved by
 * HiGHS (MIT), which shares no method with the product.
 */

let solver: ReturnType<typeof loadHighs> | null = null;

/** A linear row: variables with coefficients, and the most they may add up to. */
interface Row {
  readonly terms: readonly string[];
  readonly most: number;
}

/** What a plan must keep: pairs that may be chosen, and the rows that limit them. */
export interface Programme {
  /** Duty and person of each variable `x0`, `x1`, ... */
  readonly free: readonly (readonly [number, number])[];
  readonly rows: readonly Row[];
  /** Fixed seats, as duty and person. */
  readonly fixed: readonly (readonly [number, number])[];
}

function programmeOf(spec: Spec): Programme {
  const fixed = spec.rules.flatMap((rule) => (rule.rule === 'Fixed' ? [[rule.duty, rule.person] as const] : []));
  const isFixed = (d: number, p: number): boolean => fixed.some(([fd, fp]) => fd === d && fp === p);
  const free = spec.pairs.filter(([d, p]) => !isFixed(d, p) && !spec.rules.some((rule) => forbids(spec, rule, d, p)));
  const rows: Row[] = [];
  const limit = (most: number, test: (d: number, p: number) => boolean): void => {
    const taken = fixed.filter(([d, p]) => test(d, p)).length;
    const terms = free.flatMap(([d, p], i) => (test(d, p) ? [`x${i}`] : []));
    rows.push({ terms, most: Math.max(0, most - taken) });
  };
  spec.duties.forEach(({ need }, duty) => limit(need, (d) => d === duty));
  spec.people.forEach(({ maximum }, person) => {
    limit(maximum, (_, p) => p === person);
    for (const slot of new Set(spec.duties.map((duty) => duty.slot))) {
      if (slot !== '') limit(1, (d, p) => p === person && spec.duties[d].slot === slot);
    }
    for (const rule of spec.rules) {
      if (rule.rule !== 'Limit' || (rule.person !== null && rule.person !== person)) continue;
      limit(rule.most, (d, p) => p === person && has(spec, d, rule.label));
    }
  });
  return { free, rows: rows.filter(({ terms }) => terms.length > 0), fixed };
}

function forbids(spec: Spec, rule: SpecRule, d: number, p: number): boolean {
  if (rule.rule === 'Barred') return rule.duty === d && rule.person === p;
  return rule.rule === 'Away' && rule.person === p && has(spec, d, rule.label);
}

function has(spec: Spec, d: number, label: string): boolean {
  return spec.duties[d].slot === label || spec.duties[d].group === label;
}

/** @returns the most seats covered of each priority, most urgent first, those of earlier ones kept */
export async function coverByPriority(spec: Spec): Promise<Map<number, number>> {
  const programme = programmeOf(spec);
  const last = 1_000_001;
  const priorityOf = (d: number): number => spec.duties[d].priority ?? last;
  const priorities = [...new Set(spec.duties.map((_, d) => priorityOf(d)))].sort((a, b) => a - b);
  const kept: string[] = [];
  const covered = new Map<number, number>();
  for (const priority of priorities) {
    const terms = programme.free.flatMap(([d], i) => (priorityOf(d) === priority ? [`x${i}`] : []));
    const value = await maximise(programme, terms, kept);
    if (terms.length > 0) kept.push(`${terms.join(' + ')} >= ${value}`);
    let fixedSeats = 0;
    spec.duties.forEach(({ need }, duty) => {
      const seats = programme.fixed.filter(([d]) => d === duty).length;
      if (priorityOf(duty) === priority) fixedSeats += Math.min(need, seats);
    });
    covered.set(priority, value + fixedSeats);
  }
  return covered;
}

/** @returns the most seats covered in all, fixed ones included */
export async function mostCovered(spec: Spec): Promise<number> {
  const programme = programmeOf(spec);
  const value = await maximise(programme, programme.free.map((_, i) => `x${i}`), []);
  return spec.duties.reduce(
    (sum, { need }, duty) => sum + Math.min(need, programme.fixed.filter(([d]) => d === duty).length),
    value,
  );
}

async function maximise(programme: Programme, terms: readonly string[], kept: readonly string[]): Promise<number> {
  if (terms.length === 0) return 0;
  const highs = await (solver ??= loadHighs());
  const rows = [...programme.rows.map(({ terms: row, most }) => `${row.join(' + ')} <= ${most}`), ...kept];
  const names = programme.free.map((_, i) => `x${i}`).join(' ');
  const text = [
    'Maximize',
    ` obj: ${terms.join(' + ')}`,
    'Subject To',
    ...rows.map((row, i) => ` r${i}: ${row}`),
    'Binary',
    ` ${names}`,
    'End',
  ].join('\n');
  const result = highs.solve(text);
  if (result.Status !== 'Optimal') throw new Error(`HiGHS answers ${result.Status} for\n${text}`);
  return Math.round(result.ObjectiveValue);
}
