const NARROWEST = 260;
/** The sheet keeps at least this much. */
const SHEET = 320;
const STEP = 24;

/** Lets the person move the line between the sheet and the pane, by pointer or by arrow keys. */
export function makeDivider(divider: HTMLElement, pane: HTMLElement): void {
  const resize = (width: number): void => {
    const widest = Math.max(NARROWEST, innerWidth - SHEET);
    const chosen = Math.round(Math.max(NARROWEST, Math.min(width, widest)));
    pane.style.width = `${chosen}px`;
    divider.setAttribute('aria-valuemin', String(NARROWEST));
    divider.setAttribute('aria-valuemax', String(widest));
    divider.setAttribute('aria-valuenow', String(chosen));
    // The engine measures its room anew when the window changes.
    window.dispatchEvent(new Event('resize'));
  };
  divider.addEventListener('pointerdown', (event) => {
    event.preventDefault();
    divider.setPointerCapture(event.pointerId);
    divider.focus();
  });
  divider.addEventListener('pointermove', (event) => {
    if (divider.hasPointerCapture(event.pointerId)) resize(innerWidth - event.clientX - divider.offsetWidth / 2);
  });
  divider.addEventListener('keydown', (event) => {
    const step = { ArrowLeft: STEP, ArrowRight: -STEP }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    resize(pane.offsetWidth + step);
  });
  resize(pane.offsetWidth);
}
