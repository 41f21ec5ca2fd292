/**
 * What all aims leave open is settled by names alone: every pair draws a lot from the names of its
 * duty and its person, and the plan with the least sum of lots is taken. Lots do not favour the front
 * of the alphabet, and they are the same on every machine; with 30 bits a tie between two plans is
 * all but impossible.
 */

/** A number from the code units of a key: FNV-1a, 32 bits (Fowler, Noll and Vo). */
export function keyHash(key: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < key.length; i++) {
    const unit = key.charCodeAt(i);
    hash = Math.imul(hash ^ (unit & 0xff), 0x01000193);
    hash = Math.imul(hash ^ (unit >>> 8), 0x01000193);
  }
  return hash;
}

/**
 * The lot of a pair from the hashes of its duty and its person.
 * @returns a whole number from 0 to 2^30 - 1
 */
export function lot(dutyHash: number, personHash: number): number {
  // The last steps of MurmurHash3 (Appleby, public domain) spread every bit over all others.
  let mixed = dutyHash ^ Math.imul(personHash, 0x9e3779b1);
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
  return (mixed ^ (mixed >>> 16)) >>> 2;
}
