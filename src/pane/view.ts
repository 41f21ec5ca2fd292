import { html, nothing, type TemplateResult } from 'lit-html';
import { repeat } from 'lit-html/directives/repeat.js';
import { type CaseView, type CellError, type CellView, type FindingGroup, type PaneModel } from './model';
import { counted } from './words';
import type { Freshness } from './freshness';
import type { SearchView } from './searchModel';

/** What the views may ask for. */
export interface Actions {
  readonly recalculate: () => void;
  readonly select: (address: string) => void;
  /** Selects the cell a finding is about: a row, from 1, of a table of the case that answers in a cell. */
  readonly jump: (cell: string, table: FindingGroup['details'][number]['table'], row: number) => void;
  /** Shows the whole of a list that is cut off, by its key. */
  readonly showAll: (key: string) => void;
}

/** Lists shown whole by choice, by their keys. */
export type Opened = ReadonlySet<string>;

/** Rows of a list shown before the rest is asked for. */
const FIRST = 8;

/** The whole pane. Names come from cells: they are always text, never markup. */
export function paneView(model: PaneModel, freshness: Freshness | null, opened: Opened, actions: Actions): TemplateResult {
  const isEmpty = model.cases.length + model.strays.length === 0;
  const isStale = freshness?.state === 'stale';
  return html`
    <div class="dp-bar">
      <h2>Cases in this workbook</h2>
      <button type="button" @click=${actions.recalculate}>Recalculate</button>
    </div>
    ${isStale || (freshness !== null && !isEmpty)
      ? html`<p class=${isStale ? 'dp-error' : 'dp-soft'} data-state=${freshness.state}>${freshness.words}</p>`
      : nothing}
    ${isEmpty && !isStale ? emptyView() : nothing}
    ${repeat(model.cases, ({ id }) => id, (view) => caseView(view, opened, actions))}
    ${model.strays.length > 0 ? straysView(model.strays, actions) : nothing}
  `;
}

/** The way to the parts of the pane below the cases; the pane is long where there is much to tell. */
export function partsView(parts: readonly { readonly title: string; readonly element: HTMLElement }[]): TemplateResult {
  const go = (element: HTMLElement) => (): void => {
    element.tabIndex = -1;
    element.focus({ preventScroll: true });
    element.scrollIntoView({ block: 'start' });
  };
  return html`${parts.map(({ title, element }) => html`<button type="button" @click=${go(element)}>${title}</button>`)}`;
}

function emptyView(): TemplateResult {
  return html`
    <section class="dp-case">
      <p>This workbook holds no formulas of Dutyproof yet. Begin below.</p>
    </section>
  `;
}

function caseView(view: CaseView, opened: Opened, actions: Actions): TemplateResult {
  const { id, cells, sheets, errors, findings } = view;
  return html`
    <section class="dp-case" aria-label=${`Case on ${sheets.join(', ')}`}>
      <h2>Case on <bdi>${sheets.join(', ')}</bdi></h2>
      ${errors.length > 0 ? list(`${id} errors`, errors, errorView, opened, actions) : nothing}
      ${view.search === null ? nothing : searchView(view.search)}
      ${view.seats === null ? nothing : planView(view, opened, actions)}
      ${findings.length > 0 ? findingsView(id, findings, opened, actions) : nothing}
      <details>
        <summary>Where it answers (${counted(cells.length, 'cell', 'cells')})</summary>
        <div class="dp-cells">${cells.map((cell) => cellButton(cell, actions))}</div>
        ${view.fingerprint === '' ? nothing : html`<p class="dp-soft">Fingerprint of the case: <code>${view.fingerprint}</code></p>`}
      </details>
    </section>
  `;
}

function searchView({ what, covered, needed, seconds, allowed, stop }: SearchView): TemplateResult {
  return html`
    <div class="dp-search">
      <p>Searching for ${what}.</p>
      <p class="dp-soft">
        ${covered === null ? nothing : html`${covered.toLocaleString('en-GB')} of ${counted(needed, 'seat', 'seats')} covered so far. `}
        ${counted(seconds, 'second', 'seconds')} of at most ${allowed.toLocaleString('en-GB')}.
      </p>
      ${stop === null ? nothing : html`<button type="button" @click=${stop}>Stop and take the best plan so far</button>`}
    </div>
  `;
}

function errorView(message: string): TemplateResult {
  return html`<li class="dp-error" dir="auto">${message}</li>`;
}

function planView(view: CaseView, opened: Opened, actions: Actions): TemplateResult {
  const { id, seats, priorities, proof, remarks, short, bottlenecks, remedies, fragile } = view;
  const { needed, covered } = seats!;
  const open = needed - covered;
  if (needed === 0) return html`<p>Nothing to cover yet: the tables name no duty that needs anyone.</p>`;
  return html`
    <p class="dp-total">
      <strong>${covered.toLocaleString('en-GB')}</strong>
      <span>of ${counted(needed, 'seat', 'seats')} covered</span>
      <span class="dp-pill ${open > 0 ? 'dp-short' : 'dp-good'}">${open > 0 ? `${open.toLocaleString('en-GB')} uncovered` : 'all covered'}</span>
    </p>
    <div class="dp-gauge" aria-hidden="true"><span style="width:${needed === 0 ? 100 : (100 * covered) / needed}%"></span></div>
    <p class="dp-soft">${proof}</p>
    ${remarks.map((remark) => html`<p>${remark}</p>`)}
    ${priorities.length > 0 ? prioritiesView(priorities) : nothing}
    ${section(`Short (${counted(short.length, 'duty', 'duties')})`, `${id} short`, short, shortView, opened, actions)}
    ${section('Why', `${id} why`, bottlenecks, bottleneckView, opened, actions)}
    ${section('The cheapest remedy', `${id} remedies`, remedies ?? [], lineView, opened, actions)}
    ${section('Whom the plan cannot lose', `${id} fragile`, fragile ?? [], fragileView, opened, actions)}
  `;
}

function prioritiesView(priorities: CaseView['priorities']): TemplateResult {
  return html`
    <table>
      <thead>
        <tr><th scope="col">Seats</th><th scope="col">Needed</th><th scope="col">Covered</th><th scope="col">Uncovered</th></tr>
      </thead>
      <tbody>
        ${priorities.map(
          ({ label, needed, covered }) => html`
            <tr><th scope="row">${label}</th><td>${needed}</td><td>${covered}</td><td>${needed - covered}</td></tr>
          `,
        )}
      </tbody>
    </table>
  `;
}

/** A titled list; nothing where it is empty. */
function section<T>(
  title: string,
  key: string,
  items: readonly T[],
  item: (item: T) => TemplateResult,
  opened: Opened,
  actions: Actions,
): TemplateResult | typeof nothing {
  return items.length === 0 ? nothing : html`<h3>${title}</h3>${list(key, items, item, opened, actions)}`;
}

function shortView({ duty, seats }: CaseView['short'][number]): TemplateResult {
  return html`
    <li class="dp-item dp-row">
      <span class="dp-name dp-clip" dir="auto">${duty}</span>
      <span class="dp-pill dp-short">${counted(seats, 'seat', 'seats')} short</span>
    </li>
  `;
}

function bottleneckView({ number, seats, reason }: CaseView['bottlenecks'][number]): TemplateResult {
  return html`
    <li class="dp-item">
      <div class="dp-row">
        <span class="dp-name">Bottleneck ${number}</span>
        <span class="dp-pill dp-short">${counted(seats, 'seat', 'seats')}</span>
      </div>
      <p class="dp-soft dp-clip" dir="auto">${reason}</p>
    </li>
  `;
}

function fragileView({ person, seats, duties }: NonNullable<CaseView['fragile']>[number]): TemplateResult {
  return html`
    <li class="dp-item">
      <div class="dp-row">
        <span class="dp-name dp-clip" dir="auto">${person}</span>
        <span class="dp-pill dp-short">${counted(seats, 'seat', 'seats')}</span>
      </div>
      <p class="dp-soft dp-clip" dir="auto">${duties}</p>
    </li>
  `;
}

function lineView(text: string): TemplateResult {
  return html`<li class="dp-item dp-clip" dir="auto">${text}</li>`;
}

function findingsView(id: string, findings: readonly FindingGroup[], opened: Opened, actions: Actions): TemplateResult {
  const total = findings.reduce((sum, { details }) => sum + details.length, 0);
  return html`
    <details>
      <summary>Findings (${total.toLocaleString('en-GB')})</summary>
      ${findings.map(
        ({ finding, details }) => html`
          <h3>${finding} (${details.length.toLocaleString('en-GB')})</h3>
          ${list(
            `${id} ${finding}`,
            details,
            (finding) => findingView(id, finding, actions),
            opened,
            actions,
          )}
        `,
      )}
    </details>
  `;
}

function findingView(cell: string, { table, row, detail }: FindingGroup['details'][number], actions: Actions): TemplateResult {
  return html`
    <li class="dp-item">
      ${row === null
        ? html`<span class="dp-soft">${table}</span>`
        : html`<button type="button" @click=${() => actions.jump(cell, table, row)}>${table}, row ${row}</button>`}
      <span class="dp-clip" dir="auto">${detail}</span>
    </li>
  `;
}

function straysView(strays: readonly CellError[], actions: Actions): TemplateResult {
  return html`
    <section class="dp-case" aria-label="Other errors">
      <h2>Other errors</h2>
      <ul>
        ${strays.map(
          (stray) => html`<li class="dp-error"><p dir="auto">${stray.message}</p><div class="dp-cells">${cellButton(stray, actions)}</div></li>`,
        )}
      </ul>
    </section>
  `;
}

function cellButton({ address, functionId }: CellView, actions: Actions): TemplateResult {
  return html`<button type="button" @click=${() => actions.select(address)}>${functionId} <bdi>${address}</bdi></button>`;
}

/** A list cut off after its first rows, with a button that shows the rest. */
function list<T>(key: string, items: readonly T[], item: (item: T) => TemplateResult, opened: Opened, actions: Actions): TemplateResult {
  const all = opened.has(key) || items.length <= FIRST + 1;
  return html`
    <ul>${(all ? items : items.slice(0, FIRST)).map(item)}</ul>
    ${all ? nothing : html`<button type="button" @click=${() => actions.showAll(key)}>Show all ${items.length.toLocaleString('en-GB')}</button>`}
  `;
}
