/**
 * A run: a parameter table solved into an output folder, or completed there.
 *
 * @module
 */
import { companionsHeld, type Held, heldRows } from "./kept.ts";
import { writeRecord, writeTables } from "./finish.ts";
import { FILES, inspectFolder, openFolder, readIfPresent } from "./folder.ts";
import { gitCommit, hostFacts } from "./host.ts";
import { Lock } from "./lock.ts";
import { solveMissing } from "./missing.ts";
import { type Plan, planRun } from "./plan.ts";
import type { Counts } from "./progress.ts";
import type { RunPart, Unfinished } from "./record.ts";
import type { RecordHead } from "./record_file.ts";
import { share } from "./reuse.ts";
import { sha256 } from "./stamp.ts";
import { onDisk } from "./storage.ts";
import { Store } from "./store.ts";
import { type Summary, summaryJson, summaryOf } from "./summary.ts";
import { writeWhole } from "./whole_file.ts";

/** What is run, and how. */
export interface RunOptions {
  /** Bytes of the parameter table. */
  readonly table: Uint8Array;
  /** Output folder. */
  readonly folder: string;
  /** Number of workers; enters no result. */
  readonly workers: number;
  /** Longest time of one row (seconds). @default 300 */
  readonly rowLimit?: number;
  /** Memory of one worker (MiB). @default 1024 */
  readonly memoryLimit?: number;
  /** Folder of finished rows shared with other runs. */
  readonly store?: string;
  /** Rows that get a profile. @default all of up to 200 rows, else none */
  readonly profiles?: "all" | "none" | { readonly lines: string };
  /** Whether files of another run in the folder may be removed. @default false */
  readonly replace?: boolean;
  /** Command line for the record. @default [] */
  readonly command?: readonly string[];
  /** Stops the run; finished rows are kept. */
  readonly signal?: AbortSignal;
  /** Called once before the first row and after each. */
  readonly onProgress?: (progress: Counts) => void;
  /** Called with what went wrong and was mended: a lock taken over, records dropped, a bad store. */
  readonly onNotice?: (text: string) => void;
  /** Module of the worker. @default the row solver's worker */
  readonly worker?: URL;
}

/** What came of a run. */
export interface RunOutcome {
  /** done; nothing-to-do: the folder held it all; interrupted: rows are missing. */
  readonly status: "done" | "nothing-to-do" | "interrupted";
  /** Rows of the parameter table. */
  readonly total: number;
  /** Finished rows. */
  readonly finished: number;
  /** Those of them that the store had. */
  readonly taken: number;
  /** Counts and extremes of results.csv; absent if the run was stopped before it was written. */
  readonly summary?: Summary;
  /** Rows that a fault of the program, a crash or a limit ended. */
  readonly unfinished: readonly Unfinished[];
}

const ROOT = new URL("../../", import.meta.url);

async function beginPart(options: RunOptions): Promise<RunPart> {
  const commit = await gitCommit(ROOT);
  const config = JSON.parse(await Deno.readTextFile(new URL("deno.json", ROOT)));
  return {
    command: options.command ?? [],
    started: new Date().toISOString(),
    host: hostFacts(),
    ...(commit === undefined ? {} : { commit }),
    versions: { [config.name]: config.version, ...Deno.version },
    workers: options.workers,
  };
}

function finishedOf(plan: Plan, { places }: Held): number {
  return plan.stamps.reduce((n, stamp) => places.has(stamp) ? n + 1 : n, 0);
}

function resultsHeld(folder: string, previous: RecordHead): boolean {
  const bytes = readIfPresent(`${folder}/${FILES.results}`);
  return bytes !== undefined && sha256(bytes) === previous.results?.sha256;
}

/**
 * Runs a table into a folder. Rows that the folder holds with the same stamp are kept.
 *
 * @param options Table, folder, workers and more.
 * @returns What came of it; failed and refused rows are part of a run that is done.
 * @throws {TableError} if the table or the list of profiles has faults; nothing was run.
 * @throws {FolderError} if the folder holds another run and may not be replaced, or another process has it.
 * @throws {StorageError} if the disk refuses; finished rows are kept.
 */
export async function runTable(options: RunOptions): Promise<RunOutcome> {
  const { folder, replace = false } = options;
  const plan = await planRun(options.table, options.profiles);
  onDisk(`write to ${folder}`, () => {
    inspectFolder(folder, plan.identity, replace);
    Deno.mkdirSync(folder, { recursive: true });
  });
  const lock = await Lock.take(folder);
  try {
    if (lock.stale) {
      const { pid, host, started } = lock.stale;
      options.onNotice?.(`Taken over from process ${pid} on ${host}, which began ${started}`);
    }
    const previous = openFolder(folder, plan.identity, { replace, profiles: plan.profiles });
    const held = heldRows(plan, folder);
    try {
      return await complete(plan, held, previous, options);
    } finally {
      held.journal.close();
    }
  } finally {
    lock.release();
  }
}

/** Completes a folder that is ours. */
async function complete(
  plan: Plan,
  held: Held,
  previous: RecordHead | undefined,
  options: RunOptions,
): Promise<RunOutcome> {
  const { folder, signal } = options, total = plan.rows.length, before = finishedOf(plan, held);
  if (held.journal.damaged > 0) {
    options.onNotice?.(`Solved again: ${held.journal.damaged} damaged in ${FILES.journal}`);
  }
  const store = options.store === undefined
    ? undefined
    : new Store(options.store, (text) => options.onNotice?.(text));
  if (
    previous?.status === "done" && previous.summary && before === total &&
    companionsHeld(folder) && resultsHeld(folder, previous)
  ) {
    if (store) await share(plan, held, store, options);
    const summary = summaryOf(previous.summary);
    return { status: "nothing-to-do", total, finished: total, taken: 0, summary, unfinished: [] };
  }
  const part = await beginPart(options);
  const head = (rest: Partial<RecordHead>, now: RunPart): RecordHead => ({
    status: "running",
    runs: [...previous?.runs ?? [], now],
    identity: plan.identity,
    total,
    unfinished: [],
    ...(previous?.results ? { results: previous.results } : {}),
    ...rest,
  });
  await writeRecord(head({}, part), folder);
  writeWhole(`${folder}/${FILES.table}`, plan.table);
  const taken = store ? await share(plan, held, store, options) : 0;
  const kept = finishedOf(plan, held);
  const unfinished = await solveMissing(plan, held, options, store);
  const finished = finishedOf(plan, held);
  const ended = () => ({ ...part, ended: new Date().toISOString(), rows: finished - kept });
  const tables = signal?.aborted ? undefined : await writeTables(plan, held, folder, signal);
  if (tables === undefined) {
    await writeRecord(head({ status: "interrupted", unfinished }, ended()), folder);
    return { status: "interrupted", total, finished, taken, unfinished };
  }
  const status = finished === total ? "done" : "interrupted";
  const { results, summary, profiled } = tables;
  const rows = { plan, held, profiled };
  await writeRecord(
    head({ status, results, summary: summaryJson(summary), unfinished }, ended()),
    folder,
    rows,
  );
  return { status, total, finished, taken, summary, unfinished };
}
