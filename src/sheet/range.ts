/**
 * A range as a host hands it over: rows of cells, row by row. A blank cell is null, undefined, ""
 * or white space; an error cell is any object (hosts differ in its shape, see `errorCode`).
 */
export type Range = readonly (readonly unknown[])[];

/** What a cell function spills: a rectangle of at least one row, no null, no NaN. */
export type Spill = readonly (readonly (string | number | boolean)[])[];
