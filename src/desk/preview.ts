import type { CaseSize } from './answers';
import { Solved } from '../functions/solved';
import type { Range } from '../sheet/range';
import { readGrid } from '../sheet/readGrid';
import { ROLES, type Candidate, type Role } from './propose';

/** What tables would give, before anything is written. */
export interface Preview {
  /** `2,627 pairs`, `72 people`, ... */
  readonly counts: readonly string[];
  /** What keeps them from being read, in words. */
  readonly faults: readonly string[];
  readonly findings: number;
  readonly size: CaseSize;
}

const NO_SIZE: CaseSize = { rows: 0, people: 0, isLarge: false };

/** Above these sizes remedies and absences take longer than a keystroke may. */
const MOST_PAIRS = 5_000;
const MOST_CELLS = 40_000;

/** Looks at tables as the functions would. */
export function preview(chosen: ReadonlyMap<Role, Candidate>): Preview {
  const obstacles = [...chosen.values()].flatMap(({ obstacle, block }) => (obstacle === '' ? [] : [`${block.name ?? block.address}: ${obstacle}`]));
  if (obstacles.length > 0) return { counts: [], faults: obstacles, findings: 0, size: NO_SIZE };
  try {
    const { reading } = new Solved(rangesOf(chosen));
    const kase = reading.case;
    const faults = reading.faults.map(({ message }) => message);
    if (kase === null) return { counts: [], faults, findings: reading.findings.length, size: NO_SIZE };
    const counted = (count: number, one: string, many: string): string => `${count.toLocaleString('en-GB')} ${count === 1 ? one : many}`;
    const seats = kase.duties.reduce((sum, { need }) => sum + need, 0);
    return {
      counts: [
        counted(kase.pairs.count, 'pair', 'pairs'),
        counted(kase.people.length, 'person', 'people'),
        `${counted(kase.duties.length, 'duty', 'duties')} with ${counted(seats, 'seat', 'seats')}`,
      ],
      faults: [],
      findings: reading.findings.length,
      size: {
        rows: Math.max(seats, kase.people.length, kase.duties.length),
        people: kase.people.length,
        isLarge: kase.pairs.count > MOST_PAIRS || kase.duties.length * kase.people.length > MOST_CELLS,
      },
    };
  } catch (error) {
    return { counts: [], faults: [error instanceof Error ? error.message : String(error)], findings: 0, size: NO_SIZE };
  }
}

function rangesOf(chosen: ReadonlyMap<Role, Candidate>): (Range | null)[] {
  return ROLES.map((role) => {
    const one = chosen.get(role);
    if (one === undefined) return null;
    return one.isGrid ? [['Duty', 'Person', 'Rank'], ...readGrid(one.values).map(({ duty, person, rank }) => [duty, person, rank])] : one.values;
  });
}
