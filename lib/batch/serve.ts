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

/** Message to a worker: first the models, then rows. */
export type ToWorker<M extends NamedModel = NamedModel> =
  | { readonly models: readonly M[] }
  | { readonly tasks: readonly Task[] };

/** Message from a worker: it is ready, or rows are done. */
export type FromWorker = { readonly ready: true } | { readonly done: readonly Done[] };

/** A row solver. */
export type ComputeRow<M> = (
  input: RowInput,
  model: M,
  options: { readonly profile: boolean },
) => { readonly result: RowResult; readonly profile?: Profile };

interface WorkerScope {
  onmessage: ((event: MessageEvent) => void) | null;
  postMessage(message: FromWorker): void;
}

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

/**
 * Answers the messages of a batch inside a worker. An error of one row is the answer for that row alone.
 *
 * @param compute The row solver.
 */
export function serve<M extends NamedModel>(compute: ComputeRow<M>): void {
  const scope = globalThis as unknown as WorkerScope;
  const models = new Map<string, M>();
  scope.onmessage = ({ data }: MessageEvent<ToWorker<M>>) => {
    if ("models" in data) {
      for (const model of data.models) models.set(model.name, model);
      scope.postMessage({ ready: true });
    } else scope.postMessage({ done: data.tasks.map((task) => solve(compute, models, task)) });
  };
}
