import { NAMESPACE } from '../../functions/registry';

/**
 * A formula in a file is not what a person types: functions of add-ins carry a prefix and an
 * underscore for each dot, newer native functions a prefix of their own, and `A1#` is a function.
 */

const STORED_OURS = new RegExp(`_xldudf_${NAMESPACE}_([A-Z][A-Z0-9_]*)(?=\\()`, 'giu');
const TYPED_OURS = new RegExp(`(?<![\\w.])${NAMESPACE}\\.([A-Z][A-Z0-9.]*)(?=\\()`, 'giu');
const STORED_SPILL = /_xlfn\.ANCHORARRAY\(([^()"]+)\)/giu;
const TYPED_SPILL = /(?<![\w.])((?:'(?:[^']|'')+'|[\p{L}_][\p{L}\p{N}_.]*)!)?(\$?[A-Z]{1,3}\$?[1-9]\d*)#/giu;
const STORED_NEW = /_xlfn\.(?:_xlws\.)?([A-Z][A-Z0-9.]*)(?=\()/giu;
const FUNCTION = /(?<![\w.'])([A-Z][A-Z0-9.]*)(?=\()/giu;
/** Texts and quoted sheet names, which are no code. */
const QUOTED = /"(?:[^"]|"")*"|'(?:[^']|'')*'(?=!)/gu;
const TEXT = /"(?:[^"]|"")*"/gu;

/** Functions that can fill more than one cell, stored under a prefix. */
const ARRAY_FUNCTIONS = words(
  'UNIQUE SORTBY SEQUENCE RANDARRAY XLOOKUP VSTACK HSTACK TOCOL TOROW TAKE DROP EXPAND CHOOSECOLS CHOOSEROWS WRAPROWS ' +
    'WRAPCOLS TEXTSPLIT LET LAMBDA MAP REDUCE SCAN BYROW BYCOL MAKEARRAY GROUPBY PIVOTBY TRIMRANGE',
);
/** These carry a second prefix. */
const SHEET_FUNCTIONS = words('SORT FILTER');
/** Further functions that came after the file format and carry the prefix; source: [MS-XLSX] 2.2.3, Functions. */
const NEW_FUNCTIONS = words(
  'ACOT ACOTH AGGREGATE ARABIC ARRAYTOTEXT BASE BETA.DIST BETA.INV BINOM.DIST BINOM.DIST.RANGE BINOM.INV BITAND BITLSHIFT ' +
    'BITOR BITRSHIFT BITXOR CEILING.MATH CEILING.PRECISE CHISQ.DIST CHISQ.DIST.RT CHISQ.INV CHISQ.INV.RT CHISQ.TEST ' +
    'COMBINA CONCAT CONFIDENCE.NORM CONFIDENCE.T COT COTH COVARIANCE.P COVARIANCE.S CSC CSCH DAYS DECIMAL ERF.PRECISE ' +
    'ERFC.PRECISE EXPON.DIST F.DIST F.DIST.RT F.INV F.INV.RT F.TEST FLOOR.MATH FLOOR.PRECISE FORECAST.LINEAR FORMULATEXT ' +
    'GAMMA GAMMA.DIST GAMMA.INV GAMMALN.PRECISE GAUSS HYPGEOM.DIST IFNA IFS ISFORMULA ISOMITTED ISOWEEKNUM LOGNORM.DIST ' +
    'LOGNORM.INV MAXIFS MINIFS MODE.MULT MODE.SNGL MUNIT NEGBINOM.DIST NORM.DIST NORM.INV NORM.S.DIST ' +
    'NORM.S.INV NUMBERVALUE PDURATION PERCENTILE.EXC PERCENTILE.INC PERCENTRANK.EXC PERCENTRANK.INC PERMUTATIONA PHI ' +
    'POISSON.DIST QUARTILE.EXC QUARTILE.INC RANK.AVG RANK.EQ RRI SEC SECH SHEET SHEETS SINGLE SKEW.P STDEV.P STDEV.S ' +
    'SWITCH T.DIST T.DIST.2T T.DIST.RT T.INV T.INV.2T T.TEST TEXTAFTER TEXTBEFORE TEXTJOIN UNICHAR UNICODE VALUETOTEXT ' +
    'VAR.P VAR.S WEIBULL.DIST XMATCH XOR Z.TEST',
);

/** Functions that come to one value from whole ranges, so that their formulas are no array formulas. */
const ONE_VALUE = words(
  'SUM SUMIF SUMIFS SUMPRODUCT COUNT COUNTA COUNTBLANK COUNTIF COUNTIFS AVERAGE AVERAGEIF AVERAGEIFS MIN MAX MINIFS MAXIFS ' +
    'MEDIAN PRODUCT ROWS COLUMNS VLOOKUP HLOOKUP MATCH SUBTOTAL LARGE SMALL RANK AND OR ROUND IF IFERROR TEXT TODAY NOW DATE',
);
const RANGE = '(?:\\$?[A-Z]{1,3}\\$?\\d+:\\$?[A-Z]{1,3}\\$?\\d+|\\$?[A-Z]{1,3}:\\$?[A-Z]{1,3})';
const HOLDS_RANGE = new RegExp(`(?<![\\w.])${RANGE}(?![\\w(])`, 'iu');
const RANGE_IN_ARITHMETIC = new RegExp(`[-+*/^&=<>]\\s*(?:[\\w.']+!)?${RANGE}(?![\\w(])|(?<![\\w.])${RANGE}\\s*[-+*/^&=<>]`, 'iu');

/** @param stored a formula of a file, without equals sign; returns it as typed, with one */
export function toTyped(stored: string): string {
  const spilled = outside(TEXT, stored, (part) => part.replace(STORED_SPILL, (_, reference: string) => `${reference}#`));
  return `=${outside(QUOTED, spilled, (part) =>
    part.replace(STORED_OURS, (_, id: string) => `${NAMESPACE}.${id.toUpperCase().replaceAll('_', '.')}`).replace(STORED_NEW, (whole, name: string) =>
      // A function we could not spell again on saving keeps its prefix.
      prefixOf(name.toUpperCase()) === '' ? whole : name,
    ),
  )}`;
}

/** @param typed a formula with its equals sign; returns it as a file stores it, without one */
export function toStored(typed: string): string {
  const named = outside(QUOTED, typed.replace(/^=/u, ''), (part) =>
    part
      .replace(TYPED_OURS, (_, id: string) => `_xldudf_${NAMESPACE}_${id.toUpperCase().replaceAll('.', '_')}`)
      .replace(FUNCTION, (name) => `${prefixOf(name.toUpperCase())}${name}`),
  );
  return outside(TEXT, named, (part) => part.replace(TYPED_SPILL, (whole) => `_xlfn.ANCHORARRAY(${whole.slice(0, -1)})`));
}

/** True for a formula with one of our functions in it. */
export function usesOurs(typed: string): boolean {
  return typed.replace(QUOTED, '""').search(TYPED_OURS) !== -1;
}

/**
 * True for a formula that may fill more than its cell or needs to see ranges as a whole: stored
 * otherwise, a sheet would take one cell of each range.
 */
export function isArrayFormula(typed: string): boolean {
  const code = typed.replace(QUOTED, '""');
  if (usesOurs(code) || code.search(TYPED_SPILL) !== -1) return true;
  const names = Array.from(code.matchAll(FUNCTION), ([name]) => name.toUpperCase());
  if (names.some((name) => ARRAY_FUNCTIONS.has(name) || SHEET_FUNCTIONS.has(name))) return true;
  if (RANGE_IN_ARITHMETIC.test(code)) return true;
  return HOLDS_RANGE.test(code) && (names.length === 0 || names.some((name) => !ONE_VALUE.has(name)));
}

function prefixOf(name: string): string {
  if (SHEET_FUNCTIONS.has(name)) return '_xlfn._xlws.';
  return ARRAY_FUNCTIONS.has(name) || NEW_FUNCTIONS.has(name) ? '_xlfn.' : '';
}

/** Changes the parts of a formula that the pattern does not match. */
function outside(pattern: RegExp, formula: string, change: (part: string) => string): string {
  let changed = '';
  let end = 0;
  for (const match of formula.matchAll(pattern)) {
    changed += change(formula.slice(end, match.index)) + match[0];
    end = match.index + match[0].length;
  }
  return changed + change(formula.slice(end));
}

function words(list: string): ReadonlySet<string> {
  return new Set(list.split(' '));
}
