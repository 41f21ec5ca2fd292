import type { Engine } from '../../src/host/workbench/engine';

console.debug = () => undefined;

/** The sheet engine in Node: it needs no page to calculate. */
export const engine = (await import('@odoo/o-spreadsheet')) as unknown as Engine;
