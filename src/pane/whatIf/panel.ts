import { html, nothing, type TemplateResult } from 'lit-html';
import { decide, decisionsOf, undecide, type Decision } from '../../desk/decide';
import { consequenceOf, consequenceWords, optionsOfDuty, optionsOfPerson, type Option } from '../../desk/whatIf';
import type { Journal } from '../../functions/journal';
import type { Solved } from '../../functions/solved';
import type { WorkbookPort } from '../../host/port';
import { nameKey } from '../../sheet/name';
import { counted } from '../words';
import { liveCases, Panel, type LiveCase } from '../panel';

/** Options shown before the rest is asked for. */
const FIRST = 12;

/** Trying out who could take what, and writing a decision into the rules. */
export class WhatIfPanel extends Panel {
  /** The key of the name that is looked at; '' for none. */
  #asked = '';
  /** The option whose consequences are shown, as `duty person`. */
  #opened = '';
  #showsAll = false;
  #decisions: readonly Decision[] = [];

  constructor(port: WorkbookPort, journal: Journal) {
    super('What if', port, journal);
    port.onSelected((address) => void this.#followSelection(address));
  }

  protected override async look(): Promise<void> {
    const [first] = liveCases(this.journal);
    this.#decisions = first === undefined ? [] : await decisionsOf(this.port, first.address);
  }

  protected override view(): TemplateResult {
    const [first] = liveCases(this.journal);
    this.element.hidden = first === undefined;
    if (first === undefined) return html``;
    const { duties, people } = first.solved.case;
    return html`
      <h2>What if</h2>
      <label class="dp-field">
        <span>A duty or a person (or select their cell in the sheet)</span>
        <input list="dp-names" .value=${this.#shownName(first.solved)} @change=${(event: Event) => this.#ask((event.target as HTMLInputElement).value)} />
      </label>
      <datalist id="dp-names">${[...duties, ...people].map(({ name }) => html`<option value=${name}></option>`)}</datalist>
      ${this.#answerView(first)}
      ${this.#decisions.length === 0 ? nothing : this.#decisionsView(first)}
    `;
  }

  #ask(name: string): void {
    [this.#asked, this.#opened, this.#showsAll] = [nameKey(name), '', false];
    this.draw();
  }

  async #followSelection(address: string): Promise<void> {
    const value = (await this.port.read(address).catch(() => null))?.values[0]?.[0];
    const [first] = liveCases(this.journal);
    if (first === undefined || (typeof value !== 'string' && typeof value !== 'number')) return;
    const key = nameKey(String(value));
    const { duties, people } = first.solved.case;
    if (key !== this.#asked && [...duties, ...people].some((one) => one.key === key)) this.#ask(String(value));
  }

  #shownName({ case: { duties, people } }: Solved): string {
    return [...duties, ...people].find(({ key }) => key === this.#asked)?.name ?? '';
  }

  #answerView(live: LiveCase): TemplateResult {
    const { solved } = live;
    const { duties, people } = solved.case;
    const duty = duties.findIndex(({ key }) => key === this.#asked);
    const person = people.findIndex(({ key }) => key === this.#asked);
    if (duty === -1 && person === -1) return this.#asked === '' ? html`` : html`<p>No duty and no person of this case has that name.</p>`;
    const options = duty === -1 ? optionsOfPerson(solved, person) : optionsOfDuty(solved, duty);
    const shown = this.#showsAll ? options : options.slice(0, FIRST);
    return html`
      <p>${duty === -1 ? this.#personWords(solved, person) : this.#dutyWords(solved, duty, options.length)}</p>
      <ul>${shown.map((option) => this.#optionView(live, option, duty === -1 ? duties[option.duty].name : people[option.person].name))}</ul>
      ${options.length === shown.length ? nothing : html`<button type="button" @click=${() => this.#showAll()}>Show all ${options.length}</button>`}
    `;
  }

  #showAll(): void {
    this.#showsAll = true;
    this.draw();
  }

  #dutyWords(solved: Solved, duty: number, listed: number): string {
    const { need } = solved.case.duties[duty];
    const held = solved.outcome.plan.heldOfDuty[duty];
    return `Needs ${need}, held by ${held}; ${counted(listed, 'person is', 'people are')} listed for it.`;
  }

  #personWords(solved: Solved, person: number): string {
    const { maximum, minimum } = solved.case.people[person];
    const load = solved.outcome.plan.loadByPerson[person];
    const absence = solved.isAtHand('absences') ? solved.absences[person] : null;
    const lost = absence === null ? '' : ` If away: ${absence.lost === 0 ? 'no seat is lost' : `${counted(absence.lost, 'seat is', 'seats are')} lost`}.`;
    return `Holds ${load} of at most ${maximum}${minimum > 0 ? ` and at least ${minimum}` : ''}.${lost}`;
  }

  #optionView({ solved, address }: LiveCase, option: Option, name: string): TemplateResult {
    const { duties, people } = solved.case;
    const key = `${option.duty} ${option.person}`;
    const toggle = (): void => {
      this.#opened = this.#opened === key ? '' : key;
      this.draw();
    };
    const write = (word: Decision['word']) => (): Promise<string> => decide(this.port, address, word, duties[option.duty].name, people[option.person].name);
    return html`
      <li class="dp-item">
        <span class="dp-name dp-clip" dir="auto">${name}</span>
        <span class="dp-soft">${option.words}</span>
        ${option.isOpen
          ? html`<button type="button" aria-expanded=${this.#opened === key ? 'true' : 'false'} @click=${toggle}>What follows</button>`
          : nothing}
        ${this.#opened === key && option.isOpen
          ? html`
              ${option.isHeld ? nothing : this.#followsView(solved, option)}
              <div class="dp-cells">${this.button('Fix this', write('Fixed'))} ${this.button('Never this', write('Barred'))}</div>
            `
          : nothing}
      </li>
    `;
  }

  #followsView(solved: Solved, option: Option): TemplateResult {
    const consequence = solved.isFlow ? consequenceOf(solved, option) : null;
    if (consequence === null) return html`<p class="dp-soft">What follows would have to be searched. Fix it and look at the new plan.</p>`;
    const [cost, ...moves] = consequenceWords(solved.case, consequence);
    return html`<p>${cost}</p><ol class="dp-moves">${moves.map((move) => html`<li dir="auto">${move}</li>`)}</ol>`;
  }

  #decisionsView({ address }: LiveCase): TemplateResult {
    return html`
      <details>
        <summary>Decisions in the rules (${this.#decisions.length})</summary>
        <ul>
          ${this.#decisions.map(
            (decision) => html`
              <li class="dp-item">
                <span class="dp-clip" dir="auto">${decision.word}: ${decision.person}, ${decision.duty}</span>
                ${this.button('Take away', () => undecide(this.port, address, decision))}
              </li>
            `,
          )}
        </ul>
      </details>
    `;
  }
}
