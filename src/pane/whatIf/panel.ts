import { html, nothing, type TemplateResult } from 'lit-html';
import { repeat } from 'lit-html/directives/repeat.js';
import { decide, decisionsOf, undecide, type Decision } from '../../desk/decide';
import { moveWords } from '../../desk/trialWords';
import { consequenceOf, optionsOfDuty, optionsOfPerson, type Option } from '../../desk/whatIf';
import type { Journal } from '../../functions/journal';
import type { Solved } from '../../functions/solved';
import type { WorkbookPort } from '../../host/port';
import { nameKey } from '../../sheet/name';
import { CasePanel } from '../casePanel';
import { liveCases, type LiveCase } from '../panel';
import { aboutDuty, aboutPerson } from './about';

/** Options of a group shown before the rest is asked for. */
const FIRST = 8;

/** Trying out who could take what, and writing a decision into the rules. */
export class WhatIfPanel extends CasePanel {
  /** The key of the name that is looked at; '' for none. */
  #asked = '';
  /** The option whose consequences are shown, as `duty person`. */
  #opened = '';
  /** Titles of the groups that are shown whole. */
  readonly #whole = new Set<string>();
  #decisions: readonly Decision[] = [];

  constructor(port: WorkbookPort, journal: Journal) {
    super('What if', port, journal);
    port.onSelected((address) => void this.#followSelection(address));
  }

  protected override async look(): Promise<void> {
    const { live } = this;
    this.#decisions = live === undefined ? [] : await decisionsOf(this.port, live.address);
  }

  protected override view(): TemplateResult {
    const { live } = this;
    this.element.hidden = live === undefined;
    if (live === undefined) return html``;
    const { duties, people } = live.solved.case;
    return html`
      <h2>What if</h2>
      ${this.choiceView()}
      <label class="dp-field">
        <span>A duty or a person (or select their cell in the sheet)</span>
        <input list="dp-names" .value=${this.#shownName(live.solved)} @change=${(event: Event) => this.#ask((event.target as HTMLInputElement).value)} />
      </label>
      <datalist id="dp-names">${[...duties, ...people].map(({ name }) => html`<option value=${name}></option>`)}</datalist>
      ${this.#answerView(live)}
      ${this.#decisions.length === 0 ? nothing : this.#decisionsView(live)}
    `;
  }

  #ask(name: string): void {
    [this.#asked, this.#opened] = [nameKey(name), ''];
    this.#whole.clear();
    this.draw();
  }

  /** Asks about the name in a cell, in the case looked at or else in the first that knows it. */
  async #followSelection(address: string): Promise<void> {
    const value = (await this.port.read(address).catch(() => null))?.values[0]?.[0];
    const { live } = this;
    if (live === undefined || (typeof value !== 'string' && typeof value !== 'number')) return;
    const key = nameKey(String(value));
    const knows = ({ solved: { case: { duties, people } } }: LiveCase): boolean => [...duties, ...people].some((one) => one.key === key);
    const found = [live, ...liveCases(this.journal)].find(knows);
    if (found === undefined || (key === this.#asked && found.address === live.address)) return;
    this.choose(found.address);
    this.#ask(String(value));
    if (found.address !== live.address) await this.refresh(this.ours);
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
    const isDuty = duty !== -1;
    const options = isDuty ? optionsOfDuty(solved, duty) : optionsOfPerson(solved, person);
    const sentences = isDuty ? aboutDuty(solved, duty) : aboutPerson(solved, person);
    const titles = isDuty ? ['Held by', 'Could be held by', 'Cannot be held by'] : ['Holds', 'Could hold', 'Cannot hold'];
    const groupOf = ({ isHeld, isOpen }: Option): number => (isHeld ? 0 : isOpen ? 1 : 2);
    const isUnknown = !solved.isFlow && !solved.isAtHand('choices');
    return html`
      ${sentences.map((sentence) => html`<p dir="auto">${sentence}</p>`)}
      ${isUnknown ? html`<p class="dp-soft">This case is searched: what costs cover is told where DUTY.CHOICES is asked.</p>` : nothing}
      ${titles.map((title, g) => this.#groupView(live, title, options.filter((option) => groupOf(option) === g), isDuty))}
    `;
  }

  #groupView(live: LiveCase, title: string, options: readonly Option[], isDuty: boolean): TemplateResult | typeof nothing {
    if (options.length === 0) return nothing;
    const { duties, people } = live.solved.case;
    const shown = this.#whole.has(title) || options.length <= FIRST + 1 ? options : options.slice(0, FIRST);
    const name = ({ duty, person }: Option): string => (isDuty ? people[person].name : duties[duty].name);
    const showAll = (): void => {
      this.#whole.add(title);
      this.draw();
    };
    return html`
      <h3>${title} (${options.length})</h3>
      <ul>${repeat(shown, keyOf, (option) => this.#optionView(live, option, name(option)))}</ul>
      ${options.length === shown.length ? nothing : html`<button type="button" @click=${showAll}>Show all ${options.length}</button>`}
    `;
  }

  #optionView(live: LiveCase, option: Option, name: string): TemplateResult {
    const key = keyOf(option);
    const isOpened = this.#opened === key;
    const toggle = (): void => {
      this.#opened = isOpened ? '' : key;
      this.draw();
    };
    return html`
      <li class="dp-item">
        <span class="dp-name dp-clip" dir="auto">${name}</span>
        <span class="dp-soft" dir="auto">${option.words}</span>
        ${option.isOpen
          ? html`<button type="button" aria-expanded=${isOpened ? 'true' : 'false'} @click=${toggle}>${option.isHeld ? 'Decide' : 'What follows'}</button>`
          : nothing}
        ${isOpened && option.isOpen ? this.#openedView(live, option) : nothing}
      </li>
    `;
  }

  #openedView({ solved, address }: LiveCase, option: Option): TemplateResult {
    const { duties, people } = solved.case;
    const write = (word: Decision['word']) => (): Promise<string> => decide(this.port, address, word, duties[option.duty].name, people[option.person].name);
    return html`
      ${option.isHeld ? nothing : followsView(solved, option)}
      <div class="dp-cells">${this.button('Fix this', write('Fixed'))} ${this.button('Never this', write('Barred'))}</div>
    `;
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

function keyOf({ duty, person }: Option): string {
  return `${duty} ${person}`;
}

/** The moves that an option leads to, one by one, and who comes below the minimum. */
function followsView(solved: Solved, { trial }: Option): TemplateResult {
  if (trial === null) return html`<p class="dp-soft">What follows would have to be searched. Fix it and look at the new plan.</p>`;
  const { moves, below } = consequenceOf(solved, trial);
  return html`
    ${below.length === 0 ? nothing : html`<p dir="auto">Below the minimum then: ${below.join('; ')}.</p>`}
    <ol class="dp-moves">${moves.map((move) => html`<li dir="auto">${moveWords(solved.case, move)}</li>`)}</ol>
  `;
}
