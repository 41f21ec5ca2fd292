import { render } from 'lit-html';
import type { Journal } from '../functions/journal';
import { NAMESPACE } from '../functions/registry';
import { onSearch } from '../functions/searches';
import { argumentAt } from '../desk/decide';
import { formatAddress, formatZone, parseAddress, parseZone } from '../host/address';
import type { OurCell, WorkbookPort } from '../host/port';
import { freshnessOf, type Freshness } from './freshness';
import { paneModel, spokenSummary } from './model';
import { STYLE } from './style';
import { paneView, partsView, type Actions } from './view';
import { CAUTION } from '../functions/caution';
import { HandOverPanel } from './handOver/panel';
import type { Panel } from './panel';
import { PANEL_STYLE } from './panelStyle';
import { PicturesPanel } from './pictures/panel';
import { StartPanel } from './start/panel';
import { WhatIfPanel } from './whatIf/panel';

/** Recalculations within this time are drawn once, in milliseconds. */
const CALM = 60;

const SECOND = 1000;

/**
 * Shows the pane in an element, in a page or in a shadow root, and keeps it up to date.
 *
 * @returns a function that takes the pane away again
 */
export function mountPane(root: HTMLElement, port: WorkbookPort, journal: Journal): () => void {
  const pane = new Pane(port, journal);
  const style = document.createElement('style');
  style.textContent = STYLE + PANEL_STYLE;
  root.replaceChildren(style, pane.element);
  pane.begin();
  return () => {
    pane.end();
    root.replaceChildren();
  };
}

/** The cases at a glance, and the panels below them. */
class Pane {
  readonly element = document.createElement('main');
  readonly #port: WorkbookPort;
  readonly #journal: Journal;
  readonly #parts = document.createElement('nav');
  readonly #body = document.createElement('div');
  readonly #live = document.createElement('p');
  readonly #caution = document.createElement('p');
  readonly #begin: StartPanel;
  readonly #panels: readonly Panel[];
  readonly #opened = new Set<string>();
  readonly #ends: (() => void)[] = [];
  #timer: ReturnType<typeof setTimeout> | undefined;
  #refreshes = 0;
  #ours: readonly OurCell[] = [];
  /** Null until the host has told. */
  #freshness: Freshness | null = null;

  constructor(port: WorkbookPort, journal: Journal) {
    [this.#port, this.#journal] = [port, journal];
    this.element.className = 'dp-pane';
    this.#live.className = 'dp-hidden';
    this.#live.setAttribute('role', 'status');
    this.#caution.className = 'dp-caution';
    this.#caution.textContent = CAUTION;
    this.#begin = new StartPanel(port, journal);
    this.#panels = [new WhatIfPanel(port, journal), new PicturesPanel(port, journal), new HandOverPanel(port, journal), this.#begin];
    this.#parts.className = 'dp-parts';
    this.#parts.setAttribute('aria-label', 'Parts of this pane');
    this.element.append(this.#parts, this.#body, ...this.#panels.map(({ element }) => element), this.#caution, this.#live);
  }

  begin(): void {
    const soon = (): void => {
      clearTimeout(this.#timer);
      this.#timer = setTimeout(() => void this.#refresh(), CALM);
    };
    // A search tells of its progress; its seconds are counted while it is under way.
    const clock = setInterval(() => {
      if (this.#body.querySelector('.dp-search') !== null) this.#draw();
    }, SECOND);
    this.#ends.push(this.#port.onRecalculated(soon), this.#journal.onRecord(soon), onSearch(soon), () => clearInterval(clock));
    this.#draw();
    soon();
  }

  end(): void {
    clearTimeout(this.#timer);
    this.#refreshes++;
    for (const end of this.#ends) end();
  }

  #draw(): void {
    const model = paneModel(this.#journal.calls());
    const actions: Actions = {
      recalculate: () => void this.#port.recalculate(),
      select: (address) => void this.#port.select(address),
      jump: (cell, table, row) => void jumpTo(this.#port, cell, table, row).catch(() => undefined),
      showAll: (key) => {
        this.#opened.add(key);
        this.#draw();
      },
    };
    render(paneView(model, this.#freshness, this.#opened, actions), this.#body);
    const spoken = this.#freshness?.state === 'stale' ? this.#freshness.words : spokenSummary(model);
    if (this.#live.textContent !== spoken) this.#live.textContent = spoken;
  }

  async #refresh(): Promise<void> {
    const turn = ++this.#refreshes;
    // A busy host (Excel, while a cell is being edited) does not tell its formulas: then nothing is forgotten.
    await forgetGone(this.#port, this.#journal).catch(() => undefined);
    if (turn !== this.#refreshes) return;
    // A host that cannot tell leaves what is known.
    this.#ours = await this.#port.ourCells().catch(() => this.#ours);
    this.#freshness = await freshnessOf(this.#port, this.#journal, this.#ours).catch(() => this.#freshness);
    if (turn !== this.#refreshes) return;
    this.#draw();
    // Where nothing is answered yet, to begin is what there is to do.
    const isFirst = this.#journal.calls().length === 0;
    const { element } = this.#begin;
    const isOnTop = this.#body.nextSibling === element;
    if (isFirst !== isOnTop) this.element.insertBefore(element, isFirst ? this.#body.nextSibling : this.#caution);
    for (const panel of this.#panels) {
      await panel.refresh(this.#ours);
      if (turn !== this.#refreshes) return;
    }
    const parts = [{ title: 'Cases', element: this.#body }, ...this.#panels.filter(({ element: { hidden } }) => !hidden)];
    render(partsView(parts), this.#parts);
  }
}

const TABLES: readonly string[] = ['Pairs', 'People', 'Duties', 'Rules', 'Current'];

/** Selects the first cell of a row of a table, where the formula in a cell names the table's range. */
async function jumpTo(port: WorkbookPort, cell: string, table: string, row: number): Promise<void> {
  const reference = await argumentAt(port, cell, TABLES.indexOf(table));
  const block = reference === null ? null : await port.read(reference);
  const at = block === null ? null : parseAddress(block.address);
  const zone = at === null ? null : parseZone(at.cell);
  if (at === null || zone === null) return;
  const top = zone.top + row - 1;
  await port.select(formatAddress({ sheet: at.sheet, cell: formatZone({ top, bottom: top, left: zone.left, right: zone.left }) }));
}

/** Forgets calls whose cell no longer holds a formula with that function. */
async function forgetGone(port: WorkbookPort, journal: Journal): Promise<void> {
  const addresses = [...new Set(journal.calls().map(({ address }) => address))].filter((address) => address !== '');
  const formulas = await port.formulasAt(addresses);
  const formulaAt = new Map(addresses.map((address, i) => [address, formulas[i]?.toUpperCase() ?? '']));
  journal.keepOnly(({ address, functionId }) => {
    const formula = formulaAt.get(address);
    return formula === undefined || formula.includes(`${NAMESPACE}.${functionId}(`);
  });
}
