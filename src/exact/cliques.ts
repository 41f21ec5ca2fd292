import type { Formulation } from './programme';

/**
 * Conflicts among the columns of one person as few and as strong rows as can easily be had: sets of
 * columns any two of which conflict. A row for a whole set cuts off what rows for its pairs let
 * through (each of three duties held by half), so the bound of the relaxed programme is better.
 *
 * @param sets sets of columns of which at most one is held
 * @returns sets that say the same: any two columns of a given set share one of them, and none lies inside another
 */
export function cliqueRows(sets: readonly (readonly number[])[], formulation: Formulation = 'cliques'): number[][] {
  const next = new Map<number, Set<number>>();
  for (const set of sets) {
    for (const column of set) {
      const own = next.get(column) ?? new Set<number>();
      next.set(column, own);
      for (const other of set) if (other !== column) own.add(other);
    }
  }
  if (formulation === 'pairs') return [...next].flatMap(([a, own]) => [...own].filter((b) => b > a).map((b) => [a, b]));
  const rows: number[][] = [];
  const covered = new Map<number, Set<number>>([...next.keys()].map((column) => [column, new Set<number>()]));
  const isCovered = (set: readonly number[]): boolean =>
    set.every((a) => set.every((b) => a === b || covered.get(a)!.has(b)));
  for (const set of [...sets].sort((a, b) => b.length - a.length || a[0] - b[0])) {
    if (set.length < 2 || isCovered(set)) continue;
    const row = grow(set, next);
    rows.push(row);
    for (const a of row) for (const b of row) if (a !== b) covered.get(a)!.add(b);
  }
  return rows;
}

/** Takes in further columns, lowest first, as long as they conflict with all that are in. */
function grow(set: readonly number[], next: ReadonlyMap<number, ReadonlySet<number>>): number[] {
  const row = [...set];
  const [first, ...others] = set;
  const conflictsWithAll = (column: number): boolean => others.every((other) => next.get(other)!.has(column));
  const candidates = [...next.get(first)!].filter((column) => !row.includes(column) && conflictsWithAll(column));
  for (const column of candidates.sort((a, b) => a - b)) {
    if (row.every((other) => next.get(other)!.has(column))) row.push(column);
  }
  return row.sort((a, b) => a - b);
}
