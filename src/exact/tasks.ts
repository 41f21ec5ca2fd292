import type { Highs } from 'highs';
import type { Answers, Order, Progress, Task } from './answers';
import { bottlenecksBySearch } from './bottlenecks';
import { absencesBySearch, choicesBySearch, gainsBySearch } from './explain';
import { remediesBySearch } from './remedies';
import { search } from './search';

/**
 * Works on a task for as long as the Seconds of the case allow.
 *
 * @param onProgress called while a plan is sought, with every better one
 */
export function runTask<T extends Task>(
  highs: Highs,
  { task, kase, found }: Order<T>,
  onProgress: (progress: Progress) => void,
): Answers[T] {
  const end = performance.now() + 1000 * kase.seconds;
  const seconds = (): number => Math.max(0, (end - performance.now()) / 1000);
  const question = { highs, kase, found: found ?? { held: new Int32Array(), verdicts: [], moreSeats: 0, isComplete: false }, seconds };
  const makers: { [K in Task]: () => Answers[K] } = {
    plan: () => search(highs, kase, { seconds: kase.seconds, onProgress }),
    bottlenecks: () => bottlenecksBySearch(question),
    gains: () => gainsBySearch(question),
    choices: () => choicesBySearch(question),
    absences: () => absencesBySearch(question),
    remedies: () => remediesBySearch(question),
  };
  return makers[task]();
}
