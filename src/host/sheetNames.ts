/** The longest name a sheet of a file may have, and what it may not hold. */
const LONGEST = 31;
const FORBIDDEN = /[[\]:*?/\\]/gu;

/** True for a name that a file can hold. */
export function isSheetName(name: string): boolean {
  return name.length <= LONGEST && sanitised(name) === name;
}

/**
 * A name that a file can hold, as near to the given one as can be: cut, and numbered until it is free.
 *
 * @param taken names of sheets that are there already, in lower case; the new one is added
 */
export function freeSheetName(wanted: string, taken: Set<string>): string {
  const base = sanitised(wanted) || 'Sheet';
  for (let number = 1; ; number++) {
    const ending = number === 1 ? '' : ` ${number}`;
    const name = base.slice(0, LONGEST - ending.length).trimEnd() + ending;
    if (taken.has(name.toLowerCase())) continue;
    taken.add(name.toLowerCase());
    return name;
  }
}

function sanitised(name: string): string {
  return name.replace(FORBIDDEN, ' ').replace(/^'+|'+$/gu, '').trim();
}
