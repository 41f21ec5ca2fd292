import { html, nothing, type TemplateResult } from 'lit-html';
import { handOverSheets } from '../../desk/handOver';
import { makeLive, makePlain, plainState, repair, type Exchange } from '../../desk/plain';
import type { Journal } from '../../functions/journal';
import { formatAddress, parseAddress } from '../../host/address';
import type { WorkbookPort } from '../../host/port';
import { counted } from '../words';
import { liveCases, Panel, type LiveCase } from '../panel';

const MAKE = 'Make the sheets to hand over';

/** Handing a plan over as plain sheets, making formulas plain and live again, and mending lost ones. */
export class HandOverPanel extends Panel {
  #live: readonly string[] = [];
  #plain: readonly string[] = [];
  #lost = 0;

  constructor(port: WorkbookPort, journal: Journal) {
    super('Hand over', port, journal);
  }

  protected override async look(): Promise<void> {
    const { live, plain, lost } = await plainState(this.port, this.ours);
    [this.#live, this.#plain, this.#lost] = [live, plain, lost.length];
  }

  protected override view(): TemplateResult {
    const cases = liveCases(this.journal);
    this.element.hidden = cases.length === 0 && this.#plain.length === 0 && this.#lost === 0;
    return html`
      <h2>Hand over</h2>
      ${cases.length > 0 ? this.#handOverView(cases) : nothing} ${this.#lost === 0 ? nothing : this.#lostView()}
      ${this.#live.length + this.#plain.length === 0 ? nothing : this.#plainView()}
    `;
  }

  #handOverView(cases: readonly LiveCase[]): TemplateResult {
    return html`
      <p class="dp-soft">
        New sheets of plain values that anyone can open: the plan by duty and by person, what is uncovered and why, and a check that says
        so if someone changes the plan into an error.
      </p>
      ${cases.map((live) => this.button(cases.length === 1 ? MAKE : `${MAKE}: ${sheetsOf(this.journal, live)}`, () => this.#handOver(live)))}
    `;
  }

  #lostView(): TemplateResult {
    return html`
      <p>The spreadsheet has lost ${counted(this.#lost, 'formula', 'formulas')}.</p>
      ${this.button('Enter them anew', async () => `Entered ${counted(await repair(this.port), 'formula', 'formulas')} anew.`)}
    `;
  }

  #plainView(): TemplateResult {
    const replaced = async (sheet: string): Promise<string> => exchangeWords(await makePlain(this.port, sheet), `on ${sheet} replaced by values.`);
    const putBack = async (sheet: string): Promise<string> => exchangeWords(await makeLive(this.port, sheet), `put back on ${sheet}.`);
    return html`
      <details>
        <summary>Formulas and plain values</summary>
        <div class="dp-cells">
          ${this.#live.map((sheet) => this.button(`Make ${sheet} plain`, () => replaced(sheet)))}
          ${this.#plain.map((sheet) => this.button(`Make ${sheet} live again`, () => putBack(sheet)))}
        </div>
      </details>
    `;
  }

  async #handOver({ solved }: LiveCase): Promise<string> {
    const names = await this.port.addSheets(handOverSheets(solved, today(), await freePrefix(this.port)));
    await this.port.select(formatAddress({ sheet: names[0], cell: 'A1' }));
    return `Made ${counted(names.length, 'sheet', 'sheets')}: ${names.join(', ')}. To send them, select them together and move or copy them to a new book.`;
  }
}

function exchangeWords({ done, left }: Exchange, what: string): string {
  return [`${counted(done, 'formula', 'formulas')} ${what}`, ...left].join(' ');
}

/** Where the formulas of a case are, to tell it from others. */
function sheetsOf(journal: Journal, { solved }: LiveCase): string {
  const addresses = journal.calls().flatMap((call) => (call.solved === solved ? [parseAddress(call.address)?.sheet ?? ''] : []));
  return [...new Set(addresses)].join(', ');
}

function today(): string {
  return new Date().toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
}

/** A prefix for the names of ranges that no earlier handing over has taken. */
async function freePrefix(port: WorkbookPort): Promise<string> {
  for (let number = 1; ; number++) {
    const prefix = `Handed${number === 1 ? '' : `${number}_`}`;
    if ((await port.read(`${prefix}PlanDuty`)) === null) return prefix;
  }
}
