import { html, nothing, svg, type TemplateResult } from 'lit-html';
import type { Solved } from '../../functions/solved';
import { knotReason, names } from '../../functions/reasons';
import { joinNames } from '../../sheet/write';
import type { Elsewhere, KnotPicture, Side } from './knotPicture';

/** Height of a box, in pixels, and with its share of the gaps; the lines between boxes count on it. Groups have a line more. */
const BOX = { single: 56, group: 72 };
const BETWEEN = 6;

/** Width of the room for lines, likewise. */
const GAP = 40;

/** Places drawn one by one. */
const PLACES = 8;

/** Limits named before the rest is only counted. */
const STOPS = 4;

/** Letters of a name that fit into a box; of these, so many from its end. */
const LETTERS = 24;
const END = 8;

/** A bottleneck: duties on one side, people with their places on the other, lines between who may take what. */
export function knotView(solved: Solved, picture: KnotPicture): TemplateResult {
  const { knot, duties, people, lines, elsewhere, moreElsewhere } = picture;
  const box = [...duties.boxes, ...people.boxes].some(({ length }) => length > 1) ? BOX.group : BOX.single;
  const height = (box + BETWEEN) * Math.max(rowsOf(duties), rowsOf(people));
  const at = (side: Side, place: number): number => (height * (place + 0.5)) / rowsOf(side);
  return html`
    <figure class="dp-figure">
      <figcaption>Bottleneck ${knot.number}: ${knot.needed} needed, room for ${knot.places}</figcaption>
      <div class="dp-knot" style="--dp-box:${box}px">
        ${sideView(duties, 'dp-box dp-box-short', (members) => dutyBox(solved, members))}
        <svg width=${GAP} height=${height} aria-hidden="true">
          ${lines.map(({ duty, person, isHeld }) => {
            return svg`<line class=${isHeld ? 'dp-held' : ''} x1="0" y1=${at(duties, duty)} x2=${GAP} y2=${at(people, person)} />`;
          })}
        </svg>
        ${sideView(people, 'dp-box', (members) => personBox(solved, picture, members))}
      </div>
      ${listView('The same in words', [knotReason(solved.case, knot), ...people.boxes.map((members, p) => personWords(solved, picture, members, p))])}
      ${elsewhere.length === 0
        ? nothing
        : listView(`What they hold elsewhere (${elsewhere.length + moreElsewhere})`, elsewhere.map((seat) => elsewhereWords(solved, seat)))}
    </figure>
  `;
}

function listView(title: string, sentences: readonly string[]): TemplateResult {
  return html`
    <details>
      <summary>${title}</summary>
      <ul>${sentences.map((sentence) => html`<li class="dp-item" dir="auto">${sentence}</li>`)}</ul>
    </details>
  `;
}

function rowsOf({ boxes, more }: Side): number {
  return boxes.length + (more > 0 ? 1 : 0);
}

function sideView({ boxes, more }: Side, style: string, box: (members: readonly number[]) => TemplateResult): TemplateResult {
  return html`<ul class="dp-side">${boxes.map(box)} ${more > 0 ? html`<li class=${style}>and ${more} more</li>` : nothing}</ul>`;
}

function dutyBox({ case: { duties }, outcome: { plan } }: Solved, box: readonly number[]): TemplateResult {
  const sum = (of: (duty: number) => number): number => box.reduce((total, duty) => total + of(duty), 0);
  return boxView('dp-box dp-box-short', duties, box, `${sum((d) => plan.heldOfDuty[d])} of ${sum((d) => duties[d].need)} held`);
}

function personBox(solved: Solved, picture: KnotPicture, box: readonly number[]): TemplateResult {
  const [here, elsewhere, left] = placesOf(solved, picture, box);
  const squares = (count: number, style: string): TemplateResult[] =>
    Array.from({ length: count }, () => html`<span class="dp-seat ${style}"></span>`);
  const all = here + elsewhere + left;
  const places = [squares(here, ''), squares(elsewhere, 'dp-striped'), squares(left, 'dp-empty')];
  return boxView('dp-box', solved.case.people, box, all > PLACES ? `${here} + ${elsewhere} of ${all}` : places);
}

function boxView(style: string, all: readonly { readonly name: string }[], box: readonly number[], below: unknown): TemplateResult {
  return html`
    <li class=${style} title=${names(all, box)}>
      <span class="dp-clip" dir="auto">${shortened(all[box[0]].name)}${box.length > 1 ? ` and ${box.length - 1} more` : ''}</span>
      <span class="dp-soft">${below}</span>
    </li>
  `;
}

/** A name that fits, cut in its middle: what tells names apart often stands at the end. */
function shortened(name: string): string {
  const letters = Array.from(name);
  return letters.length <= LETTERS ? name : `${letters.slice(0, LETTERS - END - 1).join('')}…${letters.slice(-END).join('')}`;
}

/** Places of the members of a box: held in the bottleneck, held elsewhere, and left. */
function placesOf({ case: { people }, outcome }: Solved, { knot }: KnotPicture, box: readonly number[]): [number, number, number] {
  const seats = outcome.plan.seats.filter(({ person }) => box.includes(person));
  const here = seats.filter(({ duty }) => knot.duties.includes(duty)).length;
  const places = box.reduce((sum, p) => sum + people[p].maximum, 0);
  return [here, seats.length - here, Math.max(0, places - seats.length)];
}

function personWords(solved: Solved, picture: KnotPicture, box: readonly number[], at: number): string {
  const [here, elsewhere, left] = placesOf(solved, picture, box);
  const tasks = picture.lines.filter(({ person }) => person === at).flatMap(({ duty }) => picture.duties.boxes[duty]);
  const { people, duties } = solved.case;
  const stops = new Set(box.flatMap((person) => [...(picture.stops.get(person) ?? [])]));
  const most = stops.size === 0 ? '' : `; at most ${joinNames([...stops], STOPS)}`;
  return `${names(people, box)}: ${here} here, ${elsewhere} elsewhere, ${left} left${most}; may take ${names(duties, tasks)}.`;
}

function elsewhereWords({ case: { duties, people } }: Solved, { duty, person, others }: Elsewhere): string {
  const held = `${people[person].name}: ${duties[duty].name}`;
  return others === null ? held : `${held}; others at no cost: ${others.length === 0 ? 'nobody' : names(people, others)}`;
}
