import { html, nothing, type TemplateResult } from 'lit-html';
import type { Journal } from '../../functions/journal';
import type { WorkbookPort } from '../../host/port';
import { CasePanel } from '../casePanel';
import type { LiveCase } from '../panel';
import { knotPictures } from './knotPicture';
import { knotView } from './knotView';
import { loadPicture } from './loadPicture';
import { loadView } from './loadView';

/** Drawings of the bottlenecks and of what everyone holds, each with the same in words. */
export class PicturesPanel extends CasePanel {
  #isOpened = false;

  constructor(port: WorkbookPort, journal: Journal) {
    super('Pictures', port, journal);
  }

  protected override view(): TemplateResult {
    const { live } = this;
    this.element.hidden = live === undefined;
    if (live === undefined) return html``;
    // Nothing is worked out for a drawing that nobody looks at.
    const toggle = (event: Event): void => {
      if (event.target !== event.currentTarget) return;
      this.#isOpened = (event.target as HTMLDetailsElement).open;
      this.draw();
    };
    return html`
      <details @toggle=${toggle}>
        <summary>Pictures</summary>
        ${this.#isOpened ? this.#picturesView(live) : nothing}
      </details>
    `;
  }

  #picturesView({ solved }: LiveCase): TemplateResult {
    const knots = knotPictures(solved).map((picture) => knotView(solved, picture));
    return html`
      ${this.choiceView()}
      ${knots.length === 0 ? nothing : html`
        <p class="dp-soft">A thick line: held; a thin one: could be. Squares are places: full ones held here, striped ones elsewhere, broken ones left.</p>
      `}
      ${knots} ${loadView(loadPicture(solved))}
    `;
  }
}
