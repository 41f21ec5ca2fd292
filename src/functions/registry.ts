import { ABSENCES } from './absences';
import { ASSIGN } from './assign';
import { BOTTLENECKS } from './bottlenecks';
import { CHECK } from './check';
import { CHOICES } from './choices';
import type { CellFunction } from './declaration';
import { FINDINGS } from './findings';
import { GRID } from './grid';
import { LOADS } from './loads';
import { PAIRS } from './pairs';
import { PROOF } from './proof';
import { REMEDIES } from './remedies';
import { STEPS } from './steps';
import { SUMMARY } from './summary';
import { UNCOVERED } from './uncovered';

/** Every cell function, in the order people meet them. */
export const FUNCTIONS: readonly CellFunction[] = [
  ASSIGN,
  UNCOVERED,
  BOTTLENECKS,
  LOADS,
  GRID,
  CHOICES,
  ABSENCES,
  REMEDIES,
  STEPS,
  PROOF,
  SUMMARY,
  FINDINGS,
  CHECK,
  PAIRS,
];

/** The namespace before the dot in a formula. */
export const NAMESPACE = 'DUTY';
