import { html, nothing, svg, type TemplateResult } from 'lit-html';
import type { Journal } from '../../functions/journal';
import type { WorkbookPort } from '../../host/port';
import { counted } from '../words';
import { liveCases, Panel } from '../panel';
import { knotPictures, loadPicture, type KnotPicture, type LoadBar, type LoadPicture } from './model';

/** Sizes of a drawing, in units of its view box. */
const WIDTH = 280;
const ROW = 22;
const SIDE = 112;
/** Letters of a name that fit on one side. */
const LETTERS = 17;
/** Of these, so many from the end. */
const END = 5;

/** Drawings of the bottlenecks and of what everyone holds, each with the same in words. */
export class PicturesPanel extends Panel {
  constructor(port: WorkbookPort, journal: Journal) {
    super('Pictures', port, journal);
  }

  protected override view(): TemplateResult {
    const [first] = liveCases(this.journal);
    this.element.hidden = first === undefined;
    if (first === undefined) return html``;
    return html`
      <details>
        <summary>Pictures</summary>
        ${knotPictures(first.solved).map(knotView)} ${loadView(loadPicture(first.solved))}
      </details>
    `;
  }
}

function knotView(knot: KnotPicture): TemplateResult {
  const { number, needed, places, duties, moreDuties, people, morePeople, lines } = knot;
  const rows = Math.max(duties.length + (moreDuties > 0 ? 1 : 0), people.length + (morePeople > 0 ? 1 : 0));
  const height = ROW * rows + 4;
  const [dutyCount, personCount] = [duties.length + moreDuties, people.length + morePeople];
  const need = `${counted(dutyCount, 'duty needs', 'duties need')} ${counted(needed, 'seat', 'seats')}`;
  const words = `Bottleneck ${number}: ${need}; ${counted(personCount, 'person has', 'people have')} room for ${places}.`;
  const y = (row: number): number => ROW * row + ROW / 2 + 2;
  return html`
    <figure class="dp-figure">
      <figcaption>${words}</figcaption>
      <svg viewBox="0 0 ${WIDTH} ${height}" role="img" aria-label=${words}>
        ${lines.map(([d, p]) => svg`<line class="dp-line" x1=${SIDE + 2} y1=${y(d)} x2=${WIDTH - SIDE - 2} y2=${y(p)} />`)}
        ${duties.map((name, i) => label(name, 0, i, 'dp-box-short'))}
        ${moreDuties > 0 ? label(`and ${moreDuties} more`, 0, duties.length, 'dp-box-short') : nothing}
        ${people.map(({ name }, i) => label(name, WIDTH - SIDE, i, 'dp-box'))}
        ${morePeople > 0 ? label(`and ${morePeople} more`, WIDTH - SIDE, people.length, 'dp-box') : nothing}
      </svg>
      <p class="dp-seats" aria-hidden="true">
        ${Array.from({ length: Math.min(needed, 60) }, (_, i) => html`<span class=${i < places ? 'dp-seat' : 'dp-seat dp-empty'}></span>`)}
      </p>
      <details>
        <summary>The same in words</summary>
        <ul>
          ${people.map(({ name, elsewhere }, p) => html`<li dir="auto">${peopleWords(name, elsewhere, lines.filter(([, q]) => p === q).map(([d]) => duties[d]))}</li>`)}
        </ul>
      </details>
    </figure>
  `;
}

function peopleWords(name: string, elsewhere: number, duties: readonly string[]): string {
  const away = elsewhere === 0 ? '' : ` (holds ${elsewhere} elsewhere)`;
  return `${name}${away}: ${duties.join('; ')}`;
}

function label(name: string, x: number, row: number, style: string): TemplateResult {
  const shown = shortened(name);
  const top = ROW * row + 3;
  return svg`<g><title>${name}</title>
    <rect class=${style} x=${x + 1} y=${top} width=${SIDE - 2} height=${ROW - 4} rx="3" />
    <text class="dp-label" x=${x + 6} y=${top + 13}>${shown}</text></g>`;
}

/** A name that fits, cut in its middle: what tells names apart often stands at the end. */
function shortened(name: string): string {
  const letters = Array.from(name);
  if (letters.length <= LETTERS) return name;
  return `${letters.slice(0, LETTERS - END - 1).join('')}…${letters.slice(-END).join('')}`;
}

function loadView(picture: LoadPicture): TemplateResult {
  const title = 'What everyone holds';
  if (picture.kind === 'groups') {
    return html`
      <figure class="dp-figure">
        <figcaption>${title}</figcaption>
        <ul class="dp-bars">
          ${picture.groups.map(({ label: name, count }) => barView(name, `${count} people`, [[count / picture.most, 'dp-fill']]))}
        </ul>
      </figure>
    `;
  }
  return html`
    <figure class="dp-figure">
      <figcaption>${title}, of at most how much</figcaption>
      <ul class="dp-bars">${picture.bars.map((bar) => personBar(bar, picture.most))}</ul>
    </figure>
  `;
}

function personBar({ name, load, minimum, maximum }: LoadBar, most: number): TemplateResult {
  const over = load > maximum;
  const below = load < minimum;
  const words = `${load} of ${maximum}${below ? `, below ${minimum}` : over ? ', over' : ''}`;
  return barView(name, words, [
    [maximum / most, 'dp-room'],
    [load / most, below || over ? 'dp-fill dp-odd' : 'dp-fill'],
  ]);
}

function barView(name: string, words: string, parts: readonly (readonly [share: number, style: string])[]): TemplateResult {
  return html`
    <li>
      <span class="dp-bar-name dp-clip" dir="auto">${name}</span>
      <span class="dp-bar-words">${words}</span>
      <span class="dp-meter" aria-hidden="true">${parts.map(([share, style]) => html`<span class=${style} style="width:${100 * Math.min(1, share)}%"></span>`)}</span>
    </li>
  `;
}
