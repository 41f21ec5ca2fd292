// The worker in which cases are searched that are no flow. Loaded when the first such case appears.
import type { Highs } from 'highs';
import { runTask } from '../exact/tasks';
import type { FromWorker, ToWorker } from '../host/workerSearcher';

declare const self: {
  importScripts(script: string): void;
  postMessage(message: FromWorker): void;
  onmessage: ((event: { data: ToWorker }) => void) | null;
  /** Put there by the solver's script. */
  Module?: (options: { locateFile: (file: string) => string }) => Promise<Highs>;
};

/** Milliseconds between two messages about progress. */
const PACE = 200;

let loading: Promise<Highs> | null = null;

function load(): Promise<Highs> {
  self.importScripts('vendor/highs.js');
  return self.Module!({ locateFile: (file) => `vendor/${file}` });
}

async function work({ id, ...order }: ToWorker): Promise<FromWorker> {
  try {
    const highs = await (loading ??= load());
    let told = -Infinity;
    const answer = runTask(highs, order, (progress) => {
      if (performance.now() - told < PACE) return;
      told = performance.now();
      self.postMessage({ id, kind: 'progress', progress });
    });
    return { id, kind: 'answer', answer };
  } catch (error) {
    return { id, kind: 'failure', message: error instanceof Error ? error.message : String(error) };
  }
}

self.onmessage = ({ data }) => void work(data).then((message) => self.postMessage(message));
