import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { FUNCTIONS } from '../../src/functions/registry';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { readCase } from '../../src/sheet/readCase';
import type { Range } from '../../src/sheet/range';
import { summarise } from './summary';

const FOLDER = join(import.meta.dirname, 'golden');
const TABLES = ['pairs', 'people', 'duties', 'rules', 'current'] as const;

interface Golden {
  readonly input: Readonly<Record<(typeof TABLES)[number], unknown[][] | null>>;
  readonly faults: readonly string[];
  readonly findings: readonly (readonly [string, number | null, string, string])[];
  readonly case: ReturnType<typeof summarise> | null;
}

/** One file a case: what is read, and every fault, finding and number that comes of it. */
const golden = readdirSync(FOLDER).map((file) => ({
  name: file.replace('.json', ''),
  ...(JSON.parse(readFileSync(join(FOLDER, file), 'utf8')) as Golden),
}));

/** Numbers that JSON has no word for are written as {"number": "NaN"}. */
function toRange(rows: unknown[][] | null): Range | null {
  const decode = (cell: unknown): unknown =>
    typeof cell === 'object' && cell !== null && 'number' in cell ? Number(cell.number) : cell;
  return rows === null ? null : rows.map((row) => row.map(decode));
}

function ranges({ input }: Golden): (Range | null)[] {
  return TABLES.map((table) => toRange(input[table]));
}

describe('reading the input tables', () => {
  it.each(golden)('$name', (entry) => {
    const reading = readCase(ranges(entry));
    expect(reading.faults.map(({ message }) => message)).toEqual(entry.faults);
    expect(reading.findings.map(({ table, row, finding, detail }) => [table, row, finding, detail])).toEqual(entry.findings);
    expect(reading.case === null ? null : summarise(reading.case)).toEqual(entry.case);
  });

  it('has at least 40 kinds of input that cannot be read', () => {
    expect(golden.filter(({ faults }) => faults.length > 0).length).toBeGreaterThanOrEqual(40);
  });
});

describe('the functions on input that cannot be read', () => {
  const broken = golden.filter(({ faults }) => faults.length > 0);
  const caseFunctions = FUNCTIONS.filter((fn) => 'ofCase' in fn);

  it.each(broken)('show the first fault of $name, and FINDINGS lists them all', (entry) => {
    for (const fn of caseFunctions) {
      const answer = invoke(fn, ranges(entry), 'Sheet1!A1', new Journal());
      if (fn.id !== 'FINDINGS') {
        expect(answer).toEqual({ kind: 'fault', message: entry.faults[0] });
        continue;
      }
      if (answer.kind !== 'spill') throw new Error(JSON.stringify(answer));
      expect(answer.spill.filter((row) => row[2] === 'Cannot be read').map((row) => row[3])).toEqual(entry.faults);
    }
  });
});
