/**
 * Rows over several workers with dynamic balance: a worker gets new rows as it finishes old ones, in
 * messages small enough to keep all workers busy to the end.
 *
 * @module
 */
import type { Done, FromWorker, NamedModel, Task } from "./serve.ts";

/** How a batch is spread. */
export interface PoolOptions<M extends NamedModel> {
  /** Number of workers, at least 1. */
  readonly workers: number;
  /** Compiled models of all rows. */
  readonly models: readonly M[];
  /** Module of the worker. @default the row solver's worker */
  readonly worker?: URL;
  /** Stops the batch; rows under way are given up. */
  readonly signal?: AbortSignal;
  /** Called for each row as it comes back, in any order. */
  readonly onDone: (done: Done) => void;
}

/** Messages a worker holds at once: one at work, one waiting. */
const IN_FLIGHT = 2;
/** Rows of a message at most: about 50 us of messaging over 16 rows of 100 us and more. */
const BATCH = 16;

/**
 * Solves rows.
 *
 * @param tasks Rows in any order; each comes back once unless the batch is stopped.
 * @param options Workers, models and what to do with a finished row.
 * @throws {Error} if a worker cannot start.
 */
export function solveRows<M extends NamedModel>(
  tasks: readonly Task[],
  options: PoolOptions<M>,
): Promise<void> {
  const { models, signal, onDone, worker: url = new URL("./worker.ts", import.meta.url) } = options;
  const count = Math.min(options.workers, tasks.length);
  let next = 0, open = tasks.length;
  const running = new Set<Worker>();
  const { promise, resolve, reject } = Promise.withResolvers<void>();

  const finish = (error?: unknown) => {
    for (const worker of running) worker.terminate();
    running.clear();
    signal?.removeEventListener("abort", stop);
    error === undefined ? resolve() : reject(error);
  };
  const stop = () => finish();
  const settle = (done: Done) => {
    onDone(done);
    if (--open === 0) finish();
  };

  const start = () => {
    const worker = new Worker(url, { type: "module" });
    const held = new Map<number, Task>();
    let ready = false, messages = 0;
    const feed = () => {
      while (messages < IN_FLIGHT && next < tasks.length) {
        const share = Math.ceil((tasks.length - next) / (2 * IN_FLIGHT * count));
        const batch = tasks.slice(next, next + Math.min(BATCH, share));
        next += batch.length;
        messages++;
        for (const task of batch) held.set(task.index, task);
        worker.postMessage({ tasks: batch });
      }
    };
    worker.onmessage = ({ data }: MessageEvent<FromWorker>) => {
      if (!running.has(worker)) return;
      if ("ready" in data) ready = true;
      else {
        messages--;
        for (const done of data.done) held.delete(done.index);
        feed(); // before the results are dealt with: the worker need not wait for that
        try {
          for (const done of data.done) settle(done);
        } catch (error) {
          finish(error);
        }
        return;
      }
      feed();
    };
    worker.onerror = (event) => {
      event.preventDefault();
      if (!running.delete(worker)) return;
      worker.terminate();
      if (!ready) return finish(new Error(`Cannot start a worker as ${event.message}`));
      if (next < tasks.length) start();
      for (const index of held.keys()) settle({ index, error: `worker ended: ${event.message}` });
    };
    running.add(worker);
    worker.postMessage({ models });
  };

  if (count === 0 || signal?.aborted) finish();
  else {
    signal?.addEventListener("abort", stop);
    for (let i = 0; i < count; i++) start();
  }
  return promise;
}
