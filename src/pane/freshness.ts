import type { Journal } from '../functions/journal';
import type { OurCell, WorkbookPort } from '../host/port';
import { counted } from './words';

/** Whether what the pane shows is what the tables say now. */
export interface Freshness {
  /** `fresh`: it is; `stale`: it may be out of date. */
  readonly state: 'fresh' | 'stale';
  /** The same in a sentence, with what to do about it. */
  readonly words: string;
}

/** Looks at what has answered and what the host tells of its calculation. */
export async function freshnessOf(port: WorkbookPort, journal: Journal, ours: readonly OurCell[]): Promise<Freshness> {
  const { isManual, isPending } = await port.calculation();
  const silent = silentCells(journal, ours);
  if (isPending === true) return stale('Something has changed that is not calculated yet');
  // Where the host does not tell, answers to a workbook calculated by hand are as old as the last asking.
  if (isManual && isPending === null) return stale('This workbook is calculated only when someone asks');
  if (silent > 0) return stale(`${counted(silent, 'formula has', 'formulas have')} not been calculated since this workbook was opened or rows were moved`);
  return { state: 'fresh', words: isManual ? 'Up to date. This workbook is calculated only when someone asks.' : 'Up to date.' };
}

function stale(why: string): Freshness {
  return { state: 'stale', words: `${why}: what stands here may be out of date. Press Recalculate.` };
}

/** Cells with a formula of ours of which no answer is known. */
function silentCells(journal: Journal, ours: readonly OurCell[]): number {
  const answered = new Set(journal.calls().map(({ address }) => address));
  // A host that does not tell addresses leaves nothing to compare.
  return answered.has('') ? 0 : ours.filter(({ address }) => !answered.has(address)).length;
}
