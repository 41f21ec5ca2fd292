import type { Engine } from '../../src/host/workbench/engine';

console.debug = () => undefined;

// The engine expects it of browsers, and of Node from 21 on.
const withGroupBy = Object as { groupBy?: (items: Iterable<unknown>, keyOf: (item: unknown) => PropertyKey) => object };
withGroupBy.groupBy ??= (items, keyOf) => {
  const groups: Record<PropertyKey, unknown[]> = {};
  for (const item of items) (groups[keyOf(item)] ??= []).push(item);
  return groups;
};

/** The sheet engine in Node: it needs no page to calculate. */
export const engine = (await import('@odoo/o-spreadsheet')) as unknown as Engine;
