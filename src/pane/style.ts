/** The pane's own dress. Colours are set once, for light and for dark; forced colours are left to the system. */
export const STYLE = `
.dp-pane {
  --dp-ground: #fbfaf7; --dp-card: #ffffff; --dp-ink: #23282b; --dp-soft: #565f64; --dp-line: #d9d5cb;
  --dp-good: #1f5a4c; --dp-good-ground: #e3efe9; --dp-short: #9c3b12; --dp-short-ground: #fbe9df; --dp-focus: #1d5fb8;
  position: relative; box-sizing: border-box; min-height: 100%; padding: 12px; overflow-wrap: anywhere;
  background: var(--dp-ground); color: var(--dp-ink); color-scheme: light dark;
  font: 14px/1.45 system-ui, 'Segoe UI', 'Noto Sans', sans-serif;
}
@media (prefers-color-scheme: dark) {
  .dp-pane {
    --dp-ground: #1b1e20; --dp-card: #24282b; --dp-ink: #e9e7e1; --dp-soft: #b3b7b5; --dp-line: #43494d;
    --dp-good: #86cfb8; --dp-good-ground: #1d3a33; --dp-short: #f3a77f; --dp-short-ground: #47291b; --dp-focus: #8fbdf5;
  }
}
.dp-pane *, .dp-pane *::before { box-sizing: border-box; }
.dp-pane h2 { margin: 0; font-size: 15px; line-height: 1.3; }
.dp-pane h3 { margin: 14px 0 4px; font-size: 13px; color: var(--dp-soft); font-weight: 600; }
.dp-pane p { margin: 4px 0; }
.dp-pane ul { margin: 0; padding: 0; list-style: none; }
.dp-bar { display: flex; gap: 8px; align-items: center; justify-content: space-between; margin-bottom: 10px; }
.dp-pane button {
  min-height: 28px; padding: 3px 10px; border: 1px solid var(--dp-line); border-radius: 4px;
  background: var(--dp-card); color: inherit; font: inherit; cursor: pointer;
}
.dp-bar button { flex: none; white-space: nowrap; }
.dp-pane button:hover { border-color: var(--dp-soft); }
.dp-pane :focus-visible { outline: 2px solid var(--dp-focus); outline-offset: 1px; }
.dp-case { margin: 0 0 14px; padding: 12px; border: 1px solid var(--dp-line); border-radius: 6px; background: var(--dp-card); }
.dp-total { display: flex; flex-wrap: wrap; gap: 0 10px; align-items: baseline; margin-top: 8px; }
.dp-total strong { font-size: 26px; line-height: 1.15; font-weight: 650; font-variant-numeric: tabular-nums; }
.dp-gauge { display: flex; height: 10px; margin: 6px 0 8px; border: 1px solid var(--dp-line); border-radius: 2px; overflow: hidden; background: var(--dp-short-ground); }
.dp-gauge span { background: var(--dp-good); }
.dp-pill { display: inline-block; padding: 1px 8px; border-radius: 3px; font-weight: 600; }
.dp-short { background: var(--dp-short-ground); color: var(--dp-short); }
.dp-good { background: var(--dp-good-ground); color: var(--dp-good); }
.dp-pane table { width: 100%; border-collapse: collapse; font-variant-numeric: tabular-nums; }
.dp-pane th, .dp-pane td { padding: 2px 0; text-align: right; font-weight: 400; border-bottom: 1px solid var(--dp-line); }
.dp-pane th:first-child, .dp-pane td:first-child { text-align: left; }
.dp-pane thead th { color: var(--dp-soft); font-size: 12px; }
.dp-item { padding: 6px 0; border-bottom: 1px solid var(--dp-line); }
.dp-item:last-child { border-bottom: 0; }
.dp-row { display: flex; gap: 8px; align-items: baseline; justify-content: space-between; }
.dp-row .dp-pill { flex: none; }
.dp-parts { position: sticky; top: 0; z-index: 1; display: flex; flex-wrap: wrap; gap: 4px; margin: -12px -12px 10px; padding: 8px 12px; background: var(--dp-ground); border-bottom: 1px solid var(--dp-line); }
.dp-parts:empty { display: none; }
.dp-pane .dp-parts button { min-height: 26px; padding: 1px 8px; font-size: 12.5px; }
.dp-case, .dp-pane button, .dp-pane input, .dp-pane select, .dp-pane summary { scroll-margin-top: 80px; }
.dp-soft { color: var(--dp-soft); font-size: 13px; }
.dp-name { font-weight: 600; unicode-bidi: isolate; }
.dp-clip { display: -webkit-box; -webkit-box-orient: vertical; -webkit-line-clamp: 7; overflow: hidden; }
.dp-error { padding: 8px 10px; margin: 8px 0 0; border-left: 4px solid var(--dp-short); background: var(--dp-short-ground); }
.dp-pane details { margin-top: 8px; }
.dp-pane summary { min-height: 24px; cursor: pointer; font-weight: 600; }
.dp-cells { display: flex; flex-wrap: wrap; gap: 6px; margin-top: 6px; }
.dp-pane .dp-cells button { padding: 2px 8px; font-size: 13px; max-width: 100%; }
.dp-caution { margin-top: 14px; padding-top: 8px; border-top: 1px solid var(--dp-line); color: var(--dp-soft); font-size: 12.5px; }
.dp-hidden { position: absolute; width: 1px; height: 1px; overflow: hidden; clip-path: inset(50%); white-space: nowrap; }
@media (forced-colors: active) {
  .dp-gauge span { background: Highlight; forced-color-adjust: none; }
  .dp-pill, .dp-error { border: 1px solid CanvasText; }
}
`;
