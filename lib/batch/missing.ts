/**
 * The rows that a folder lacks: solved by workers and kept as they finish.
 *
 * @module
 */
import { answerText } from "./answer.ts";
import { profilePath } from "./folder.ts";
import type { Held } from "./kept.ts";
import type { Plan } from "./plan.ts";
import { type PoolOptions, solveRows } from "./pool.ts";
import { type Counts, ProgressCounter } from "./progress.ts";
import type { Unfinished } from "./record.ts";
import { resultCells } from "./result_row.ts";
import type { Done, NamedModel, Task } from "./serve.ts";
import { sha256 } from "./stamp.ts";
import { onDisk } from "./storage.ts";
import type { Store } from "./store.ts";
import { writeWhole } from "./whole_file.ts";

/** Longest time that a finished row is not durable, but for that of one flush (milliseconds). */
const FLUSH_EVERY = 500;

/** What to do about missing rows. */
export interface MissingOptions extends Omit<PoolOptions<NamedModel>, "models" | "onDone"> {
  /** Output folder. */
  readonly folder: string;
  /** Called once before the first row and after each. */
  readonly onProgress?: (progress: Counts) => void;
}

/** Profiles that are written, and made durable before the rows they belong to. */
class Profiles {
  #fresh: string[] = [];
  constructor(readonly folder: string) {}

  write(name: string, text: string): void {
    const path = `${this.folder}/${profilePath(name)}`;
    writeWhole(path, text, { durable: false });
    this.#fresh.push(path);
  }

  flush(): void {
    for (const path of this.#fresh.splice(0)) {
      onDisk(`write ${path}`, () => {
        const file = Deno.openSync(path, { write: true });
        file.syncDataSync();
        file.close();
      });
    }
  }
}

/** Rows to be solved: the first of each stamp that is not held, with its profile if any of them wants it. */
function tasksOf(plan: Plan, { places }: Held): { tasks: Task[]; same: Map<string, number[]> } {
  const same = new Map<string, number[]>();
  for (const [i, stamp] of plan.stamps.entries()) {
    if (places.has(stamp)) continue;
    const rows = same.get(stamp);
    if (rows) rows.push(i);
    else same.set(stamp, [i]);
  }
  const tasks = [...same.values()].map((rows) => ({
    index: rows[0]!,
    input: plan.rows[rows[0]!]!.input,
    profile: rows.some((i) => plan.profiles.has(plan.rows[i]!.case)),
  }));
  return { tasks, same };
}

/**
 * Solves what is missing; each finished row is added to the journal.
 *
 * @param plan The run.
 * @param held Its finished rows; more are added.
 * @param options Workers, folder, signal.
 * @param store Gets each row that is finished.
 * @returns Rows that could not be finished, in table order.
 * @throws {StorageError} if the disk refuses; what was flushed is kept.
 */
export async function solveMissing(
  plan: Plan,
  held: Held,
  options: MissingOptions,
  store?: Store,
): Promise<Unfinished[]> {
  const { tasks, same } = tasksOf(plan, held);
  const counter = new ProgressCounter(plan.rows.length, [...same.values()].flat().length);
  const unfinished: (Unfinished & { readonly index: number })[] = [];
  const profiles = new Profiles(options.folder), stop = new AbortController();
  const onAbort = () => stop.abort();
  options.signal?.addEventListener("abort", onAbort);
  if (options.signal?.aborted) stop.abort();
  let fault: unknown;
  const flush = () => {
    profiles.flush();
    held.journal.flush();
  };
  const timer = setInterval(() => {
    try {
      flush();
    } catch (error) {
      fault ??= error;
      stop.abort();
    }
  }, FLUSH_EVERY);

  const keep = (answer: Done): string | undefined => {
    if ("error" in answer) return answer.error;
    const { index, result, profile } = answer, stamp = plan.stamps[index]!;
    const rows = same.get(stamp)!, asked = tasksAsked(plan, rows);
    let text: string;
    try {
      for (const i of rows) resultCells(plan.rows[i]!, result, stamp);
      const digest = profile === undefined ? null : sha256(profile);
      text = answerText({ result, ...(asked.length > 0 ? { profile: digest } : {}) });
    } catch (error) {
      return (error as Error).message; // a fault of the program, never written as a result
    }
    if (profile !== undefined) { for (const name of asked) profiles.write(name, profile); }
    held.places.set(stamp, held.journal.append({ stamp, text }));
    store?.add({ stamp, text }, profile);
    counter.add(rows.length, result);
    return undefined;
  };
  const onDone = (answer: Done) => {
    const error = keep(answer), rows = same.get(plan.stamps[answer.index]!)!;
    if (error !== undefined) {
      for (const index of rows) {
        unfinished.push({ index, case: plan.rows[index]!.case, error });
      }
      counter.add(rows.length);
    }
    options.onProgress?.(counter.now());
  };

  options.onProgress?.(counter.now());
  try {
    await solveRows(tasks, { ...options, models: plan.models, onDone, signal: stop.signal });
    if (fault === undefined) flush();
  } finally {
    clearInterval(timer);
    options.signal?.removeEventListener("abort", onAbort);
  }
  if (fault !== undefined) throw fault;
  return unfinished.sort((x, y) => x.index - y.index).map(({ index: _, ...rest }) => rest);
}

function tasksAsked(plan: Plan, rows: readonly number[]): string[] {
  return rows.map((i) => plan.rows[i]!.case).filter((name) => plan.profiles.has(name));
}
