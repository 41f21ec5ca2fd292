import { html, nothing, type TemplateResult } from 'lit-html';
import { liveCases, Panel, type LiveCase } from './panel';

/** A panel about one case at a time; where several are alive, it lets people choose. */
export abstract class CasePanel extends Panel {
  /** The address of the case looked at, as `liveCases` gives it; another one where that is gone. */
  #chosen = '';

  /** The case looked at; undefined where none is alive. */
  protected get live(): LiveCase | undefined {
    const cases = liveCases(this.journal);
    return cases.find(({ address }) => address === this.#chosen) ?? cases[0];
  }

  /** Looks at the case of this address from now on. */
  protected choose(address: string): void {
    this.#chosen = address;
  }

  /** A choice of the case; nothing where there is none to make. */
  protected choiceView(): TemplateResult | typeof nothing {
    const cases = liveCases(this.journal);
    const live = this.live;
    if (cases.length < 2) return nothing;
    const change = (event: Event): void => {
      this.choose((event.target as HTMLSelectElement).value);
      void this.refresh(this.ours);
    };
    return html`
      <label class="dp-field">
        <span>Case</span>
        <select @change=${change}>
          ${cases.map(({ address, solved }) => html`<option value=${address} .selected=${address === live?.address}>${caseName(address, solved)}</option>`)}
        </select>
      </label>
    `;
  }
}

/** `Results!A2: 12 of 14 seats covered`. */
function caseName(address: string, { outcome: { plan } }: LiveCase['solved']): string {
  return `${address}: ${plan.covered} of ${plan.needed} seats covered`;
}
