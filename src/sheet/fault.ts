/** The input tables of a case, as people call them. */
export type TableName = 'Pairs' | 'People' | 'Duties' | 'Rules' | 'Current' | 'Plan' | 'Grid';

/** Where a fault is and what would cure it. */
export interface FaultPlace {
  readonly table: TableName;
  /** Row within the range, the first row of the range being 1; null where the whole table is meant. */
  readonly row: number | null;
  /** Heading of the column; null where no column is meant. */
  readonly column: string | null;
  /** What the cell holds, as a person would read it. */
  readonly found: string;
  /** What would be right there, as the rest of the sentence "expected ...". */
  readonly expected: string;
}

/** Input that cannot be read as a case: shown in the cell as #VALUE! with this message. */
export class InputFault extends Error {
  readonly place: FaultPlace;

  constructor(place: FaultPlace) {
    super(faultSentence(place));
    this.name = 'InputFault';
    this.place = place;
  }
}

function faultSentence({ table, row, column, found, expected }: FaultPlace): string {
  const where = [`${table} table`];
  if (row !== null) where.push(`row ${row} of the range`);
  if (column !== null) where.push(`column ${column}`);
  return `${where.join(', ')}: found ${found}; expected ${expected}.`;
}

/** Something odd in the inputs that does not stop an answer. */
export interface Finding {
  readonly table: TableName;
  /** Row within the range, the first row of the range being 1; null where no row is meant. */
  readonly row: number | null;
  /** A few words, the same for every finding of the kind. */
  readonly finding: string;
  /** One sentence with the names and numbers. */
  readonly detail: string;
}
