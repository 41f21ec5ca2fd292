import type { Solved } from '../../functions/solved';

/** People drawn one by one; more are drawn in groups. */
const ONE_BY_ONE = 40;

/** What someone holds against what they may and should. */
export interface LoadBar {
  readonly name: string;
  readonly load: number;
  readonly minimum: number;
  readonly maximum: number;
}

/** Loads person by person, or where there are many in groups of how full they are. */
export type LoadPicture =
  | { readonly kind: 'people'; readonly bars: readonly LoadBar[]; readonly most: number }
  | { readonly kind: 'groups'; readonly groups: readonly { readonly label: string; readonly names: readonly string[] }[]; readonly most: number };

/** What everyone holds, those first who are over, then the fullest. */
export function loadPicture({ case: { people }, outcome: { plan } }: Solved): LoadPicture {
  const bars = people.map(({ name, minimum, maximum }, p): LoadBar => ({ name, minimum, maximum, load: plan.loadByPerson[p] }));
  if (bars.length <= ONE_BY_ONE) {
    const spare = ({ maximum, load }: LoadBar): number => maximum - load;
    const most = Math.max(1, ...bars.map(({ load, minimum, maximum }) => Math.max(load, minimum, maximum)));
    return { kind: 'people', bars: bars.sort((a, b) => spare(a) - spare(b) || b.load - a.load), most };
  }
  const labels = ['over the maximum', 'below the minimum', 'full', 'more than half full', 'half full or less', 'nothing held'];
  const groups = labels.map((label, i) => ({ label, names: bars.filter((bar) => groupOf(bar) === i).map(({ name }) => name) }));
  return { kind: 'groups', groups: groups.filter(({ names }) => names.length > 0), most: Math.max(...groups.map(({ names }) => names.length)) };
}

function groupOf({ load, minimum, maximum }: LoadBar): number {
  if (load > maximum) return 0;
  if (load < minimum) return 1;
  if (load === maximum && maximum > 0) return 2;
  if (load === 0) return 5;
  return load * 2 > maximum ? 3 : 4;
}
