import { html, render, type TemplateResult } from 'lit-html';
import type { Journal } from '../functions/journal';
import { Busy } from '../functions/searches';
import type { Solved } from '../functions/solved';
import type { OurCell, WorkbookPort } from '../host/port';

/** What the focus can stand on. */
const FOCUSABLE = 'button, input, select, summary';

/** A part of the pane that draws itself, looks at the workbook and acts on it. */
export abstract class Panel {
  readonly title: string;
  readonly element: HTMLElement;
  protected readonly port: WorkbookPort;
  protected readonly journal: Journal;
  /** Cells with formulas of ours, as last found. */
  protected ours: readonly OurCell[] = [];
  /** True while an action is carried out; its buttons wait. */
  protected isBusy = false;
  #said = '';
  /** The sheets there were when it was said. */
  #sheets = '';

  constructor(title: string, port: WorkbookPort, journal: Journal) {
    this.title = title;
    this.port = port;
    this.journal = journal;
    this.element = document.createElement('section');
    this.element.className = 'dp-case';
    this.element.setAttribute('aria-label', title);
  }

  /**
   * Looks at the workbook and draws anew; called after every recalculation.
   * @param ours all cells with formulas of ours, as they were found just now
   */
  async refresh(ours: readonly OurCell[]): Promise<void> {
    this.ours = ours;
    // What was said of sheets that have changed since, by undo or by another file, is past.
    if (this.#said !== '' && !this.isBusy && (await this.#sheetsNow()) !== this.#sheets) this.#said = '';
    // A busy host (Excel, while a cell is being edited) tells nothing: what is drawn stays.
    await this.look().catch(() => undefined);
    this.draw();
  }

  /** Reads what the view needs and neither the journal nor `ours` tells. */
  protected look(): Promise<void> {
    return Promise.resolve();
  }

  protected abstract view(): TemplateResult;

  /** Draws anew. The focus stays where it is, or goes to what stood before it if that is gone. */
  protected draw(): void {
    const inFocus = (): Element | null => (this.element.getRootNode() as Document | ShadowRoot).activeElement;
    const focused = inFocus();
    const places = this.element.contains(focused) ? [...this.element.querySelectorAll<HTMLElement>(FOCUSABLE)] : [];
    render(html`${this.view()}<p role="status" class="dp-said" dir="auto">${this.#said}</p>`, this.element);
    if (places.length === 0 || inFocus() === focused) return;
    const at = places.findIndex((place) => place === focused);
    const left = [...places.slice(0, at + 1).reverse(), ...places.slice(at + 1)].filter(({ isConnected }) => isConnected);
    left[0]?.focus({ preventScroll: true });
  }

  /** A handler that carries a step out, one at a time, and says how it went. */
  protected act(step: () => Promise<string>): () => Promise<void> {
    return async () => {
      if (this.isBusy) return;
      this.isBusy = true;
      this.#said = 'Working …';
      this.draw();
      await painted();
      try {
        this.#said = await step();
      } catch (error) {
        this.#said = error instanceof Busy ? 'An answer is still being searched for. Press again when it is there.' : inWords(error);
      }
      this.#sheets = await this.#sheetsNow();
      this.isBusy = false;
      await this.refresh(await this.port.ourCells().catch(() => this.ours));
    };
  }

  async #sheetsNow(): Promise<string> {
    const names = await this.port.sheetNames().catch(() => null);
    return names === null ? this.#sheets : JSON.stringify(names);
  }

  /** A button that waits while another action is carried out; disabled it would lose the focus. */
  protected button(label: string, step: () => Promise<string>): TemplateResult {
    return html`<button type="button" aria-disabled=${this.isBusy ? 'true' : 'false'} @click=${this.act(step)}><bdi>${label}</bdi></button>`;
  }
}

/** Resolves when the page has had time to paint: a step may keep it busy for a second or two. */
function painted(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, FRAME));
}

/** Milliseconds within which a page paints what has changed. */
const FRAME = 20;

/** A case whose plan is at hand, with the cell its first formula stands in. */
export interface LiveCase {
  readonly solved: Solved;
  readonly address: string;
}

/** The cases alive in the workbook whose plan is known, by the address of their first cell. */
export function liveCases(journal: Journal): LiveCase[] {
  const found = new Map<Solved, string>();
  for (const { solved, address } of journal.calls()) {
    if (solved === null || !hasPlan(solved)) continue;
    const known = found.get(solved);
    if (known === undefined || compare(address, known) < 0) found.set(solved, address);
  }
  return [...found].map(([solved, address]) => ({ solved, address })).sort((a, b) => compare(a.address, b.address));
}

function compare(one: string, other: string): number {
  return one.localeCompare(other, 'en', { numeric: true });
}

function hasPlan(solved: Solved): boolean {
  try {
    return solved.isAtHand('plan') && solved.outcome.plan.needed >= 0;
  } catch {
    return false;
  }
}

function inWords(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
