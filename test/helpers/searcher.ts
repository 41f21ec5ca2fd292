import loadHighs from 'highs';
import type { Answers, Order, Task } from '../../src/exact/answers';
import { runTask } from '../../src/exact/tasks';
import type { Run, Searcher } from '../../src/functions/searches';

const highs = await loadHighs();

/** Searches in this thread, a turn later; what is dropped before its turn is never begun. */
export class TestSearcher implements Searcher {
  /** Tasks begun, in order. */
  readonly begun: Task[] = [];
  /** Tasks dropped before or while they were worked on. */
  dropped = 0;

  start<T extends Task>(order: Order<T>): Run<Answers[T]> {
    let isDropped = false;
    const done = new Promise<Answers[T]>((resolve, reject) => {
      setTimeout(() => {
        if (isDropped) return;
        this.begun.push(order.task);
        try {
          resolve(runTask(highs, structuredClone(order), () => undefined));
        } catch (error) {
          reject(error instanceof Error ? error : new Error(String(error)));
        }
      });
    });
    const drop = (): void => {
      isDropped = true;
      this.dropped++;
    };
    return { done, drop };
  }
}
