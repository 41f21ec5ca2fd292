import type { Highs } from 'highs';
import type { Aim, Case } from '../cover/case';
import { keyHash, lot } from '../cover/lots';
import { openPairs } from '../cover/openPairs';
import type { Found, Progress, Verdict } from './answers';
import { Block, type Staff, type Stage } from './block';
import { splitColumns } from './blocks';
import { programmeOf, type Formulation, type Programme } from './programme';

/** Lots are compared as numbers of about a million, which keeps floating point exact enough. */
const LOT_SCALE = 2 ** 10;

/** The share of the time left that one aim may take, so that something is left for the next. */
const SHARE = 0.6;

/** The same for the last two, of which one only settles what is open. */
const LAST_SHARE = 0.9;

/** @public the formulation, for measuring what it is worth */
export interface SearchOptions {
  readonly seconds: number;
  readonly formulation?: Formulation;
  readonly onProgress?: (progress: Progress) => void;
}

/**
 * The best plan of a case that is not a flow, by integer programming, aim after aim: each is optimised
 * with all earlier ones kept. Ends with what it has when the time is over.
 */
export function search(highs: Highs, kase: Case, { seconds, formulation, onProgress }: SearchOptions): Found {
  const end = performance.now() + 1000 * seconds;
  const left = (): number => (end - performance.now()) / 1000;
  const open = openPairs(kase);
  const programme = programmeOf(kase, open, formulation);
  const staff = staffOf(kase, open.fixedLoad);
  const blocks = splitColumns(programme).map((columns) => new Block(highs, programme, columns, staff));
  try {
    const most = mostSeats(blocks, programme, left);
    const verdicts: Verdict[] = [];
    const found = (isComplete = false): Found => ({
      held: heldPairs(programme, blocks),
      verdicts: [...verdicts],
      moreSeats: moreSeats(blocks, most, verdicts),
      isComplete,
    });
    const stages = stagesOf(kase, programme, staff);
    for (const [s, { aim, priority, stage }] of stages.entries()) {
      // Names settle what is open between best plans; between plans not known to be best there is nothing to settle.
      if (aim === 'names' && verdicts.some(({ gap }) => gap > 0)) break;
      let gap = 0;
      blocks.forEach((block, b) => {
        const share = left() * (s < stages.length - 2 ? SHARE : LAST_SHARE);
        const stop = performance.now() + (1000 * share) / (blocks.length - b);
        const seconds = (): number => (stop - performance.now()) / 1000;
        const { value, bound } = block.reach(stage, seconds, () => onProgress?.({ aim, found: found() }));
        gap += value - bound;
      });
      verdicts.push({ aim, priority, gap: gap < 1e-3 ? 0 : gap });
      onProgress?.({ aim, found: found() });
    }
    return found(true);
  } finally {
    for (const block of blocks) block.dispose();
  }
}

function staffOf({ people }: Case, fixedLoad: Int32Array): Staff {
  return {
    wanted: Int32Array.from(people, ({ minimum }, p) => Math.max(0, minimum - fixedLoad[p])),
    before: Int32Array.from(people, ({ carried }, p) => carried + fixedLoad[p]),
  };
}

const seatStage = (programme: Programme, test: (duty: number) => boolean): Stage => ({
  cost: Float64Array.from(programme.duty, (d) => (test(d) ? -1 : 0)),
  extra: 'none',
  whole: true,
});

/** For each block, seats that can be covered at most if nothing but cover counted. */
function mostSeats(blocks: readonly Block[], programme: Programme, left: () => number): number[] {
  const stage = seatStage(programme, () => true);
  return blocks.map((block) => Math.floor(-(block.relaxed(stage, left() / 10) ?? -block.columns.length) + 1e-6));
}

function moreSeats(blocks: readonly Block[], most: readonly number[], verdicts: readonly Verdict[]): number {
  const classes = verdicts.filter(({ aim }) => aim === 'cover');
  // With one priority the proven best is also the most in all.
  if (classes.length === 1 && classes[0].gap === 0) return 0;
  const bound = blocks.reduce((sum, { x }, b) => sum + most[b] - x.reduce((held, one) => held + one, 0), 0);
  return classes.length === 1 ? Math.min(bound, classes[0].gap) : bound;
}

function heldPairs(programme: Programme, blocks: readonly Block[]): Int32Array {
  const held = blocks.flatMap(({ columns, x }) => [...columns].filter((_, i) => x[i] === 1).map((column) => programme.pair[column]));
  return Int32Array.from(held).sort();
}

/** The aims of the case that anything depends on, in their order. */
function stagesOf(kase: Case, programme: Programme, staff: Staff): { aim: Verdict['aim']; priority: number | null; stage: Stage }[] {
  const classes = [...new Set(Array.from(programme.duty, (d) => kase.duties[d].priority))].sort((a, b) => a - b);
  const later: Record<'minimums' | Aim | 'names', () => Stage | null> = {
    minimums: () => (staff.wanted.some((wanted) => wanted > 0) ? plain(programme, () => 0, 'minimums') : null),
    changes: () => changesStage(kase, programme),
    ranks: () => (kase.ranked ? plain(programme, (column) => kase.pairs.rank[programme.pair[column]]) : null),
    evenness: () => plain(programme, () => 0, 'squares'),
    names: () => namesStage(kase, programme),
  };
  return [
    ...classes.map((priority) => ({ aim: 'cover' as const, priority, stage: seatStage(programme, (d) => kase.duties[d].priority === priority) })),
    ...(['minimums', ...kase.order, 'names'] as const).flatMap((aim) => {
      const stage = later[aim]();
      return stage === null ? [] : [{ aim, priority: null, stage }];
    }),
  ];
}

function plain(programme: Programme, costOf: (column: number) => number, extra: Stage['extra'] = 'none'): Stage {
  return { cost: Float64Array.from(programme.duty, (_, column) => costOf(column)), extra, whole: true };
}

function changesStage({ current, people }: Case, programme: Programme): Stage | null {
  if (current === null) return null;
  const held = new Set(current.map(({ duty, person }) => duty * people.length + person));
  return plain(programme, (column) => (held.has(programme.duty[column] * people.length + programme.person[column]) ? -1 : 0));
}

function namesStage({ duties, people }: Case, programme: Programme): Stage {
  const dutyHash = duties.map(({ key }) => keyHash(key));
  const personHash = people.map(({ key }) => keyHash(key));
  const lots = (column: number): number => lot(dutyHash[programme.duty[column]], personHash[programme.person[column]]) / LOT_SCALE;
  return { ...plain(programme, lots), whole: false };
}
