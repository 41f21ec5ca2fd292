import type { Answers, Order, Progress, Task } from '../exact/answers';
import type { Run, Searcher } from '../functions/searches';

/** What is sent to the worker. */
export type ToWorker = Order & { readonly id: number };

/** What the worker sends. */
export type FromWorker =
  | { readonly id: number; readonly kind: 'progress'; readonly progress: Progress }
  | { readonly id: number; readonly kind: 'answer'; readonly answer: Answers[Task] }
  | { readonly id: number; readonly kind: 'failure'; readonly message: string };

interface Job {
  readonly message: ToWorker;
  readonly onProgress: (progress: Progress) => void;
  readonly resolve: (answer: Answers[Task]) => void;
  readonly reject: (error: Error) => void;
}

/** How far a worker may run beyond the seconds of its case before it is ended from outside. */
const GRACE = 5;

/**
 * Searches in a worker, one task after the other. The worker is begun with the first task; a task that
 * is dropped while it runs ends the worker with it, since a search in full swing hears nothing.
 */
export class WorkerSearcher implements Searcher {
  readonly #script: string;
  readonly #queue: Job[] = [];
  #worker: Worker | null = null;
  #running: Job | null = null;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #nextId = 1;

  /** @param script address of the worker's script */
  constructor(script: string) {
    this.#script = script;
  }

  start<T extends Task>(order: Order<T>, onProgress: (progress: Progress) => void): Run<Answers[T]> {
    const id = this.#nextId++;
    const done = new Promise<Answers[T]>((resolve, reject) => {
      this.#queue.push({ message: { ...order, id }, onProgress, resolve: resolve as Job['resolve'], reject });
    });
    this.#next();
    return { done, drop: () => this.#drop(id) };
  }

  #next(): void {
    if (this.#running !== null) return;
    const job = this.#queue.shift();
    if (job === undefined) return;
    this.#running = job;
    this.#worker ??= this.#begin();
    this.#timer = setTimeout(() => this.#fail('it took longer than allowed and was ended'), 1000 * (job.message.kase.seconds + GRACE));
    this.#worker.postMessage(job.message);
  }

  #begin(): Worker {
    const worker = new Worker(this.#script);
    worker.onmessage = ({ data }: MessageEvent<FromWorker>) => {
      if (this.#worker === worker && data.id === this.#running?.message.id) this.#hear(data);
    };
    worker.onerror = (event) => {
      event.preventDefault();
      if (this.#worker === worker) this.#fail(event.message === '' ? `${this.#script} could not be loaded` : event.message);
    };
    return worker;
  }

  #hear(data: FromWorker): void {
    const job = this.#running!;
    if (data.kind === 'progress') {
      job.onProgress(data.progress);
      return;
    }
    this.#finish();
    if (data.kind === 'answer') job.resolve(data.answer);
    else job.reject(new Error(data.message));
    this.#next();
  }

  #drop(id: number): void {
    const at = this.#queue.findIndex(({ message }) => message.id === id);
    if (at !== -1) this.#queue.splice(at, 1);
    if (this.#running?.message.id !== id) return;
    this.#end();
    this.#next();
  }

  #fail(message: string): void {
    const job = this.#running;
    this.#end();
    job?.reject(new Error(message));
    this.#next();
  }

  #finish(): void {
    clearTimeout(this.#timer);
    this.#running = null;
  }

  #end(): void {
    this.#finish();
    this.#worker?.terminate();
    this.#worker = null;
  }
}
