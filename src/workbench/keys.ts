/** What the shortcuts of the page do. */
export interface KeyActions {
  readonly open: () => void;
  readonly save: () => void;
  /** Moves the focus to the next part of the page. */
  readonly nextPart: () => void;
}

/** Shortcuts of the engine for what this page does not offer: panels, pictures, links, tables, printing. */
const NOT_OFFERED = new Set(['f', 'h', 'k', 'p']);

/** Listens for the page's own shortcuts before the engine does. To be called before the engine is drawn. */
export function listenForKeys({ open, save, nextPart }: KeyActions): void {
  window.addEventListener(
    'keydown',
    (event) => {
      const key = event.key.toLowerCase();
      const isCommand = (event.ctrlKey || event.metaKey) && !event.altKey;
      const action = event.key === 'F6' ? nextPart : !isCommand || event.shiftKey ? undefined : key === 's' ? save : key === 'o' ? open : undefined;
      if (action !== undefined) {
        event.preventDefault();
        event.stopImmediatePropagation();
        action();
      } else if ((isCommand && !event.shiftKey && NOT_OFFERED.has(key)) || (event.altKey && key === 't')) {
        // The browser's own meaning of these is left to it.
        event.stopImmediatePropagation();
      }
    },
    { capture: true },
  );
}
