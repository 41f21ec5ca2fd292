import type { Programme } from './programme';

/**
 * Splits a programme into parts that share no person and no duty, each to be searched by itself: the
 * best of the whole is the best of the parts, in every aim.
 *
 * @returns the columns of each part, ascending; parts in the order of their first columns
 */
export function splitColumns({ duty, person, ties, need, room }: Pick<Programme, 'duty' | 'person' | 'ties' | 'need' | 'room'>): Int32Array[] {
  // One node a duty and one a person; columns and ties join them.
  const parent = Int32Array.from({ length: need.length + room.length }, (_, i) => i);
  const find = (node: number): number => {
    let root = node;
    while (parent[root] !== root) root = parent[root];
    while (parent[node] !== root) [node, parent[node]] = [parent[node], root];
    return root;
  };
  const join = (a: number, b: number): void => {
    parent[Math.max(find(a), find(b))] = Math.min(find(a), find(b));
  };
  duty.forEach((d, column) => join(d, need.length + person[column]));
  for (const [a, b] of ties) join(duty[a], duty[b]);
  const parts = new Map<number, number[]>();
  duty.forEach((d, column) => {
    const root = find(d);
    const part = parts.get(root);
    if (part === undefined) parts.set(root, [column]);
    else part.push(column);
  });
  return [...parts.values()].map((columns) => Int32Array.from(columns));
}
