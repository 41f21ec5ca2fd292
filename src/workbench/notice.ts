/** A button of a notice. */
export interface NoticeAction {
  readonly label: string;
  readonly run: () => void;
}

/** The line under the bar that says what happened, and what can be done about it. */
export class Notice {
  readonly #element: HTMLElement;

  constructor(element: HTMLElement) {
    this.#element = element;
  }

  /** Shows sentences, which may hold what a file says: never as markup. */
  show(sentences: string | readonly string[], actions: readonly NoticeAction[] = []): void {
    const paragraph = document.createElement('p');
    paragraph.textContent = typeof sentences === 'string' ? sentences : sentences.join(' ');
    const buttons = [...actions, { label: 'Close', run: () => undefined }].map(({ label, run }) => {
      const button = document.createElement('button');
      button.type = 'button';
      button.textContent = label;
      button.addEventListener('click', () => {
        this.hide();
        run();
      });
      return button;
    });
    this.#element.replaceChildren(paragraph, ...buttons);
    this.#element.hidden = false;
  }

  hide(): void {
    this.#element.hidden = true;
    this.#element.replaceChildren();
  }
}
