/**
 * Rows over several workers with dynamic balance: a worker gets new rows as it finishes old ones. A worker
 * that crashes, hangs or runs out of memory takes no row with it: the one it was at is tried once more in
 * another worker, the others are given out again.
 *
 * @module
 */
import { Crew, type CrewOptions } from "./crew.ts";
import type { Done, NamedModel, Task } from "./serve.ts";

/** How a batch is spread. */
export interface PoolOptions<M extends NamedModel> extends CrewOptions<M> {
  /** Number of workers, at least 1. */
  readonly workers: number;
  /** Stops the batch: rows under way get {@linkcode LAST_WORD} to end. */
  readonly signal?: AbortSignal;
  /** Called for each row as it comes back, in any order. */
  readonly onDone: (done: Done) => void;
}

/** Time that a worker gets to end its row when the batch is stopped (milliseconds). */
export const LAST_WORD = 500;
/** Rows of a message at most: about 50 us of messaging over 16 rows of 100 us and more. */
const BATCH = 16;
/** Workers may end this often in a row while no row is to blame. */
const MOST_DEATHS = 3;

/**
 * Solves rows.
 *
 * @param tasks Rows in any order; each comes back once unless the batch is stopped.
 * @param options Workers, models and what to do with a finished row.
 * @throws {Error} if a worker cannot start, or what `onDone` throws.
 */
export function solveRows<M extends NamedModel>(
  tasks: readonly Task[],
  options: PoolOptions<M>,
): Promise<void> {
  const { signal, onDone } = options, count = Math.min(options.workers, tasks.length);
  const again: Task[] = [], struck = new Set<number>(), crews = new Set<Crew<M>>();
  let next = 0, open = tasks.length, deaths = 0, ended = false;
  const { promise, resolve, reject } = Promise.withResolvers<void>();

  const end = (error?: unknown) => {
    if (ended) return;
    ended = true;
    signal?.removeEventListener("abort", stop);
    for (const crew of crews) crew.dismiss();
    crews.clear();
    error === undefined ? resolve() : reject(error);
  };
  const stop = () => {
    for (const crew of crews) crew.askToStop();
    if ([...crews].every((crew) => crew.held.size === 0)) end();
    else setTimeout(end, LAST_WORD);
  };
  const settle = (done: Done) => {
    if (ended) return;
    try {
      onDone(done);
    } catch (error) {
      return end(error);
    }
    if (--open === 0) end();
  };
  const feed = (crew: Crew<M>) => {
    while (!signal?.aborted && crew.held.size <= BATCH / 2) {
      const retried = again.shift();
      if (retried) {
        crew.give([retried]);
        continue;
      }
      const share = Math.min(BATCH, Math.ceil((tasks.length - next) / (4 * count)));
      if (share === 0) return;
      crew.give(tasks.slice(next, next + share));
      next += share;
    }
  };
  const start = () => {
    const crew: Crew<M> = new Crew(options, {
      ready: () => feed(crew),
      done: (done, idle) => {
        deaths = 0;
        if (!signal?.aborted) feed(crew); // first: the worker need not wait for what follows
        done.forEach(settle);
        if (signal?.aborted && idle && [...crews].every((c) => c.idle)) end();
      },
      lost: (why, atWork) => {
        crews.delete(crew);
        if (!crew.started) return end(new Error(`Cannot start a worker as ${why}`));
        for (const task of crew.held.values()) if (task !== atWork) again.push(task);
        if (atWork === undefined && ++deaths >= MOST_DEATHS) {
          return end(new Error(`Cannot keep a worker as it must not end between rows: ${why}`));
        }
        const twice = atWork !== undefined && struck.has(atWork.index);
        if (atWork && !twice) again.push(atWork);
        if (atWork) struck.add(atWork.index);
        if (twice) settle({ index: atWork.index, error: `${why}, twice` });
        if (signal?.aborted) {
          if ([...crews].every((c) => c.idle)) end();
        } else if (!ended) {
          start();
          for (const c of crews) if (c.started) feed(c);
        }
      },
    });
    crews.add(crew);
  };

  if (count === 0 || signal?.aborted) end();
  else {
    signal?.addEventListener("abort", stop);
    for (let i = 0; i < count; i++) start();
  }
  return promise;
}
