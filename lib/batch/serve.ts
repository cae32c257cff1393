/**
 * The worker's side of the batch protocol: rows in, results out. Free of packages.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Profile, RowResult } from "../observe/result.ts";
import { profileText } from "./profile_text.ts";

/** One row to be solved. */
export interface Task {
  /** Its place in the table, from 0. */
  readonly index: number;
  /** What is asked. */
  readonly input: RowInput;
  /** Whether its profile is wanted. */
  readonly profile: boolean;
}

/** One row that came back: a result, or the message of an error that is a fault of the program. */
export type Done =
  | { readonly index: number; readonly result: RowResult; readonly profile?: string }
  | { readonly index: number; readonly error: string };

/** A compiled model as far as the batch is concerned: named plain data. */
export interface NamedModel {
  /** Name of the model. */
  readonly name: string;
}

/** Message to a worker: first the models and the board, then rows. */
export type ToWorker<M extends NamedModel = NamedModel> =
  | { readonly models: readonly M[]; readonly board: SharedArrayBuffer }
  | { readonly tasks: readonly Task[] };

/** Message from a worker: it is ready, or rows are done; `idle` if it has no more. */
export type FromWorker =
  | { readonly ready: true }
  | { readonly done: readonly Done[]; readonly idle: boolean };

/** What worker and pool see of each other at any time: cells of 32 bits. */
export const BOARD = {
  /** Index of the row at work plus one; 0 between rows. */
  atWork: 0,
  /** Not 0 if the worker shall give up the rows it has not begun. */
  stop: 1,
  /** Number of cells. */
  cells: 2,
} as const;

/** A row solver. */
export type ComputeRow<M> = (
  input: RowInput,
  model: M,
  options: { readonly profile: boolean },
) => { readonly result: RowResult; readonly profile?: Profile };

/** The worker's end of the line. */
export interface Port {
  /** Hears messages. */
  on(event: "message", hear: (data: unknown) => void): void;
  /** Answers. */
  postMessage(message: FromWorker): void;
}

/** Longest time that a result waits for its neighbours (milliseconds). */
const GATHER = 100;

function solve<M extends NamedModel>(
  compute: ComputeRow<M>,
  models: ReadonlyMap<string, M>,
  { index, input, profile }: Task,
): Done {
  try {
    const model = models.get(input.model);
    if (model === undefined) {
      throw new Error(`Cannot solve the row as its model must be loaded: got ${input.model}`);
    }
    const solved = compute(input, model, { profile });
    const text = profile && solved.profile ? profileText(solved.profile) : undefined;
    return { index, result: solved.result, ...(text === undefined ? {} : { profile: text }) };
  } catch (error) {
    return { index, error: error instanceof Error ? error.message : String(error) };
  }
}

/** The line of the thread that this is. */
export function ownPort(): Port {
  // Taken from the process and not imported: a worker loads nothing but the row solver.
  return process.getBuiltinModule("node:worker_threads").parentPort as unknown as Port;
}

/**
 * Answers the messages of a batch inside a worker. An error of one row is the answer for that row alone.
 *
 * @param compute The row solver.
 * @param port The worker's end of the line. @default that of this thread
 */
export function serve<M extends NamedModel>(compute: ComputeRow<M>, port: Port = ownPort()): void {
  const models = new Map<string, M>();
  let board: Int32Array = new Int32Array(BOARD.cells);
  port.on("message", (message) => {
    const data = message as ToWorker<M>;
    if ("models" in data) {
      board = new Int32Array(data.board);
      for (const model of data.models) models.set(model.name, model);
      return port.postMessage({ ready: true });
    }
    let done: Done[] = [], last = performance.now();
    for (const task of data.tasks) {
      if (Atomics.load(board, BOARD.stop) !== 0) break;
      Atomics.store(board, BOARD.atWork, task.index + 1);
      done.push(solve(compute, models, task));
      if (performance.now() - last < GATHER) continue;
      port.postMessage({ done, idle: false });
      done = [];
      last = performance.now();
    }
    Atomics.store(board, BOARD.atWork, 0);
    port.postMessage({ done, idle: true });
  });
}
