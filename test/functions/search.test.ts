import { beforeEach, describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { provideSearcher } from '../../src/functions/searches';
import type { Range } from '../../src/sheet/range';
import { TestSearcher } from '../helpers/searcher';

/** A ferry office: three crossings that overlap in a chain, so that no two limits are nested. */
const DAY = 46_000;
const PAIRS: Range = [['Duty', 'Person'], ['Dawn crossing', 'Ada'], ['Noon crossing', 'Ada'], ['Noon crossing', 'Bo'], ['Dusk crossing', 'Ada'], ['Dusk crossing', 'Bo']];
const DUTIES: Range = [
  ['Duty', 'Start', 'End'],
  ['Dawn crossing', DAY + 6 / 24, DAY + 12 / 24],
  ['Noon crossing', DAY + 11 / 24, DAY + 16 / 24],
  ['Dusk crossing', DAY + 15 / 24, DAY + 20 / 24],
];
const people = (most: number): Range => [['Person', 'Maximum'], ['Ada', most], ['Bo', most]];

let searcher: TestSearcher;
let journal: Journal;
beforeEach(() => {
  searcher = new TestSearcher();
  provideSearcher(searcher);
  journal = new Journal();
});

function ask(id: string, ranges: readonly (Range | null)[], address = `${id}!A1`) {
  return invoke(FUNCTIONS.find((fn) => fn.id === id)!, ranges, address, journal);
}

/** Asks until there is an answer, as a sheet does. */
async function answered(id: string, ranges: readonly (Range | null)[], address?: string): Promise<unknown[][]> {
  for (;;) {
    const answer = ask(id, ranges, address);
    if (answer.kind === 'spill') return answer.spill.map((row) => [...row]);
    if (answer.kind === 'fault') throw new Error(answer.message);
    expect(await answer.settled).toBe(true);
  }
}

describe('a case that is no flow', () => {
  it('is answered by search, once for all functions', async () => {
    const ranges = [PAIRS, people(2), DUTIES, null, null];
    expect(await answered('ASSIGN', ranges)).toEqual([
      ['Duty', 'Person', 'Rank', 'Note'],
      ['Dawn crossing', 'Ada', '', ''],
      ['Noon crossing', 'Bo', '', ''],
      ['Dusk crossing', 'Ada', '', ''],
    ]);
    const summary = await answered('SUMMARY', ranges);
    expect(summary).toContainEqual(['Method', 'exact search']);
    expect(summary).toContainEqual(['Proven', 'proven best']);
    await answered('GRID', ranges);
    expect(searcher.begun).toEqual(['plan']);
  });

  it.each(FUNCTIONS.filter((fn) => 'ofCase' in fn).map(({ id }) => id))('is answered by %s, or refused in words', async (id) => {
    const ranges = [PAIRS, people(1), DUTIES, [['Rule', 'Duty', 'Person', 'Value'], ['Rest', '', '', 30]], [['Duty', 'Person'], ['Dawn crossing', 'Ada']]];
    if (id === 'PROOF') await expect(answered(id, ranges)).rejects.toThrow('lie inside one another');
    else expect((await answered(id, ranges)).length).toBeGreaterThan(1);
  });

  it('says why a seat stays uncovered, and what one place would gain', async () => {
    const ranges = [PAIRS, people(1), DUTIES, null, null];
    const [, bottleneck] = await answered('BOTTLENECKS', ranges);
    expect(bottleneck.slice(3, 6)).toEqual([3, 2, 1]);
    const loads = await answered('LOADS', ranges);
    expect(loads.slice(1).map((row) => row[5])).toEqual([1, 0]);
  });

  it('CHECK finds duties too close in time', async () => {
    const plan: Range = [['Duty', 'Person'], ['Dawn crossing', 'Ada'], ['Noon crossing', 'Ada']];
    const rows = await answered('CHECK', [plan, PAIRS, people(2), DUTIES, null]);
    expect(rows).toContainEqual(['Too close in time', 'Dawn crossing', 'Ada', 'Overlaps "Noon crossing", or leaves less than the Rest between them.']);
    expect(rows).toContainEqual(['Short of the best', '', '', 'The plan covers 2 seats; 3 can be covered, 1 more.']);
  });

  it('is dropped as soon as no cell asks about it, and no stale answer lands', async () => {
    let seed = 1;
    const random = (below: number): number => {
      seed = (Math.imul(seed, 1103515245) + 12345) >>> 0;
      return (seed >>> 8) % below;
    };
    const cells = ['ASSIGN', 'SUMMARY', 'LOADS'];
    const waiting: Promise<boolean>[] = [];
    for (let edit = 0; edit < 400; edit++) {
      const most = random(4);
      const duties = DUTIES.map((row, r) => (r === 1 ? [row[0], row[1], DAY + (11 + random(3)) / 24 + random(60) / 1440] : row));
      const ranges = [PAIRS, people(most), duties, null, null];
      for (const id of cells) {
        const answer = ask(id, ranges);
        if (answer.kind === 'busy') waiting.push(answer.settled);
      }
      // Now and then the person pauses, so that some searches end.
      if (random(4) === 0) await new Promise((resolve) => setTimeout(resolve, random(3)));
      const latest = journal.calls().map(({ solved, waitsFor }) => solved ?? waitsFor);
      expect(new Set(latest).size).toBe(1);
      for (const { answer, functionId } of journal.calls()) {
        if (answer.kind !== 'spill' || functionId !== 'LOADS') continue;
        expect(answer.spill[1][3]).toBe(most);
      }
      if (edit === 399) expect((await answered('LOADS', ranges)).at(1)![3]).toBe(most);
    }
    expect(searcher.dropped).toBeGreaterThan(100);
    const settled = await Promise.all(waiting);
    expect(settled.filter((isWorthAsking) => !isWorthAsking).length).toBeGreaterThan(100);
  });

  it('shows what went wrong where the search fails, and does not search again and again', async () => {
    provideSearcher({ start: () => ({ done: Promise.reject(new Error('no memory')), drop: () => undefined }) });
    const ranges = [PAIRS, people(3), DUTIES, null, null];
    await expect(answered('ASSIGN', ranges)).rejects.toThrow('The search failed: no memory');
    await expect(answered('GRID', ranges)).rejects.toThrow('The search failed: no memory');
  });
});
