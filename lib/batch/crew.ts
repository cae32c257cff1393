/**
 * One worker of a batch as the pool sees it: what it holds, what it is at, and when it is lost.
 *
 * @module
 */
import { Worker } from "node:worker_threads";
import { BOARD, type Done, type FromWorker, type NamedModel, type Task } from "./serve.ts";

/** What all workers of a batch have in common. */
export interface CrewOptions<M extends NamedModel> {
  /** Compiled models of all rows. */
  readonly models: readonly M[];
  /** Module of the worker. @default the row solver's worker */
  readonly worker?: URL;
  /** Longest time of one row (seconds). @default 300 */
  readonly rowLimit?: number;
  /** Memory of one worker (MiB). @default 1024 */
  readonly memoryLimit?: number;
}

/** What a worker reports. */
export interface CrewEvents {
  /** It has loaded. */
  readonly ready: () => void;
  /** Rows are done; `idle` if it holds no more. */
  readonly done: (done: readonly Done[], idle: boolean) => void;
  /** It ended, or was ended; `atWork` is the row it was at. */
  readonly lost: (why: string, atWork: Task | undefined) => void;
}

/** Longest time of one row unless told otherwise (seconds). */
export const ROW_LIMIT = 300;
/** Memory of one worker unless told otherwise (MiB). */
export const MEMORY_LIMIT = 1024;
const LOADING = 60_000; // milliseconds in which a worker must have loaded

/** A worker. */
export class Crew<M extends NamedModel> {
  /** Rows it was given and did not give back. */
  readonly held: Map<number, Task> = new Map();
  readonly #worker: Worker;
  readonly #board: Int32Array<SharedArrayBuffer>;
  readonly #watch: ReturnType<typeof setInterval>;
  readonly #events: CrewEvents;
  #ready = false;
  #over = false;

  /**
   * Starts a worker.
   *
   * @param options Models, module and limits.
   * @param events What to do with its reports.
   */
  constructor(options: CrewOptions<M>, events: CrewEvents) {
    const { worker = new URL("./worker.ts", import.meta.url), memoryLimit = MEMORY_LIMIT } =
      options;
    this.#events = events;
    this.#board = new Int32Array(new SharedArrayBuffer(4 * BOARD.cells));
    this.#worker = new Worker(worker, {
      resourceLimits: { maxOldGenerationSizeMb: memoryLimit },
    });
    this.#worker.on("message", (data: FromWorker) => this.#hear(data));
    this.#worker.on("error", (error: Error) => this.#lose(`the worker ended: ${error.message}`));
    this.#worker.on("exit", () => this.#lose("the worker ended"));
    this.#worker.postMessage({ models: options.models, board: this.#board.buffer });
    this.#watch = this.#watched(1000 * (options.rowLimit ?? ROW_LIMIT));
  }

  /** Whether it has loaded. */
  get started(): boolean {
    return this.#ready;
  }

  /** Whether nothing is to be expected of it. */
  get idle(): boolean {
    return this.held.size === 0 || this.#over;
  }

  #hear(data: FromWorker): void {
    if (this.#over) return;
    if ("ready" in data) {
      this.#ready = true;
      return this.#events.ready();
    }
    for (const done of data.done) this.held.delete(done.index);
    if (data.idle && this.#board[BOARD.stop] !== 0) this.held.clear(); // given up unbegun
    this.#events.done(data.done, this.held.size === 0);
  }

  /** Counts the time of each row; a sleeping machine does not use it up. */
  #watched(limit: number): ReturnType<typeof setInterval> {
    const interval = Math.min(1000, limit / 4);
    let seen = 0, spent = 0, last = performance.now();
    return setInterval(() => {
      const now = performance.now(), step = Math.min(now - last, 2 * interval);
      last = now;
      const atWork = Atomics.load(this.#board, BOARD.atWork);
      if (atWork === seen && (atWork !== 0 || !this.#ready)) spent += step;
      else spent = 0;
      seen = atWork;
      if (!this.#ready && spent > LOADING) this.#lose("it did not load in time");
      else if (this.#ready && spent > limit) {
        this.#lose(`the row took longer than ${limit / 1000} s or more memory than a worker has`);
      }
    }, interval);
  }

  #lose(why: string): void {
    if (this.#over) return;
    const atWork = this.held.get(Atomics.load(this.#board, BOARD.atWork) - 1);
    this.dismiss();
    this.#events.lost(why, atWork);
  }

  /**
   * Gives it rows.
   *
   * @param tasks Rows.
   */
  give(tasks: readonly Task[]): void {
    for (const task of tasks) this.held.set(task.index, task);
    this.#worker.postMessage({ tasks });
  }

  /** Asks it to give up the rows it has not begun. */
  askToStop(): void {
    Atomics.store(this.#board, BOARD.stop, 1);
  }

  /** Ends it. */
  dismiss(): void {
    this.#over = true;
    clearInterval(this.#watch);
    this.#worker.terminate();
  }
}
