/**
 * Judges the ready audits in workers; the order of the ledger does not depend on which ends first.
 *
 * @module
 */
import type { JudgeOptions } from "./judge.ts";
import type { LedgerPart } from "./ledger.ts";
import { AUDITED_MODELS, readyAudits } from "./ready/mod.ts";
import type { ReadyRequest } from "./ready_worker.ts";

/** What is judged and how. */
export interface RunReadyOptions {
  /** Only audits that say something about this model. @default all */
  readonly model?: string;
  /** Workers. @default 1 */
  readonly workers?: number;
  /** Seed, points, digits. */
  readonly judge?: JudgeOptions;
  /** Is told of each part as it is done. */
  readonly onPart?: (part: LedgerPart, done: number, total: number) => void;
}

/** Parts in the order of the list, and how long each took (milliseconds). */
export interface ReadyRun {
  readonly parts: readonly LedgerPart[];
  readonly times: readonly number[];
}

type Answer =
  | { readonly index: number; readonly part: LedgerPart; readonly milliseconds: number }
  | { readonly index: number; readonly error: string };

/**
 * Judges the ready audits.
 *
 * @param options Which, and by how many workers.
 * @throws {RangeError} if there is no such model.
 * @throws {Error} if an audit cannot be judged: a derivative that is not confirmed, algebra killed by the clock.
 */
export async function runReady(options: RunReadyOptions = {}): Promise<ReadyRun> {
  const { model, workers = 1, judge = {}, onPart } = options;
  if (model !== undefined && !AUDITED_MODELS.includes(model)) {
    throw new RangeError(
      `Cannot audit the model as its name must be one of ${AUDITED_MODELS.join(", ")}: ` +
        `current value is ${model}`,
    );
  }
  const total = readyAudits(model).length;
  const parts: LedgerPart[] = Array(total), times: number[] = Array(total);
  let next = 0, done = 0;
  const url = new URL("./ready_worker.ts", import.meta.url).href;
  const serve = (worker: Worker) =>
    new Promise<void>((resolve, reject) => {
      const ask = () => {
        if (next >= total) return resolve();
        const request: ReadyRequest = {
          index: next++,
          options: judge,
          ...(model === undefined ? {} : { model }),
        };
        worker.postMessage(request);
      };
      worker.onmessage = ({ data }: MessageEvent<Answer>) => {
        if ("error" in data) return reject(new Error(data.error));
        parts[data.index] = data.part;
        times[data.index] = data.milliseconds;
        onPart?.(data.part, ++done, total);
        ask();
      };
      worker.onerror = (event) => {
        event.preventDefault();
        reject(
          new Error(`Cannot judge the audits as their worker must not fail: ${event.message}`),
        );
      };
      ask();
    });
  const crew = Array.from(
    { length: Math.min(workers, total) },
    () => new Worker(url, { type: "module" }),
  );
  try {
    await Promise.all(crew.map(serve));
  } finally {
    for (const worker of crew) worker.terminate();
  }
  return { parts, times };
}
