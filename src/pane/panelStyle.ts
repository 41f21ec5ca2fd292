/** The dress of the panels; colours are those of the pane. */
export const PANEL_STYLE = `
.dp-case[hidden] { display: none; }
.dp-said { color: var(--dp-good); font-weight: 600; }
.dp-said:empty { display: none; }
.dp-search { margin-top: 8px; padding: 8px 10px; border-left: 4px solid var(--dp-focus); background: var(--dp-ground); }
.dp-field { display: block; margin: 8px 0; }
.dp-field span { display: block; font-size: 13px; color: var(--dp-soft); }
.dp-pane select, .dp-pane input {
  width: 100%; min-height: 28px; padding: 3px 6px; border: 1px solid var(--dp-soft); border-radius: 4px;
  background: var(--dp-card); color: inherit; font: inherit;
}
.dp-moves { margin: 4px 0 4px 20px; padding: 0; }
.dp-pane .dp-item > button { margin-left: 6px; padding: 1px 8px; min-height: 24px; font-size: 13px; }
.dp-figure { margin: 10px 0; }
.dp-figure figcaption { font-size: 13px; color: var(--dp-soft); }
.dp-knot { display: grid; grid-template-columns: minmax(0, 1fr) 40px minmax(0, 1fr); margin: 6px 0; }
.dp-side { display: flex; flex-direction: column; justify-content: space-around; }
.dp-box {
  height: var(--dp-box); padding: 2px 5px; overflow: hidden; border: 1px solid var(--dp-good); border-radius: 4px;
  background: var(--dp-good-ground); font-size: 12.5px; line-height: 16px;
}
.dp-box .dp-clip { -webkit-line-clamp: 3; }
.dp-box .dp-soft { font-size: 12.5px; }
.dp-box-short { border-color: var(--dp-short); background: var(--dp-short-ground); }
.dp-knot line { stroke: var(--dp-soft); }
.dp-knot .dp-held { stroke: var(--dp-good); stroke-width: 3.5; }
.dp-seat { display: inline-block; margin: 3px 3px 0 0; width: 11px; height: 11px; border: 1.5px solid var(--dp-good); border-radius: 2px; background: var(--dp-good); }
.dp-striped { background: repeating-linear-gradient(45deg, var(--dp-good) 0 2px, transparent 2px 4px); }
.dp-empty { border: 1.5px dashed var(--dp-short); background: transparent; }
.dp-bars li { display: grid; grid-template-columns: 1fr auto; gap: 0 8px; padding: 3px 0; }
.dp-bar-name { -webkit-line-clamp: 1; }
.dp-bar-words { font-variant-numeric: tabular-nums; font-size: 13px; color: var(--dp-soft); }
.dp-meter { position: relative; grid-column: 1 / 3; height: 9px; margin: 3px 0; }
.dp-meter span { position: absolute; inset: 0 auto 0 0; border-radius: 2px; }
.dp-room { border: 1px solid var(--dp-line); background: var(--dp-ground); }
.dp-fill { background: var(--dp-good); }
.dp-odd { background: var(--dp-short); }
.dp-meter .dp-mark { inset: -3px auto -3px 0; border-right: 2px solid var(--dp-ink); border-radius: 0; }
.dp-wide { grid-column: 1 / 3; }
@media (forced-colors: active) {
  .dp-fill, .dp-seat { background: CanvasText; border-color: CanvasText; forced-color-adjust: none; }
  .dp-striped { background: repeating-linear-gradient(45deg, CanvasText 0 2px, Canvas 2px 4px); }
  .dp-empty { background: Canvas; }
  .dp-knot line, .dp-knot .dp-held { stroke: CanvasText; }
}
`;
