import { Journal } from '../functions/journal';
import { FUNCTIONS } from '../functions/registry';
import { registerInExcel } from '../host/excel/register';
import { ExcelWorkbook } from '../host/excel/workbook';
import { mountPane } from '../pane/mount';

/** How long Office's script may take to say where it runs, in milliseconds: without a network it never does. */
const PATIENCE = 10_000;

const journal = new Journal();
registerInExcel(FUNCTIONS, journal);
void start();

async function start(): Promise<void> {
  const host = await hostOfPage();
  await pageIsRead();
  const root = document.getElementById('pane');
  if (root === null) return;
  if (host === 'Excel') mountPane(root, new ExcelWorkbook(), journal);
  else root.textContent = 'This page is the Dutyproof pane. Open it from Excel, where the add-in is installed.';
}

/** Our script runs in the head, before there is a body. */
async function pageIsRead(): Promise<void> {
  if (document.readyState !== 'loading') return;
  await new Promise((resolve) => document.addEventListener('DOMContentLoaded', resolve, { once: true }));
}

/** The name of the Office program around the page, or null where there is none. */
async function hostOfPage(): Promise<string | null> {
  if (typeof Office === 'undefined') return null;
  const late = new Promise<null>((resolve) => setTimeout(() => resolve(null), PATIENCE));
  const ready = Office.onReady().then(({ host }) => (host === null ? null : String(host)));
  return Promise.race([ready, late]);
}
