import type { LimitSet } from './limits';

/** A node of a person's tree of limits; the root, with the person's maximum, is not among them. */
export interface LimitNode {
  /** Index of the node this one lies inside, or -1 for the root. */
  readonly parent: number;
  /** The most duties that may pass this node, beside Fixed ones. */
  readonly most: number;
  /** The set that says so. */
  readonly set: LimitSet;
}

/** The limits of one person as a tree. */
export interface Nesting {
  /** Parents before children. */
  readonly nodes: readonly LimitNode[];
  /** For each of the person's duties, in the order given, the innermost node it passes, or -1. */
  readonly innermost: Int32Array;
}

/** Two sets of one person that overlap without one lying inside the other. */
export interface Crossing {
  readonly one: LimitSet;
  readonly other: LimitSet;
}

/**
 * Nests the limits of one person.
 *
 * @param sets the sets that limit this person, with their most (>= 1) and the positions, in the
 *   person's own list of duties, of those in the set
 * @param dutyCount length of that list
 * @returns the tree, or a pair of sets that cross
 *
 * Sets are taken largest first. A set lies inside the node that all of its duties were in so far;
 * where they disagree, two sets cross. A set too large to be reached limits nothing and is left out.
 */
export function nest(
  sets: readonly { readonly set: LimitSet; readonly most: number; readonly members: readonly number[] }[],
  dutyCount: number,
): Nesting | Crossing {
  const innermost = new Int32Array(dutyCount).fill(-1);
  const nodes: { parent: number; most: number; size: number; set: LimitSet }[] = [];
  const binding = sets.filter(({ most, members }) => most < members.length);
  binding.sort((a, b) => b.members.length - a.members.length);
  for (const { set, most, members } of binding) {
    const parent = innermost[members[0]];
    const stray = members.find((i) => innermost[i] !== parent);
    if (stray !== undefined) {
      // Children come after their parents, so the later of the two does not contain the other.
      return { one: set, other: nodes[Math.max(parent, innermost[stray])].set };
    }
    if (parent !== -1 && nodes[parent].size === members.length) {
      if (most < nodes[parent].most) {
        nodes[parent].most = most;
        nodes[parent].set = set;
      }
      continue;
    }
    for (const i of members) innermost[i] = nodes.length;
    nodes.push({ parent, most, size: members.length, set });
  }
  return { nodes, innermost };
}
