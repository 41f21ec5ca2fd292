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
.dp-figure svg { display: block; width: 100%; max-width: 420px; height: auto; margin-top: 4px; }
.dp-line { stroke: var(--dp-soft); stroke-width: 1; opacity: 0.7; }
.dp-box { fill: var(--dp-good-ground); stroke: var(--dp-good); }
.dp-box-short { fill: var(--dp-short-ground); stroke: var(--dp-short); }
.dp-label { fill: var(--dp-ink); font-size: 11px; }
.dp-seats { display: flex; flex-wrap: wrap; gap: 3px; }
.dp-seat { width: 12px; height: 12px; border: 1.5px solid var(--dp-good); border-radius: 2px; background: var(--dp-good); }
.dp-empty { border: 1.5px dashed var(--dp-short); background: transparent; }
.dp-bars li { display: grid; grid-template-columns: 1fr auto; gap: 0 8px; padding: 3px 0; }
.dp-bar-name { -webkit-line-clamp: 1; }
.dp-bar-words { font-variant-numeric: tabular-nums; font-size: 13px; color: var(--dp-soft); }
.dp-meter { position: relative; grid-column: 1 / 3; height: 9px; }
.dp-meter span { position: absolute; inset: 0 auto 0 0; border-radius: 2px; }
.dp-room { border: 1px solid var(--dp-line); background: var(--dp-ground); }
.dp-fill { background: var(--dp-good); }
.dp-odd { background: var(--dp-short); }
@media (forced-colors: active) {
  .dp-fill, .dp-seat { background: CanvasText; forced-color-adjust: none; }
  .dp-empty { background: Canvas; border-color: CanvasText; }
  .dp-box, .dp-box-short { fill: Canvas; stroke: CanvasText; }
  .dp-label { fill: CanvasText; }
  .dp-line { stroke: CanvasText; }
}
`;
