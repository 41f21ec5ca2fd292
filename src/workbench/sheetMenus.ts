import type { EngineModel, EngineZone } from '../host/workbench/engine';
import type { Menu, MenuItem } from './menu';

/** Opens our own menus on the sheet and on its tabs, where the engine's would open. */
export function listenForMenus(grid: HTMLElement, menu: Menu, model: () => EngineModel): void {
  grid.addEventListener(
    'contextmenu',
    (event) => {
      const { target } = event;
      if (!(target instanceof Element) || target.closest('.o-topbar-composer, input') !== null) return;
      event.preventDefault();
      const tab = target.closest<HTMLElement>('.o-sheet[data-id]');
      if (tab !== null) event.stopPropagation();
      // The engine selects what was clicked first.
      setTimeout(() => {
        const items = tab === null ? cellItems(model()) : tabItems(model(), tab);
        menu.open(items, event.clientX, event.clientY);
      }, 0);
    },
    { capture: true },
  );
}

function cellItems(model: EngineModel): MenuItem[] {
  const { getters } = model;
  const sheetId = getters.getActiveSheetId();
  const zones = getters.getSelectedZones();
  const zone = zones[zones.length - 1];
  const about = { sheetId, sheetName: getters.getSheetName(sheetId) };
  const rows = span(zone.top, zone.bottom);
  const columns = span(zone.left, zone.right);
  const insert = (dimension: 'ROW' | 'COL', position: 'before' | 'after', base: number, quantity: number): void => {
    model.dispatch('ADD_COLUMNS_ROWS', { ...about, dimension, position, base, quantity });
  };
  const remove = (dimension: 'ROW' | 'COL', elements: number[]): void => {
    model.dispatch('REMOVE_COLUMNS_ROWS', { ...about, dimension, elements });
  };
  return [
    { label: `Insert ${counted(rows, 'row')} above`, run: () => insert('ROW', 'before', zone.top, rows.length) },
    { label: `Insert ${counted(rows, 'row')} below`, run: () => insert('ROW', 'after', zone.bottom, rows.length) },
    { label: `Insert ${counted(columns, 'column')} to the left`, run: () => insert('COL', 'before', zone.left, columns.length) },
    { label: `Insert ${counted(columns, 'column')} to the right`, run: () => insert('COL', 'after', zone.right, columns.length) },
    { label: `Delete ${counted(rows, 'row')}`, run: () => remove('ROW', rows) },
    { label: `Delete ${counted(columns, 'column')}`, run: () => remove('COL', columns) },
    { label: 'Clear what is in the cells', run: () => clear(model, sheetId, zones) },
  ];
}

function clear(model: EngineModel, sheetId: string, zones: readonly EngineZone[]): void {
  model.dispatch('DELETE_UNFILTERED_CONTENT', { sheetId, target: zones });
}

function tabItems(model: EngineModel, tab: HTMLElement): MenuItem[] {
  const { getters } = model;
  const sheetId = tab.dataset.id ?? '';
  const sheetName = getters.getSheetName(sheetId);
  const ids = getters.getSheetIds();
  const visible = ids.filter((id) => getters.isSheetVisible(id));
  const isOnly = visible.length < 2;
  const rename = (): void => {
    tab.querySelector('.o-sheet-name')?.dispatchEvent(new MouseEvent('dblclick', { bubbles: true }));
  };
  const items: (MenuItem | false)[] = [
    { label: 'Rename', run: rename },
    { label: 'Duplicate', run: () => duplicate(model, sheetId) },
    visible[0] !== sheetId && { label: 'Move left', run: () => model.dispatch('MOVE_SHEET', { sheetId, delta: -1 }) },
    visible.at(-1) !== sheetId && { label: 'Move right', run: () => model.dispatch('MOVE_SHEET', { sheetId, delta: 1 }) },
    !isOnly && { label: 'Hide', run: () => model.dispatch('HIDE_SHEET', { sheetId }) },
    !isOnly && { label: 'Delete', run: () => model.dispatch('DELETE_SHEET', { sheetId, sheetName }) },
  ];
  const hidden = ids.filter((id) => !visible.includes(id));
  return [
    ...items.filter((item) => item !== false),
    ...hidden.map((id) => ({ label: `Show "${getters.getSheetName(id)}"`, run: () => model.dispatch('SHOW_SHEET', { sheetId: id }) })),
  ];
}

function duplicate(model: EngineModel, sheetId: string): void {
  const { getters } = model;
  const names = new Set(getters.getSheetIds().map((id) => getters.getSheetName(id).toLowerCase()));
  const base = getters.getSheetName(sheetId);
  let number = 2;
  while (names.has(`${base} ${number}`.toLowerCase())) number++;
  model.dispatch('DUPLICATE_SHEET', { sheetId, sheetIdTo: crypto.randomUUID(), sheetNameTo: `${base} ${number}` });
}

function span(from: number, to: number): number[] {
  return Array.from({ length: to - from + 1 }, (_, i) => from + i);
}

function counted({ length }: readonly number[], thing: string): string {
  return length === 1 ? thing : `${length} ${thing}s`;
}
