import { ASSIGN } from './assign';
import type { CellFunction } from './declaration';
import { FINDINGS } from './findings';
import { GRID } from './grid';
import { LOADS } from './loads';
import { PAIRS } from './pairs';
import { SUMMARY } from './summary';
import { UNCOVERED } from './uncovered';

/** Every cell function, in the order people meet them. */
export const FUNCTIONS: readonly CellFunction[] = [ASSIGN, UNCOVERED, LOADS, GRID, SUMMARY, FINDINGS, PAIRS];

/** The namespace before the dot in a formula. */
export const NAMESPACE = 'DUTY';
