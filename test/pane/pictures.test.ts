import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { PairState } from '../../src/cover/openPairs';
import { minimumsMissed } from '../../src/functions/measures';
import { Solved } from '../../src/functions/solved';
import { knotPictures } from '../../src/pane/pictures/knotPicture';
import { loadPicture } from '../../src/pane/pictures/loadPicture';
import type { Range } from '../../src/sheet/range';
import { rangesOf, specs, type Spec } from '../helpers/spec';

/** Cover of each priority and minimums missed, of the best plan with a Fixed row more. */
function worthWith(spec: Spec, solved: Solved, duty: number, person: number): unknown {
  const number = (list: readonly { name: string }[], name: string): number => list.findIndex((one) => one.name === name);
  const rule = { rule: 'Fixed' as const, duty: number(spec.duties, solved.case.duties[duty].name), person: number(spec.people, solved.case.people[person].name) };
  return worth(new Solved(rangesOf({ ...spec, rules: [...spec.rules, rule] })));
}

function worth({ case: kase, outcome: { plan } }: Solved): unknown {
  const covered = new Map<number, number>();
  kase.duties.forEach(({ priority, need }, d) => covered.set(priority, (covered.get(priority) ?? 0) + Math.min(need, plan.heldOfDuty[d])));
  return [[...covered].sort((a, b) => a[0] - b[0]), minimumsMissed(kase, plan)];
}

describe('the drawing of a bottleneck', () => {
  it('shows all its duties, people and pairs, what its people hold elsewhere, and who else could at no cost', () => {
    let [drawn, elsewhereSeen, othersSeen] = [0, 0, 0];
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const solved = new Solved(rangesOf(spec));
        const { pairs } = solved.case;
        const { plan, open } = solved.outcome;
        const short = solved.case.duties.flatMap(({ need }, d) => (plan.heldOfDuty[d] < need ? [d] : []));
        const pictures = knotPictures(solved);
        for (const d of short) expect(pictures.filter(({ knot }) => knot.duties.includes(d))).toHaveLength(1);
        for (const { knot, duties, people, lines, elsewhere, moreElsewhere } of pictures) {
          drawn++;
          expect([...duties.boxes].sort(([a], [b]) => a - b)).toEqual(knot.duties.map((d) => [d]));
          const lacking = duties.boxes.map(([d]) => (plan.heldOfDuty[d] < solved.case.duties[d].need ? 0 : 1));
          expect(lacking).toEqual([...lacking].sort((a, b) => a - b));
          expect(duties.more).toBe(0);
          expect(people).toEqual({ boxes: knot.people.map((p) => [p]), more: 0 });
          const expected: string[] = [];
          for (let i = 0; i < pairs.count; i++) {
            const isIn = knot.duties.includes(pairs.duty[i]) && (open.state[i] === PairState.Open || open.state[i] === PairState.Fixed);
            if (isIn) expected.push(`${pairs.duty[i]} ${pairs.person[i]}`);
          }
          const held = plan.seats.map(({ duty, person }) => `${duty} ${person}`);
          const text = ({ duty, person }: (typeof lines)[number]): string => `${duties.boxes[duty][0]} ${knot.people[person]}`;
          const unlisted = held.filter((seat) => knot.duties.includes(Number(seat.split(' ')[0])) && !expected.includes(seat));
          expect(lines.map(text).sort()).toEqual([...expected, ...unlisted].sort());
          for (const line of lines) expect(line.isHeld).toBe(held.includes(text(line)));
          const outside = plan.seats.filter(({ duty, person }) => knot.people.includes(person) && !knot.duties.includes(duty));
          expect(elsewhere.length + moreElsewhere).toBe(outside.length);
          for (const { duty, person, others } of elsewhere) {
            elsewhereSeen++;
            expect(held).toContain(`${duty} ${person}`);
            for (const other of others!) {
              othersSeen++;
              expect(worthWith(spec, solved, duty, other)).toEqual(worth(solved));
            }
          }
        }
      }),
      { numRuns: 600 },
    );
    expect(Math.min(drawn, elsewhereSeen, othersSeen)).toBeGreaterThan(30);
  });

  it('says what keeps its people from holding more: a bound that is reached', () => {
    const pairs: Range = [['Gate', 'Ann'], ['Door', 'Ann'], ['Bell', 'Bo'], ['Horn', 'Bo']];
    const duties: Range = [['Duty', 'Need', 'Slot'], ['Gate', 1, 'Mon'], ['Door', 1, 'Mon'], ['Bell', 1, ''], ['Horn', 1, '']];
    const pictures = knotPictures(new Solved([pairs, [['Ann', 2], ['Bo', 1]], duties, null]));
    expect(pictures.map(({ stops }) => [...stops.values()].flatMap((words) => [...words]))).toEqual([['1 in Mon'], ['1 in all']]);
  });

  it('puts alike ones together where there are hundreds, and counts the rest', () => {
    const places = Array.from({ length: 300 }, (_, i) => `Person ${i}`);
    const work = Array.from({ length: 600 }, (_, i) => `Duty ${i}`);
    // Half of the people may take everything, the others only the first half of the duties.
    const pairs: Range = work.flatMap((duty, d) => places.filter((_, p) => p < 150 || d < 300).map((person) => [duty, person]));
    const [picture] = knotPictures(new Solved([pairs, [[1]], null, null]));
    expect(picture.people.boxes.map(({ length }) => length)).toEqual([150, 150]);
    expect(picture.duties.boxes.map(({ length }) => length)).toEqual([300, 300]);
    expect(picture.lines.map(({ duty, person }) => [duty, person])).toEqual([[0, 0], [0, 1], [1, 0]]);

    // Everyone may take something of their own: nothing is alike.
    const ladder: Range = work.flatMap((duty, d) => places.filter((_, p) => p <= d).map((person) => [duty, person])).slice(0, 2000);
    for (const { knot, duties, people } of knotPictures(new Solved([ladder, [[0]], null, null]))) {
      for (const [side, all] of [[duties, knot.duties], [people, knot.people]] as const) {
        expect(side.boxes.length).toBeLessThanOrEqual(8);
        expect(side.boxes.flat().length + side.more).toBe(all.length);
      }
    }
  });
});

describe('the drawing of loads', () => {
  const solved = (people: number, minimum: number): Solved => {
    const names = Array.from({ length: people }, (_, i) => `Person ${i}`);
    const rows: Range = [['Person', 'Maximum', 'Minimum'], ...names.map((name, i) => [name, 1 + (i % 4), i === 0 ? minimum : 0])];
    return new Solved([names.map((name) => ['Shift', name]), rows, [['Duty', 'Need'], ['Shift', Math.floor(people / 2)]], null]);
  };

  it('has a bar for everyone, the fullest first, long enough for minimum, maximum and load', () => {
    const picture = loadPicture(solved(12, 9));
    if (picture.kind !== 'people') throw new Error('not person by person');
    expect(picture.bars).toHaveLength(12);
    expect(picture.most).toBe(9);
    const spare = picture.bars.map(({ maximum, load }) => maximum - load);
    expect(spare).toEqual([...spare].sort((a, b) => a - b));
  });

  it('has groups of how full people are where they are many, each person in one', () => {
    const picture = loadPicture(solved(200, 9));
    if (picture.kind !== 'groups') throw new Error('not in groups');
    const names = picture.groups.flatMap((group) => group.names);
    expect([names.length, new Set(names).size]).toEqual([200, 200]);
    expect(picture.groups.find(({ label }) => label === 'below the minimum')?.names).toEqual(['Person 0']);
    expect(picture.most).toBe(Math.max(...picture.groups.map((group) => group.names.length)));
  });
});
