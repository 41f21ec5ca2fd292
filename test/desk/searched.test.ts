import { describe, expect, it } from 'vitest';
import { optionsOfDuty, optionsOfPerson } from '../../src/desk/whatIf';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { provideSearcher } from '../../src/functions/searches';
import type { Solved } from '../../src/functions/solved';
import { knotPictures } from '../../src/pane/pictures/knotPicture';
import { aboutDuty, aboutPerson } from '../../src/pane/whatIf/about';
import type { Range } from '../../src/sheet/range';
import { TestSearcher } from '../helpers/searcher';

const DAY = 46_000;
const PAIRS: Range = [['Duty', 'Person'], ['Dawn', 'Ada'], ['Noon', 'Ada'], ['Noon', 'Bo'], ['Dusk', 'Ada'], ['Dusk', 'Bo'], ['Night', 'Bo']];
const DUTIES: Range = [
  ['Duty', 'Start', 'End'],
  ['Dawn', DAY + 6 / 24, DAY + 12 / 24],
  ['Noon', DAY + 11 / 24, DAY + 16 / 24],
  ['Dusk', DAY + 15 / 24, DAY + 20 / 24],
  ['Night', DAY + 19 / 24, DAY + 23 / 24],
];

/** Three duties that overlap in a chain: no flow. Asks until a function has answered. */
async function answered(id: string, journal: Journal): Promise<Solved> {
  for (;;) {
    const answer = invoke(FUNCTIONS.find((fn) => fn.id === id)!, [PAIRS, [['Person', 'Maximum'], ['Ada', 3], ['Bo', 1]], DUTIES], `${id}!A1`, journal);
    if (answer.kind === 'spill') return journal.calls().find(({ functionId }) => functionId === id)!.solved!;
    if (answer.kind === 'fault') throw new Error(answer.message);
    await answer.settled;
  }
}

describe('what if, in a case that is searched', () => {
  it('tells no cost that nobody searched for, and says so', async () => {
    const searcher = new TestSearcher();
    provideSearcher(searcher);
    const journal = new Journal();
    const solved = await answered('ASSIGN', journal);
    expect(solved.isFlow).toBe(false);
    const all = solved.case.duties.flatMap((_, d) => optionsOfDuty(solved, d));
    expect(all).toHaveLength(6);
    for (const { trial, isHeld, words } of all) expect([trial, words]).toEqual([null, isHeld ? 'holds it' : '']);
    expect(aboutPerson(solved, 0)[1]).toContain('has to be searched');
    expect(aboutDuty(solved, 0)).toHaveLength(1);
    expect(knotPictures(solved)).toEqual([]);
    expect(searcher.begun).toEqual(['plan']);

    await answered('CHOICES', journal);
    const words = solved.case.people.flatMap((_, p) => optionsOfPerson(solved, p)).filter(({ isHeld }) => !isHeld).map((option) => option.words);
    expect(words.length).toBeGreaterThan(0);
    for (const text of words) expect(text).toMatch(/^costs (?:no seat|cover)$/u);

    await answered('BOTTLENECKS', journal);
    const [picture] = knotPictures(solved);
    expect(picture.knot.needed).toBeGreaterThan(picture.knot.places);
    expect(picture.stops.size).toBe(0);
    for (const { others } of picture.elsewhere) expect(others).toBeNull();
    await answered('ABSENCES', journal);
    expect(aboutPerson(solved, 0)[1]).toMatch(/^If they were away, (?:1 seat is|\d seats are) lost/u);
  });
});
