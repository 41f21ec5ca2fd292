import { render } from 'lit-html';
import type { Journal } from '../functions/journal';
import { NAMESPACE } from '../functions/registry';
import { onSearch } from '../functions/searches';
import type { WorkbookPort } from '../host/port';
import { paneModel, spokenSummary } from './model';
import { STYLE } from './style';
import { paneView, type Actions } from './view';

/** Recalculations within this time are drawn once, in milliseconds. */
const CALM = 60;

const SECOND = 1000;

/**
 * Shows the pane in an element, in a page or in a shadow root, and keeps it up to date.
 *
 * @returns a function that takes the pane away again
 */
export function mountPane(root: HTMLElement, port: WorkbookPort, journal: Journal): () => void {
  const style = document.createElement('style');
  style.textContent = STYLE;
  const pane = document.createElement('main');
  pane.className = 'dp-pane';
  const body = document.createElement('div');
  const live = document.createElement('p');
  live.className = 'dp-hidden';
  live.setAttribute('role', 'status');
  pane.append(body, live);
  root.replaceChildren(style, pane);

  const opened = new Set<string>();
  let timer: ReturnType<typeof setTimeout> | undefined;
  let refreshes = 0;
  const actions: Actions = {
    recalculate: () => void port.recalculate(),
    select: (address) => void port.select(address),
    showAll: (key) => {
      opened.add(key);
      draw();
    },
  };

  const draw = (): void => {
    const model = paneModel(journal.calls());
    render(paneView(model, opened, actions), body);
    const spoken = spokenSummary(model);
    if (live.textContent !== spoken) live.textContent = spoken;
  };
  const refresh = async (): Promise<void> => {
    const turn = ++refreshes;
    // A busy host (Excel, while a cell is being edited) does not tell its formulas: then nothing is forgotten.
    await forgetGone(port, journal).catch(() => undefined);
    if (turn === refreshes) draw();
  };
  const soon = (): void => {
    clearTimeout(timer);
    timer = setTimeout(() => void refresh(), CALM);
  };

  // A search tells of its progress; its seconds are counted while it is under way.
  const clock = setInterval(() => {
    if (body.querySelector('.dp-search') !== null) draw();
  }, SECOND);
  const ends = [port.onRecalculated(soon), journal.onRecord(soon), onSearch(soon), () => clearInterval(clock)];
  draw();
  soon();
  return () => {
    clearTimeout(timer);
    refreshes++;
    for (const end of ends) end();
    root.replaceChildren();
  };
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
