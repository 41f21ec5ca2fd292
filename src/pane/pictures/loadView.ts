import { html, nothing, type TemplateResult } from 'lit-html';
import { joinNames } from '../../sheet/write';
import { counted } from '../words';
import type { LoadBar, LoadPicture } from './loadPicture';

/** Names of a group before the rest is only counted. */
const NAMED = 6;

/** What everyone holds, as bars against minimum and maximum. */
export function loadView(picture: LoadPicture): TemplateResult {
  const { kind, most } = picture;
  return html`
    <figure class="dp-figure">
      <figcaption>What everyone holds${kind === 'people' ? ': the frame is the maximum, the mark the minimum' : ''}</figcaption>
      <ul class="dp-bars">
        ${kind === 'people' ? picture.bars.map((bar) => personBar(bar, most)) : picture.groups.map((group) => groupBar(group, most))}
      </ul>
    </figure>
  `;
}

function groupBar({ label, names }: { readonly label: string; readonly names: readonly string[] }, most: number): TemplateResult {
  const words = counted(names.length, 'person', 'people');
  return html`
    <li>
      <span>${label}</span><span class="dp-bar-words">${words}</span>
      <span class="dp-meter" aria-hidden="true">${part(names.length / most, 'dp-fill')}</span>
      <span class="dp-soft dp-wide" dir="auto">${joinNames(names, NAMED)}</span>
    </li>
  `;
}

function personBar({ name, load, minimum, maximum }: LoadBar, most: number): TemplateResult {
  const isOdd = load > maximum || load < minimum;
  const least = minimum === 0 ? '' : `, ${load < minimum ? 'below' : 'at least'} ${minimum}`;
  const words = `${load} of ${maximum}${load > maximum ? ', over' : least}`;
  return html`
    <li>
      <span class="dp-bar-name dp-clip" dir="auto">${name}</span><span class="dp-bar-words">${words}</span>
      <span class="dp-meter" aria-hidden="true">
        ${part(maximum / most, 'dp-room')} ${part(load / most, isOdd ? 'dp-fill dp-odd' : 'dp-fill')}
        ${minimum > 0 ? part(minimum / most, 'dp-mark') : nothing}
      </span>
    </li>
  `;
}

function part(share: number, style: string): TemplateResult {
  return html`<span class=${style} style="width:${100 * share}%"></span>`;
}
