import { html, nothing, type TemplateResult } from 'lit-html';
import { answerDrafts } from '../../desk/answers';
import { blankDrafts, blankRules } from '../../desk/blankTables';
import { preview } from '../../desk/preview';
import { candidatesOf, joined, propose, ROLES, turn, type Candidate, type Role } from '../../desk/propose';
import type { Journal } from '../../functions/journal';
import { formatAddress, parseAddress, parseZone } from '../../host/address';
import type { WorkbookPort } from '../../host/port';
import { Panel } from '../panel';

const TITLES: Readonly<Record<Role, string>> = {
  pairs: 'Who may take what',
  people: 'How much each can take',
  duties: 'What must be covered (if there is such a table)',
  rules: 'Promises and exceptions (if any)',
  current: 'The plan in force (if any)',
};

/** Finding the tables of a case in the workbook, and putting the answers beside them. */
export class StartPanel extends Panel {
  #candidates: readonly Candidate[] = [];
  /** What a person chose against the proposal, by role; null: none of them. */
  readonly #choice = new Map<Role, string | null>();
  #proposed: ReadonlyMap<Role, Candidate> = new Map();
  #isOpen = false;

  constructor(port: WorkbookPort, journal: Journal) {
    super('Begin', port, journal);
  }

  protected override async look(): Promise<void> {
    if (!this.#isOpen && this.journal.calls().length > 0) return;
    // What our formulas spill looks like tables too.
    const answers = new Set(this.ours.map(({ address }) => address));
    const blocks = joined(await this.port.blocks()).filter(({ address }) => ![...answers].some((cell) => isIn(cell, address)));
    this.#proposed = propose(blocks);
    const people = this.#proposed.get('people');
    this.#candidates = blocks.flatMap(candidatesOf).map((one) => turn(one, people));
  }

  protected override view(): TemplateResult {
    const isFirst = this.journal.calls().length === 0;
    return html`
      <details ?open=${isFirst} @toggle=${(event: Event) => this.#toggle((event.target as HTMLDetailsElement).open)}>
        <summary>${isFirst ? 'Begin' : 'Set up another case'}</summary>
        ${this.#isOpen || isFirst ? this.#bodyView() : nothing}
      </details>
    `;
  }

  /** Tables are looked at only while someone looks at this. */
  #toggle(isOpen: boolean): void {
    if (isOpen === this.#isOpen) return;
    this.#isOpen = isOpen;
    void this.refresh(this.ours);
  }

  #bodyView(): TemplateResult {
    return html`
        ${this.#candidates.length === 0 ? this.#emptyView() : this.#proposalView()}
        <p class="dp-soft">Or start with empty tables, labelled, on a sheet of their own:</p>
        ${this.button('Lay out empty tables', () => this.#layOut())}
    `;
  }

  #emptyView(): TemplateResult {
    return html`<p>
      No tables were found yet. Two are enough: who may take what (columns Duty and Person), and how much each can take (columns Person and
      Maximum). Type or paste them anywhere in this workbook.
    </p>`;
  }

  #proposalView(): TemplateResult {
    const chosen = this.#chosen();
    const isReady = chosen.has('pairs') && chosen.has('people');
    const { counts, faults, findings } = isReady ? preview(chosen) : { counts: [], faults: [], findings: 0 };
    return html`
      <p>These look like your tables. Correct what is not right.</p>
      ${ROLES.map((role) => this.#chooser(role, chosen.get(role)))}
      ${isReady ? nothing : html`<p class="dp-error">Still missing: ${chosen.has('pairs') ? 'the people' : 'the pairs'}.</p>`}
      ${counts.length === 0 ? nothing : html`<p>Understood: ${counts.join(', ')}${findings === 0 ? '.' : `; ${findings} things found odd.`}</p>`}
      ${faults.length === 0 ? nothing : html`<ul>${faults.slice(0, 3).map((fault) => html`<li class="dp-error" dir="auto">${fault}</li>`)}</ul>`}
      ${isReady && faults.length === 0 ? this.button('Put the answers on new sheets', () => this.#answer(chosen)) : nothing}
    `;
  }

  #chooser(role: Role, chosen: Candidate | undefined): TemplateResult {
    const options = this.#candidates.filter((one) => one.role === role);
    const change = (event: Event): void => {
      const { value } = event.target as HTMLSelectElement;
      this.#choice.set(role, value === '' ? null : value);
      this.draw();
    };
    return html`
      <label class="dp-field">
        <span>${TITLES[role]}</span>
        <select @change=${change}>
          <option value="" ?selected=${chosen === undefined}>none</option>
          ${options.map((one) => html`<option value=${one.argument} ?selected=${one.argument === chosen?.argument}>${nameOf(one)}</option>`)}
        </select>
      </label>
    `;
  }

  #chosen(): Map<Role, Candidate> {
    const chosen = new Map(this.#proposed);
    for (const [role, argument] of this.#choice) {
      const one = this.#candidates.find((candidate) => candidate.role === role && candidate.argument === argument);
      if (one === undefined) chosen.delete(role);
      else chosen.set(role, one);
    }
    return chosen;
  }

  async #answer(chosen: ReadonlyMap<Role, Candidate>): Promise<string> {
    const rules = chosen.has('rules') ? null : await blankRules(this.port);
    const given = ROLES.map((role) => chosen.get(role)?.argument ?? (role === 'rules' ? (rules?.reference ?? '') : ''));
    const { size } = preview(chosen);
    const answers = answerDrafts(given, size);
    const made = await this.port.addSheets(rules === null ? answers : [...answers, rules]);
    await this.port.select(formatAddress({ sheet: made[0], cell: 'A1' }));
    const names = made.slice(0, answers.length);
    const left = size.isLarge ? ' DUTY.GRID, DUTY.REMEDIES and DUTY.ABSENCES were left out: in a case of this size they would slow every change.' : '';
    const place = rules === null ? '' : ` What you decide is written on ${made[answers.length]}.`;
    return `The answers are on ${inWords(names)}. They follow every change of your tables.${place}${left}`;
  }

  async #layOut(): Promise<string> {
    const names = await this.port.addSheets(await blankDrafts(this.port));
    await this.port.select(formatAddress({ sheet: names[0], cell: 'A4' }));
    return `Fill the tables on ${names[0]}; the answers appear on ${inWords(names.slice(1))}.`;
  }
}

/** `Results, Grid and Why`. */
function inWords(names: readonly string[]): string {
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

function nameOf({ block, isGrid }: Candidate): string {
  const rows = `${block.values.length} rows`;
  return `${block.name === null ? '' : `${block.name}, `}${block.address} (${isGrid ? `cross table, ${rows}` : rows})`;
}

/** True where a cell lies in a rectangle of the same sheet. */
function isIn(cell: string, zone: string): boolean {
  const [one, all] = [parseAddress(cell), parseAddress(zone)];
  const [place, area] = [parseZone(one?.cell ?? ''), parseZone(all?.cell ?? '')];
  if (place === null || area === null || one?.sheet !== all?.sheet) return false;
  return place.top >= area.top && place.top <= area.bottom && place.left >= area.left && place.left <= area.right;
}
