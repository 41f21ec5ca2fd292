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
  return { free: free.map(([d, p]) => [d, p] as const), rows: rows.filter(({ terms }) => terms.length > 0), fixed };
}

function forbids(spec: Spec, rule: SpecRule, d: number, p: number): boolean {
  if (rule.rule === 'Barred') return rule.duty === d && rule.person === p;
  return rule.rule === 'Away' && rule.person === p && has(spec, d, rule.label);
}

function has(spec: Spec, d: number, label: string): boolean {
  return spec.duties[d].slot === label || spec.duties[d].group === label;
}

/** What the best plan comes to, aim by aim. */
export interface AimValues {
  /** Covered seats of each priority, most urgent first. */
  readonly cover: readonly (readonly [number, number])[];
  readonly missed: number;
  readonly kept: number;
  readonly ranks: number;
  readonly squares: number;
}

const LAST = 1_000_001;

/** The values of the best plan, each optimised with all earlier ones kept. */
export async function bestValues(spec: Spec): Promise<AimValues> {
  const programme = programmeOf(spec);
  const kept: string[] = [];
  const cover = await bestCover(spec, programme, kept);
  const aims: Record<string, () => Promise<number>> = {
    missed: () => leastMissed(spec, programme, kept),
    changes: () => mostKept(spec, programme, kept),
    ranks: () => leastRanks(spec, programme, kept),
    evenness: () => leastSquares(spec, programme, kept),
  };
  const values: Record<string, number> = {};
  for (const aim of ['missed', ...spec.order]) values[aim] = await aims[aim]();
  return { cover, missed: values.missed, kept: values.changes, ranks: values.ranks, squares: values.evenness };
}

/** Covered seats by priority, most urgent first; what is reached is added to the rows kept. */
async function bestCover(spec: Spec, programme: Programme, kept: string[]): Promise<(readonly [number, number])[]> {
  const cover: (readonly [number, number])[] = [];
  const priorityOf = (d: number): number => spec.duties[d].priority ?? LAST;
  for (const priority of [...new Set(spec.duties.map((_, d) => priorityOf(d)))].sort((a, b) => a - b)) {
    const terms = variables(programme, (d) => priorityOf(d) === priority);
    const value = await maximise(programme, terms, kept);
    if (terms.length > 0) kept.push(`${terms.join(' + ')} >= ${value}`);
    cover.push([priority, value + fixedCover(spec, programme, (d) => priorityOf(d) === priority)]);
  }
  return cover;
}

/** The cover by priority where a pair must hold; null where it cannot. */
export async function coverHolding(spec: Spec, duty: number, person: number): Promise<readonly (readonly [number, number])[] | null> {
  const programme = programmeOf(spec);
  const [variable] = variables(programme, (d, p) => d === duty && p === person);
  if (variable === undefined) return null;
  if (programme.rows.some(({ terms, most }) => most === 0 && terms.includes(variable))) return null;
  return bestCover(spec, programme, [`${variable} >= 1`]);
}

/** The most seats that can be covered with the changes allowed, and the least price of such changes. */
export async function cheapestRemedy(
  spec: Spec,
  place: number | null,
  eligibility: number | null,
): Promise<{ covered: number; price: number }> {
  const isListed = (d: number, p: number): boolean => spec.pairs.some(([pd, pp]) => pd === d && pp === p);
  const all = spec.duties.flatMap((_, d) => spec.people.map((__, p) => [d, p, null] as const));
  const wide: Spec = {
    ...spec,
    people: spec.people.map((entry) => ({ ...entry, maximum: entry.maximum + (place === null ? 0 : 1) })),
    pairs: eligibility === null ? spec.pairs : all,
  };
  const programme = programmeOf(wide);
  const seats = variables(programme, () => true);
  const most = await maximise(programme, seats, []);
  const kept = seats.length === 0 ? [] : [`${seats.join(' + ')} >= ${most}`];
  const costs: string[] = [];
  const bounds: string[] = [];
  spec.people.forEach(({ maximum }, person) => {
    const terms = variables(programme, (_, p) => p === person);
    const fixed = programme.fixed.filter(([, p]) => p === person).length;
    if (terms.length === 0) return;
    kept.push(`${terms.join(' + ')} - e${person} <= ${Math.max(0, maximum - fixed)}`);
    bounds.push(` 0 <= e${person} <= 1`);
    costs.push(`${place ?? 0} e${person}`);
  });
  for (const name of variables(programme, (d, p) => !isListed(d, p))) costs.push(`${eligibility ?? 0} ${name}`);
  const price = costs.length === 0 ? 0 : await optimise('Minimize', programme, costs.join(' + '), kept, bounds);
  return { covered: most + fixedCover(spec, programme, () => true), price };
}

/** The least shortfall of minimums where cover does not matter. */
export async function leastMissedAtAll(spec: Spec): Promise<number> {
  return leastMissed(spec, programmeOf(spec), []);
}

/** @returns the most seats covered in all, fixed ones included */
export async function mostCovered(spec: Spec): Promise<number> {
  const programme = programmeOf(spec);
  return (await maximise(programme, variables(programme, () => true), [])) + fixedCover(spec, programme, () => true);
}

function variables({ free }: Programme, test: (d: number, p: number) => boolean): string[] {
  return free.flatMap(([d, p], i) => (test(d, p) ? [`x${i}`] : []));
}

function fixedCover({ duties }: Spec, { fixed }: Programme, test: (d: number) => boolean): number {
  return duties.reduce((sum, { need }, duty) => {
    const seats = fixed.filter(([d]) => d === duty).length;
    return sum + (test(duty) ? Math.min(need, seats) : 0);
  }, 0);
}

/** Minimums are met by helper variables m: one for each seat a person is short. */
async function leastMissed(spec: Spec, programme: Programme, kept: string[]): Promise<number> {
  const names: string[] = [];
  const rows: string[] = [];
  const bounds: string[] = [];
  spec.people.forEach(({ minimum }, person) => {
    const wanted = minimum - programme.fixed.filter(([, p]) => p === person).length;
    if (wanted <= 0) return;
    const terms = variables(programme, (_, p) => p === person);
    names.push(`m${person}`);
    rows.push(`${[...terms, `m${person}`].join(' + ')} >= ${wanted}`);
    bounds.push(` 0 <= m${person} <= ${wanted}`);
  });
  if (names.length === 0) return 0;
  const value = await optimise('Minimize', programme, names.join(' + '), [...kept, ...rows], bounds);
  kept.push(...rows, `${names.join(' + ')} <= ${value}`);
  extraBounds.set(programme, bounds);
  return value;
}

/** Bounds of helper variables that later aims must carry along. */
const extraBounds = new WeakMap<Programme, string[]>();

async function mostKept(spec: Spec, programme: Programme, kept: string[]): Promise<number> {
  const current = spec.current ?? [];
  const isCurrent = (d: number, p: number): boolean => current.some(([cd, cp]) => cd === d && cp === p);
  const terms = variables(programme, isCurrent);
  const value = terms.length === 0 ? 0 : await optimise('Maximize', programme, terms.join(' + '), kept, extraBounds.get(programme) ?? []);
  if (terms.length > 0) kept.push(`${terms.join(' + ')} >= ${value}`);
  return value + programme.fixed.filter(([d, p]) => isCurrent(d, p)).length;
}

/** A blank rank counts as the worst given one and one more; without any rank the aim is nothing. */
async function leastRanks(spec: Spec, programme: Programme, kept: string[]): Promise<number> {
  const given = spec.pairs.flatMap(([, , rank]) => (rank === null ? [] : [rank]));
  if (given.length === 0) return 0;
  const blank = Math.max(...given) + 1;
  const rankOf = (d: number, p: number): number => {
    const pair = spec.pairs.find(([pd, pp]) => pd === d && pp === p);
    return pair === undefined ? 0 : (pair[2] ?? blank);
  };
  const terms = programme.free.flatMap(([d, p], i) => (rankOf(d, p) > 0 ? [`${rankOf(d, p)} x${i}`] : []));
  const value = terms.length === 0 ? 0 : await optimise('Minimize', programme, terms.join(' + '), kept, extraBounds.get(programme) ?? []);
  if (terms.length > 0) kept.push(`${terms.join(' + ')} <= ${value}`);
  return value + programme.fixed.reduce((sum, [d, p]) => sum + rankOf(d, p), 0);
}

/** Squares by one helper variable a seat, each dearer than the one before. */
async function leastSquares(spec: Spec, programme: Programme, kept: string[]): Promise<number> {
  const costs: string[] = [];
  const rows: string[] = [];
  const bounds: string[] = [];
  let constant = 0;
  spec.people.forEach(({ carried }, person) => {
    const before = carried + programme.fixed.filter(([, p]) => p === person).length;
    constant += before * before;
    const terms = variables(programme, (_, p) => p === person);
    if (terms.length === 0) return;
    const seats = terms.map((_, n) => `q${person}_${n}`);
    seats.forEach((seat, n) => {
      costs.push(`${2 * (before + n + 1) - 1} ${seat}`);
      bounds.push(` 0 <= ${seat} <= 1`);
    });
    rows.push(`${terms.join(' + ')} ${seats.map((seat) => `- ${seat}`).join(' ')} = 0`);
  });
  if (costs.length === 0) return constant;
  const all = [...(extraBounds.get(programme) ?? []), ...bounds];
  const value = await optimise('Minimize', programme, costs.join(' + '), [...kept, ...rows], all);
  kept.push(...rows, `${costs.join(' + ')} <= ${value}`);
  extraBounds.set(programme, all);
  return constant + value;
}

async function maximise(programme: Programme, terms: readonly string[], kept: readonly string[]): Promise<number> {
  return terms.length === 0 ? 0 : optimise('Maximize', programme, terms.join(' + '), kept, []);
}

async function optimise(
  sense: 'Maximize' | 'Minimize',
  programme: Programme,
  objective: string,
  kept: readonly string[],
  bounds: readonly string[],
): Promise<number> {
  const highs = await (solver ??= loadHighs());
  const rows = [...programme.rows.map(({ terms: row, most }) => `${row.join(' + ')} <= ${most}`), ...kept];
  const text = [
    sense,
    ` obj: ${objective}`,
    'Subject To',
    ...rows.map((row, i) => ` r${i}: ${row}`),
    'Bounds',
    ...bounds,
    'Binary',
    ` ${programme.free.map((_, i) => `x${i}`).join(' ')}`,
    'End',
  ].join('\n');
  const ask = (presolve: 'choose' | 'off') => highs.solve(text, { mip_rel_gap: 0, mip_abs_gap: 0, presolve });
  // Earlier rows hold by the plan that gave them, so there is an answer; presolve has been seen to say otherwise.
  const first = ask('choose');
  const result = first.Status === 'Infeasible' ? ask('off') : first;
  if (result.Status !== 'Optimal') throw new Error(`HiGHS answers ${result.Status} for\n${text}`);
  return Math.round(result.ObjectiveValue);
}
