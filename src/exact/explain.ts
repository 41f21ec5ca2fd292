import type { Highs } from 'highs';
import type { Absence } from '../cover/absences';
import type { Case } from '../cover/case';
import type { Use } from '../cover/choices';
import { openPairs, PairState, type OpenPairs } from '../cover/openPairs';
import { planOf } from '../cover/plan';
import { splitColumns } from './blocks';
import { CoverModel } from './coverModel';
import { programmeOf, type Programme } from './programme';
import type { Found, InTime } from './answers';

/** What a question is asked with: the case, the plan found, and seconds left. */
export interface Question {
  readonly highs: Highs;
  readonly kase: Case;
  readonly found: Found;
  readonly seconds: () => number;
}

interface Part {
  readonly model: CoverModel;
  /** Covered seats in the plan at hand beside Fixed ones. */
  readonly held: readonly number[];
}

/** Asks something of every independent part; the models are disposed of afterwards. */
function eachPart(kase: Case, { highs, found }: Question, programme: Programme, ask: (part: Part) => void): void {
  const isHeld = new Set(found.held);
  for (const columns of splitColumns(programme)) {
    const model = new CoverModel(highs, kase, programme, columns);
    try {
      ask({ model, held: Array.from(columns.keys()).filter((i) => isHeld.has(programme.pair[columns[i]])) });
    } finally {
      model.dispose();
    }
  }
}

/**
 * What the absence of each person would cost: what can be covered is searched anew without them, and
 * among the plans that cover as well the one that keeps most of the plan at hand is taken.
 */
export function absencesBySearch(question: Question): InTime<Absence>[] {
  const { kase, found, seconds } = question;
  const plan = planOf(kase, found.held);
  const answers = kase.people.map((_, person): InTime<Absence> => ({ person, holds: [], lost: 0, dutiesLost: [], takenOver: [] }));
  const holders = new Set(plan.seats.map(({ person }) => person));
  for (const person of holders) {
    answers[person] = null;
    if (seconds() <= 0) continue;
    const without = withoutPerson(kase, person);
    const programme = programmeOf(without, openPairs(without));
    const held: number[] = [];
    let proven = true;
    eachPart(without, question, programme, ({ model, held: before }) => {
      // Seats of theirs that others may take lie in parts that they touch; elsewhere nothing changes.
      const theirs = new Set(plan.seats.filter((seat) => seat.person === person).map(({ duty }) => duty));
      const touched = model.columnsWhere((d) => theirs.has(d)).length > 0;
      if (!touched) {
        held.push(...before.map((i) => programme.pair[model.columns[i]]));
        return;
      }
      const cover = model.cover(seconds);
      model.hold(cover);
      const cost = new Float64Array(model.columns.length);
      for (const i of before) cost[i] = -1;
      const { x } = model.minimise(cost, seconds());
      proven &&= cover.proven;
      const values = x ?? cover.x;
      held.push(...Array.from(model.columns.keys()).filter((i) => values[i] > 0.5).map((i) => programme.pair[model.columns[i]]));
    });
    if (proven) answers[person] = absenceFrom(kase, plan, planOf(without, held), person);
  }
  return answers;
}

function withoutPerson(kase: Case, person: number): Case {
  const barred = [...kase.barred];
  for (let i = 0; i < kase.pairs.count; i++) if (kase.pairs.person[i] === person) barred.push({ duty: kase.pairs.duty[i], person });
  return { ...kase, barred, fixed: kase.fixed.filter((seat) => seat.person !== person) };
}

function absenceFrom(kase: Case, plan: ReturnType<typeof planOf>, after: ReturnType<typeof planOf>, person: number): Absence {
  const holds = plan.seats.filter((seat) => seat.person === person).map(({ duty }) => duty).sort((a, b) => a - b);
  const short = (count: number, d: number): number => Math.max(0, kase.duties[d].need - count);
  const more = kase.duties.map((_, d) => short(after.heldOfDuty[d], d) - short(plan.heldOfDuty[d], d));
  const dutiesLost = more.flatMap((count, d) => (count > 0 ? [d] : []));
  const before = new Set(plan.seats.map(({ duty, person: p }) => duty * kase.people.length + p));
  const takers = (d: number): number[] =>
    after.seats.filter(({ duty, person: p }) => duty === d && !before.has(d * kase.people.length + p)).map(({ person: p }) => p);
  return {
    person,
    holds,
    lost: Math.max(0, more.reduce((sum, count) => sum + count, 0)),
    dutiesLost,
    takenOver: holds.filter((d) => more[d] <= 0).map((duty) => ({ duty, by: takers(duty) })),
  };
}

/**
 * Seats more that could be covered if one person alone took one more, by person number. Where even
 * the bound with fractions is no higher than the plan, no search is needed.
 */
export function gainsBySearch({ highs, kase, found, seconds }: Question): InTime<number>[] {
  const { covered } = planOf(kase, found.held);
  return kase.people.map((_, person): InTime<number> => {
    if (seconds() <= 0) return null;
    const more = roomFor(kase, person);
    const wide = { ...kase, people: kase.people.map((one, p) => (p === person ? { ...one, maximum: one.maximum + more } : one)) };
    const open = openPairs(wide);
    const programme = programmeOf(wide, open);
    const fixedSeats = fixedCover(kase, open);
    const parts = splitColumns(programme);
    let total = fixedSeats;
    let most = fixedSeats;
    const models = parts.map((columns) => new CoverModel(highs, wide, programme, columns));
    try {
      for (const model of models) most += model.bound(seconds()) ?? Infinity;
      if (most <= covered) return 0;
      for (const model of models) {
        const cover = model.cover(seconds);
        if (!cover.proven) return null;
        total += cover.total;
      }
      return Math.max(0, total - covered);
    } finally {
      for (const model of models) model.dispose();
    }
  });
}

/** One more seat takes as much as the largest load of those open to the person. */
function roomFor({ pairs, duties }: Case, person: number): number {
  let most = 1;
  for (let i = 0; i < pairs.count; i++) if (pairs.person[i] === person) most = Math.max(most, duties[pairs.duty[i]].load);
  return most;
}

/** Seats covered by Fixed rows alone. */
export function fixedCover({ duties }: Case, { fixedOfDuty }: OpenPairs): number {
  return duties.reduce((sum, { need }, d) => sum + Math.min(need, fixedOfDuty[d]), 0);
}

/**
 * How the plans that cover as well use each pair. Every plan found shows some pairs held and others
 * not; the next one is sought so that it shows as much as possible that no plan has shown yet, until
 * none can show anything more. That takes a few searches for all pairs together.
 */
export function choicesBySearch(question: Question): InTime<Use>[] {
  const { kase, seconds } = question;
  const open = openPairs(kase);
  const programme = programmeOf(kase, open);
  const use = Array.from(open.state, (state): InTime<Use> => (state === PairState.Fixed ? 'Always' : 'Never'));
  eachPart(kase, question, programme, ({ model, held }) => {
    const [seenIn, seenOut] = [new Uint8Array(model.columns.length), new Uint8Array(model.columns.length).fill(1)];
    for (const i of held) [seenIn[i], seenOut[i]] = [1, 0];
    model.hold({ byPriority: heldByPriority(kase, programme, model, held) });
    let isOver = false;
    while (!isOver && seconds() > 0) {
      const cost = Float64Array.from(seenIn, (_, i) => (seenIn[i] === 0 ? -1 : seenOut[i] === 0 ? 1 : 0));
      const { x, proven } = model.minimise(cost, seconds());
      const seen = (i: number): Uint8Array => (x![i] > 0.5 ? seenIn : seenOut);
      const news = x === null ? [] : Array.from(model.columns.keys()).filter((i) => seen(i)[i] === 0);
      for (const i of news) seen(i)[i] = 1;
      if (news.length === 0) isOver = proven;
      if (news.length === 0 && !proven) break;
    }
    model.columns.forEach((column, i) => {
      const both = seenIn[i] + seenOut[i] === 2;
      use[programme.pair[column]] = both ? 'Sometimes' : isOver ? (seenIn[i] === 1 ? 'Always' : 'Never') : null;
    });
  });
  return use;
}

function heldByPriority(kase: Case, programme: Programme, model: CoverModel, held: readonly number[]): number[] {
  const priorityOf = (i: number): number => kase.duties[programme.duty[model.columns[i]]].priority;
  const classes = [...new Set(Array.from(model.columns.keys(), priorityOf))].sort((a, b) => a - b);
  return classes.map((priority) => held.filter((i) => priorityOf(i) === priority).length);
}
