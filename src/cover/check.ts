import type { Case, Seat } from './case';
import { tooClose } from './conflicts';
import { mostOf } from './limits';
import type { OpenPairs } from './openPairs';

/** Something wrong with a plan made by hand. */
export interface Wrong {
  readonly kind:
    | 'Fixed not kept'
    | 'Barred'
    | 'Away'
    | 'Not eligible'
    | 'Too many'
    | 'Uncovered'
    | 'Over maximum'
    | 'Below minimum'
    | 'Over a limit'
    | 'Too close in time'
    | 'Clash'
    | 'Not together';
  readonly duty: number | null;
  readonly person: number | null;
  /** How many there are, and how many there may or should be; 0 where counting is beside the point. */
  readonly found: number;
  readonly allowed: number;
  /** The slot or group that a limit is on, or that someone is away in; the other of two duties; '' for others. */
  readonly label: string;
}

/** Everything wrong with these seats: duty by duty in table order, then person by person, then duties that do not go together. */
export function check(kase: Case, open: OpenPairs, seats: readonly Seat[]): readonly Wrong[] {
  return [...checkSeats(kase, seats), ...checkDuties(kase, seats), ...checkPeople(kase, open, seats), ...checkPartners(kase, seats)];
}

function wrong(kind: Wrong['kind'], about: Partial<Wrong>): Wrong {
  return { kind, duty: null, person: null, found: 0, allowed: 0, label: '', ...about };
}

function checkSeats(kase: Case, seats: readonly Seat[]): Wrong[] {
  const { people, pairs, duties } = kase;
  const key = ({ duty, person }: Seat): number => duty * people.length + person;
  const held = new Set(seats.map(key));
  const barred = new Set(kase.barred.map(key));
  const allowed = new Set(kase.fixed.map(key));
  for (let i = 0; i < pairs.count; i++) allowed.add(pairs.duty[i] * people.length + pairs.person[i]);
  const missing = kase.fixed.filter((seat) => !held.has(key(seat))).map((seat) => wrong('Fixed not kept', seat));
  const fixed = new Set(kase.fixed.map(key));
  const bad = [...seats].sort((a, b) => a.duty - b.duty || a.person - b.person).flatMap((seat) => {
    const labels = [...duties[seat.duty].slots, ...duties[seat.duty].groups];
    const away = kase.away.find(({ person, label }) => person === seat.person && labels.includes(label.key));
    if (barred.has(key(seat))) return [wrong('Barred', seat)];
    if (!allowed.has(key(seat))) return [wrong('Not eligible', seat)];
    return away === undefined || fixed.has(key(seat)) ? [] : [wrong('Away', { ...seat, label: away.label.name })];
  });
  return [...missing, ...bad];
}

function checkDuties({ duties }: Case, seats: readonly Seat[]): Wrong[] {
  const held = new Int32Array(duties.length);
  for (const { duty } of seats) held[duty]++;
  return duties.flatMap(({ need }, duty) => {
    const count = { duty, found: held[duty], allowed: need };
    if (held[duty] > need) return [wrong('Too many', count)];
    return held[duty] < need ? [wrong('Uncovered', count)] : [];
  });
}

function checkPeople({ people, duties, clashes, rest }: Case, open: OpenPairs, seats: readonly Seat[]): Wrong[] {
  const held = new Int32Array(people.length);
  const own: number[][] = people.map(() => []);
  const inSet = new Map<number, Int32Array>();
  for (const { duty, person } of seats) {
    held[person] += duties[duty].load;
    own[person].push(duty);
    for (const s of open.setsOf[duty]) {
      if (open.sets[s].kind === 'conflict') continue;
      const counts = inSet.get(s) ?? new Int32Array(people.length);
      inSet.set(s, counts);
      counts[person]++;
    }
  }
  const clash = new Set(clashes.flatMap(([one, other]) => [`${one} ${other}`, `${other} ${one}`]));
  const conflictsOf = (person: number, list: readonly number[]): Wrong[] =>
    list.flatMap((duty, i) =>
      list.slice(i + 1).flatMap((other): Wrong[] => {
        const label = duties[other].name;
        return [
          ...(tooClose(duties[duty], duties[other], rest) ? [wrong('Too close in time', { duty, person, label })] : []),
          ...(clash.has(`${duty} ${other}`) ? [wrong('Clash', { duty, person, label })] : []),
        ];
      }),
    );
  return people.flatMap(({ minimum, maximum }, person) => {
    const found = held[person];
    const limits = [...inSet].flatMap(([s, counts]) => {
      const allowed = mostOf(open.sets[s], person);
      return counts[person] > allowed ? [wrong('Over a limit', { person, found: counts[person], allowed, label: open.sets[s].name })] : [];
    });
    return [
      ...(found > maximum ? [wrong('Over maximum', { person, found, allowed: maximum })] : []),
      ...(found < minimum ? [wrong('Below minimum', { person, found, allowed: minimum })] : []),
      ...limits,
      ...conflictsOf(person, own[person].sort((a, b) => a - b)),
    ];
  });
}

/** Who holds one of two duties that go together, and not the other. */
function checkPartners({ together, people, duties }: Case, seats: readonly Seat[]): Wrong[] {
  const held = new Set(seats.map(({ duty, person }) => duty * people.length + person));
  const isHeld = (duty: number, person: number): boolean => held.has(duty * people.length + person);
  return together.flatMap(([one, other]) =>
    people.flatMap((_, person): Wrong[] => {
      if (isHeld(one, person) === isHeld(other, person)) return [];
      const [duty, missing] = isHeld(one, person) ? [one, other] : [other, one];
      return [wrong('Not together', { duty, person, label: duties[missing].name })];
    }),
  );
}
