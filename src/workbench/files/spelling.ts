import { NAMESPACE } from '../../functions/registry';

/**
 * A formula in a file is not what a person types: functions of add-ins carry a prefix and an
 * underscore for each dot, newer native functions a prefix of their own, and `A1#` is a function.
 */

const STORED_OURS = new RegExp(`_xldudf_${NAMESPACE}_([A-Z][A-Z0-9_]*)\\(`, 'giu');
const TYPED_OURS = new RegExp(`\\b${NAMESPACE}\\.([A-Z][A-Z0-9.]*)\\(`, 'giu');
const STORED_SPILL = /_xlfn\.ANCHORARRAY\(([^()"]+)\)/giu;
const TYPED_SPILL = /((?:'(?:[^']|'')+'|[\p{L}_][\p{L}\p{N}_.]*)!)?(\$?[A-Z]{1,3}\$?\d+)#/giu;
const STORED_NEW = /_xlfn\.(?:_xlws\.)?/giu;

/** Native functions that a file stores under a prefix. */
const NEW_FUNCTIONS = new Set(
  (
    'CONCAT IFS SWITCH TEXTJOIN MAXIFS MINIFS UNIQUE SEQUENCE RANDARRAY SORTBY XLOOKUP XMATCH LET LAMBDA VSTACK HSTACK ' +
    'TOCOL TOROW TAKE DROP EXPAND CHOOSECOLS CHOOSEROWS WRAPROWS WRAPCOLS TEXTSPLIT TEXTBEFORE TEXTAFTER'
  ).split(' '),
);
/** These carry a second prefix. */
const SHEET_FUNCTIONS = new Set(['SORT', 'FILTER']);

/** @param stored a formula of a file, without equals sign; returns it as typed, with one */
export function toTyped(stored: string): string {
  return `=${outsideTexts(stored, (part) =>
    part
      .replace(STORED_SPILL, (_, reference: string) => `${reference}#`)
      .replace(STORED_OURS, (_, id: string) => `${NAMESPACE}.${id.replaceAll('_', '.')}(`)
      .replace(STORED_NEW, ''),
  )}`;
}

/** @param typed a formula with its equals sign; returns it as a file stores it, without one */
export function toStored(typed: string): string {
  return outsideTexts(typed.replace(/^=/u, ''), (part) =>
    part
      .replace(TYPED_SPILL, (whole) => `_xlfn.ANCHORARRAY(${whole.slice(0, -1)})`)
      .replace(TYPED_OURS, (_, id: string) => `_xldudf_${NAMESPACE}_${id.toUpperCase().replaceAll('.', '_')}(`)
      .replace(/(?<![\w.])([A-Z][A-Z0-9]*)\(/giu, (whole, name: string) => {
        const upper = name.toUpperCase();
        if (SHEET_FUNCTIONS.has(upper)) return `_xlfn._xlws.${upper}(`;
        return NEW_FUNCTIONS.has(upper) ? `_xlfn.${upper}(` : whole;
      }),
  );
}

/** True for a formula with one of our functions in it. */
export function usesOurs(typed: string): boolean {
  return new RegExp(TYPED_OURS.source, 'iu').test(typed);
}

/** Changes the parts of a formula that are not texts in quotation marks. */
function outsideTexts(formula: string, change: (part: string) => string): string {
  return formula
    .split('"')
    .map((part, i) => (i % 2 === 0 ? change(part) : part))
    .join('"');
}
