import { compareKeys, type Names } from './name';

/** The names of one kind as a case numbers them. */
export interface Directory {
  readonly names: Names;
  /** The number in the case of each number in `names`, or -1 for names that are not in the case. */
  readonly inCase: Int32Array;
  /** The number in `names` of each number in the case. */
  readonly fromCase: Int32Array;
  /** Case numbers sorted by key. */
  readonly order: Int32Array;
  /** The place of each case number in `order`. */
  readonly rank: Int32Array;
}

/**
 * Numbers the names of a case: the first `listed` in the order they were met, then the `extra` ones
 * by key.
 */
export function makeDirectory(names: Names, listed: number, extra: readonly number[]): Directory {
  const later = [...extra].sort((a, b) => compareKeys(names.keys[a], names.keys[b]));
  const fromCase = Int32Array.from([...Array.from({ length: listed }, (_, i) => i), ...later]);
  const inCase = new Int32Array(names.count).fill(-1);
  fromCase.forEach((number, i) => (inCase[number] = i));
  const order = names.order().filter((number) => inCase[number] !== -1).map((number) => inCase[number]);
  const rank = new Int32Array(order.length);
  order.forEach((number, i) => (rank[number] = i));
  return { names, inCase, fromCase, order, rank };
}

/** The case number of a name as typed, or -1. */
export function lookUp({ names, inCase }: Directory, text: string): number {
  const number = names.find(text);
  return number === -1 || number >= inCase.length ? -1 : inCase[number];
}
