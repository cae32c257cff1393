/**
 * A run: a parameter table solved into an output folder, or completed there.
 *
 * @module
 */
import { FILES, openFolder, profilePath, writeWhole } from "./folder.ts";
import { gitCommit, hostFacts } from "./host.ts";
import { companionsHeld, type FinishedRow, keptRows } from "./kept.ts";
import { profilesMetadata, resultsMetadata } from "./metadata.ts";
import { type Plan, planRun } from "./plan.ts";
import { solveRows } from "./pool.ts";
import { evidenceJson, type RunPart, type RunRecord, type Unfinished } from "./record.ts";
import { type ResultCells, resultCells } from "./result_row.ts";
import { resultsText } from "./results_file.ts";
import type { Done } from "./serve.ts";
import { sha256 } from "./stamp.ts";

/** What is run, and how. */
export interface RunOptions {
  /** Bytes of the parameter table. */
  readonly table: Uint8Array;
  /** Output folder. */
  readonly folder: string;
  /** Number of workers; enters no result. */
  readonly workers: number;
  /** Rows that get a profile. @default all of up to 200 rows, else none */
  readonly profiles?: "all" | "none" | { readonly lines: string };
  /** Whether files of another run in the folder may be removed. @default false */
  readonly replace?: boolean;
  /** Command line for the record. @default [] */
  readonly command?: readonly string[];
  /** Stops the run; finished rows are kept. */
  readonly signal?: AbortSignal;
  /** Called once before the first row and after each. */
  readonly onProgress?: (progress: Progress) => void;
  /** Module of the worker. @default the row solver's worker */
  readonly worker?: URL;
}

/** How far a run is. */
export interface Progress {
  /** Rows finished by this start of the command. */
  readonly done: number;
  /** Rows it has to do. */
  readonly total: number;
  /** Rows taken from the folder as they were. */
  readonly kept: number;
}

/** What came of a run. */
export interface RunOutcome {
  /** done; nothing-to-do: the folder held it all; interrupted: rows are missing. */
  readonly status: "done" | "nothing-to-do" | "interrupted";
  /** Finished rows in table order. */
  readonly rows: readonly ResultCells[];
  /** Rows of the parameter table. */
  readonly total: number;
  /** Rows that a fault of the program ended. */
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

function writeJson(path: string, value: unknown): void {
  writeWhole(path, `${JSON.stringify(value, null, 2)}\n`);
}

/** Solves what is missing; finished rows are added to `finished`. */
async function solveMissing(
  plan: Plan,
  finished: Map<number, FinishedRow>,
  options: RunOptions,
): Promise<Unfinished[]> {
  const { folder, signal, worker } = options;
  const kept = finished.size, unfinished: (Unfinished & { readonly index: number })[] = [];
  const tasks = plan.rows.flatMap(({ input, case: name }, index) =>
    finished.has(index) ? [] : [{ index, input, profile: plan.profiles.has(name) }]
  );
  let done = 0;
  const report = () => options.onProgress?.({ done, total: tasks.length, kept });
  const contract = (answer: Done): FinishedRow | string => {
    if ("error" in answer) return answer.error;
    const { index, result, profile } = answer;
    const row = plan.rows[index]!, stamp = plan.stamps[index]!;
    const asked = plan.profiles.has(row.case);
    const digest = profile === undefined ? null : sha256(profile);
    try {
      const cells = resultCells(row, result, stamp), evidence = evidenceJson(result.evidence);
      return { cells, record: { stamp, ...(asked ? { profile: digest } : {}), evidence } };
    } catch (error) {
      return (error as Error).message; // a fault of the program, never written as a result
    }
  };
  const onDone = (answer: Done) => {
    const { index } = answer, row = contract(answer), name = plan.rows[index]!.case;
    if (typeof row === "string") unfinished.push({ index, case: name, error: row });
    else {
      if ("profile" in answer) writeWhole(`${folder}/${profilePath(name)}`, answer.profile!);
      finished.set(index, row);
    }
    done++;
    report();
  };
  report();
  await solveRows(tasks, {
    workers: options.workers,
    models: plan.models,
    onDone,
    ...(signal ? { signal } : {}),
    ...(worker ? { worker } : {}),
  });
  return unfinished.sort((x, y) => x.index - y.index).map(({ index: _, ...rest }) => rest);
}

function inOrder(plan: Plan, finished: ReadonlyMap<number, FinishedRow>): FinishedRow[] {
  return plan.rows.flatMap((_, i) => finished.has(i) ? [finished.get(i)!] : []);
}

/** Writes everything but the record; returns the digest of results.csv. */
function writeResults(
  plan: Plan,
  finished: ReadonlyMap<number, FinishedRow>,
  folder: string,
): string {
  const rows = inOrder(plan, finished);
  const text = resultsText(rows.map((row) => row.cells));
  const profiled = rows.filter((row) => typeof row.record.profile === "string");
  writeWhole(`${folder}/${FILES.results}`, text);
  writeJson(`${folder}/${FILES.metadata}`, resultsMetadata());
  writeJson(
    `${folder}/${FILES.profilesMetadata}`,
    profilesMetadata(profiled.map((row) => row.cells["case"]!)),
  );
  return sha256(text);
}

/**
 * Runs a table into a folder. Rows that the folder holds from the same table and core are kept.
 *
 * @param options Table, folder, workers and more.
 * @returns What came of it; failed and refused rows are part of a run that is done.
 * @throws {TableError} if the table or the list of profiles has faults; nothing was run.
 * @throws {FolderError} if the folder holds another run and may not be replaced.
 */
export async function runTable(options: RunOptions): Promise<RunOutcome> {
  const { folder } = options;
  const plan = await planRun(options.table, options.profiles);
  const total = plan.rows.length;
  const previous = openFolder(folder, plan.identity, options.replace ?? false);
  const finished = keptRows(plan, folder, previous);
  const kept = finished.size;
  const cells = () => inOrder(plan, finished).map((row) => row.cells);
  if (previous?.status === "done" && kept === total && companionsHeld(folder)) {
    return { status: "nothing-to-do", rows: cells(), total, unfinished: [] };
  }
  const part = await beginPart(options);
  const record = (rest: Partial<RunRecord>, now: RunPart): RunRecord => ({
    status: "running",
    runs: [...previous?.runs ?? [], now],
    identity: plan.identity,
    total,
    unfinished: [],
    rows: previous?.rows ?? {},
    ...(previous?.results ? { results: previous.results } : {}),
    ...rest,
  });
  writeJson(`${folder}/${FILES.record}`, record({}, part));
  writeWhole(`${folder}/${FILES.table}`, plan.table);
  const unfinished = await solveMissing(plan, finished, options);
  const sha = writeResults(plan, finished, folder);
  const status = finished.size === total ? "done" : "interrupted";
  const rows = Object.fromEntries(
    plan.rows.flatMap((row, i) => finished.has(i) ? [[row.case, finished.get(i)!.record]] : []),
  );
  const results = { sha256: sha, rows: finished.size };
  const ended = { ...part, ended: new Date().toISOString(), rows: finished.size - kept };
  writeJson(`${folder}/${FILES.record}`, record({ status, results, rows, unfinished }, ended));
  return { status, rows: cells(), total, unfinished };
}
