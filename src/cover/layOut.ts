import { ArcWriter, buildNetwork } from '../flow/network';
import type { Case } from './case';
import type { OpenPairs } from './openPairs';
import type { Nestings, PriorityClass, Reduction } from './reduce';

const SOURCE = 0;
const SINK = 1;

/** Writes the nodes and arcs of a reduction, in name order throughout. */
export function layOut(kase: Case, open: OpenPairs, openPair: Int32Array, nestings: Nestings): Reduction {
  const { priorities, classOfDuty } = classify(kase);
  const needLeft = kase.duties.map((duty, d) => Math.max(0, duty.need - open.fixedOfDuty[d]));
  const nodes = numberNodes(kase, priorities.length, nestings);
  const limitCount = nodes.count - 2 - priorities.length - kase.duties.length - kase.people.length;
  const arcs = new ArcWriter(
    priorities.length + kase.duties.length + openPair.length + limitCount + kase.people.length,
  );

  const classNeed = new Float64Array(priorities.length);
  needLeft.forEach((need, d) => (classNeed[classOfDuty[d]] += need));
  const classes: PriorityClass[] = priorities.map((priority, c) => {
    const node = 2 + c;
    return { priority, node, arc: arcs.add(SOURCE, node, classNeed[c]) };
  });

  const dutyArc = new Int32Array(kase.duties.length);
  for (const d of kase.dutyOrder) dutyArc[d] = arcs.add(classes[classOfDuty[d]].node, nodes.duty[d], needLeft[d]);
  const firstPairArc = arcs.count;
  openPair.forEach((i, k) => {
    const person = kase.pairs.person[i];
    const limit = nestings.innermost[k];
    const to = limit === -1 ? nodes.person[person] : nodes.firstLimit[person] + limit;
    arcs.add(nodes.duty[kase.pairs.duty[i]], to, 1);
  });
  const personArc = new Int32Array(kase.people.length);
  for (const p of kase.personOrder) {
    nestings.ofPerson[p].nodes.forEach(({ parent, most }, i) => {
      arcs.add(nodes.firstLimit[p] + i, parent === -1 ? nodes.person[p] : nodes.firstLimit[p] + parent, most);
    });
    const room = Math.max(0, kase.people[p].maximum - open.fixedByPerson[p]);
    personArc[p] = arcs.add(nodes.person[p], SINK, room);
  }

  const list = arcs.finish();
  return {
    open,
    network: buildNetwork(nodes.count, list),
    arcs: list,
    source: SOURCE,
    sink: SINK,
    classes,
    classOfDuty,
    dutyNode: nodes.duty,
    dutyArc,
    personNode: nodes.person,
    firstLimit: nodes.firstLimit,
    nestings,
    personArc,
    firstPairArc,
    openPair,
  };
}

/** The priorities that occur, most urgent first, and the place of each duty's among them. */
function classify({ duties }: Case): { priorities: number[]; classOfDuty: Int32Array } {
  const priorities = [...new Set(duties.map(({ priority }) => priority))].sort((a, b) => a - b);
  const place = new Map(priorities.map((priority, c) => [priority, c]));
  return { priorities, classOfDuty: Int32Array.from(duties, ({ priority }) => place.get(priority)!) };
}

interface NodeNumbers {
  readonly count: number;
  /** By duty number. */
  readonly duty: Int32Array;
  /** By person number; the person's limit nodes follow from `firstLimit`. */
  readonly person: Int32Array;
  readonly firstLimit: Int32Array;
}

function numberNodes(kase: Case, classCount: number, nestings: Nestings): NodeNumbers {
  let count = 2 + classCount;
  const duty = new Int32Array(kase.duties.length);
  for (const d of kase.dutyOrder) duty[d] = count++;
  const person = new Int32Array(kase.people.length);
  const firstLimit = new Int32Array(kase.people.length);
  for (const p of kase.personOrder) {
    person[p] = count++;
    firstLimit[p] = count;
    count += nestings.ofPerson[p].nodes.length;
  }
  return { count, duty, person, firstLimit };
}
