import { Journal } from '../functions/journal';
import { FUNCTIONS } from '../functions/registry';
import { provideSearcher } from '../functions/searches';
import { WorkerSearcher } from '../host/workerSearcher';
import { registerInExcel } from '../host/excel/register';
import { ExcelWorkbook } from '../host/excel/workbook';
import { mountPane } from '../pane/mount';

/** Milliseconds until the page says that it waits for Office's script, which without a network never answers. */
const PATIENCE = 10_000;

const ELSEWHERE = 'This page is the Dutyproof pane. Open it from Excel, where the add-in is installed.';
const WAITING =
  'Excel has not answered yet. If this stays, check the network connection, then close this pane and open it again.';

const journal = new Journal();
provideSearcher(new WorkerSearcher('search.js'));
registerInExcel(FUNCTIONS, journal);
void start();

async function start(): Promise<void> {
  await pageIsRead();
  const root = document.getElementById('pane');
  if (root === null) return;
  const waiting = setTimeout(() => (root.textContent = WAITING), PATIENCE);
  const host = await hostOfPage();
  clearTimeout(waiting);
  if (host === 'Excel') mountPane(root, new ExcelWorkbook(), journal);
  else root.textContent = ELSEWHERE;
}

/** Our script runs in the head, before there is a body. */
async function pageIsRead(): Promise<void> {
  if (document.readyState !== 'loading') return;
  await new Promise((resolve) => document.addEventListener('DOMContentLoaded', resolve, { once: true }));
}

/** The name of the Office program around the page, null where there is none; waits as long as Office does. */
async function hostOfPage(): Promise<string | null> {
  if (typeof Office === 'undefined') return null;
  const { host } = await Office.onReady();
  return host === null ? null : String(host);
}
