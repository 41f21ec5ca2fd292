/** One line of a menu. */
export interface MenuItem {
  readonly label: string;
  readonly run: () => void;
}

/** A menu at the pointer, in an element with the attribute `popover`. */
export class Menu {
  readonly #element: HTMLElement;
  /** Takes the focus back when the menu closes. */
  readonly #leave: () => void;

  constructor(element: HTMLElement, leave: () => void) {
    this.#element = element;
    this.#leave = leave;
    element.addEventListener('keydown', (event) => this.#onKey(event));
    element.addEventListener('toggle', (event) => {
      if (event.newState === 'closed' && element.contains(document.activeElement)) leave();
    });
  }

  /** Opens the menu with its upper left corner at a point of the window, or as near as it fits. */
  open(items: readonly MenuItem[], x: number, y: number): void {
    this.#element.replaceChildren(...items.map((item) => this.#button(item)));
    this.#element.showPopover();
    const { width, height } = this.#element.getBoundingClientRect();
    this.#element.style.left = `${Math.max(4, Math.min(x, innerWidth - width - 4))}px`;
    this.#element.style.top = `${Math.max(4, Math.min(y, innerHeight - height - 4))}px`;
    this.#buttons()[0]?.focus();
  }

  #button({ label, run }: MenuItem): HTMLButtonElement {
    const button = document.createElement('button');
    button.type = 'button';
    button.setAttribute('role', 'menuitem');
    button.textContent = label;
    button.addEventListener('click', () => {
      this.#element.hidePopover();
      this.#leave();
      run();
    });
    return button;
  }

  #buttons(): HTMLButtonElement[] {
    return [...this.#element.querySelectorAll('button')];
  }

  #onKey(event: KeyboardEvent): void {
    const buttons = this.#buttons();
    const at = buttons.findIndex((button) => button === document.activeElement);
    const steps: Record<string, number> = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: -1 };
    const next = steps[event.key];
    event.stopPropagation();
    if (event.key === 'Tab') this.#element.hidePopover();
    if (next === undefined) return;
    event.preventDefault();
    buttons.at(next % buttons.length)?.focus();
  }
}
