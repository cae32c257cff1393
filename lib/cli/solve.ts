/**
 * The work of `deno task run`, in a process that may read the program and the table and write the output
 * folder, and nothing else.
 *
 * @module
 */
import { TableError } from "../batch/fault.ts";
import { FILES, hasFigures } from "../batch/folder.ts";
import type { Counts } from "../batch/progress.ts";
import { type RunOutcome, runTable } from "../batch/run.ts";
import { readTableFile } from "../batch/table_file.ts";
import { summaryLines } from "../batch/summary.ts";
import { watchParent } from "./orphan.ts";
import { progressDisplay } from "./progress.ts";
import { progressLines, STANDARD_ERROR } from "./progress_lines.ts";
import type { RunRequest } from "./run_options.ts";
import { UsageError } from "./options.ts";
import { closing, STATUS } from "./status.ts";

function read(path: string, what: string): Uint8Array {
  try {
    return readTableFile(path, what);
  } catch (error) {
    if (error instanceof TableError) throw error;
    throw new UsageError([`Cannot read ${what} ${path}: ${(error as Error).message}`]);
  }
}

function interruption(): AbortSignal {
  const controller = new AbortController();
  for (const signal of ["SIGINT", "SIGTERM"] as const) {
    Deno.addSignalListener(signal, () => controller.abort());
  }
  watchParent(() => controller.abort());
  return controller.signal;
}

function profilesOf(
  { profiles }: RunRequest,
): { profiles?: "all" | "none" | { lines: string } } {
  if (profiles === undefined) return {};
  if (typeof profiles === "string") return { profiles };
  const bytes = read(profiles.file, "the list of profiles");
  return { profiles: { lines: new TextDecoder().decode(bytes) } };
}

/** Rows up to which figures are drawn: their time grows with the square. */
const MOST_DRAWN = 5000;

async function figures(
  folder: string,
  { status, total }: RunOutcome,
  quiet: boolean,
): Promise<void> {
  if (total > MOST_DRAWN) {
    if (!quiet) console.log(`Figures: none, a map of more than ${MOST_DRAWN} rows shows nothing`);
    return;
  }
  if (status === "interrupted" || (status === "nothing-to-do" && hasFigures(folder))) return;
  const { writeFigures } = await import("../show/figures.ts");
  const written = await writeFigures(folder);
  if (!quiet) console.log(`Figures: ${written.length} in ${folder}/${FILES.figures}`);
}

function statusOf({ status, summary }: RunOutcome): number {
  if (status === "interrupted") return STATUS.interrupted;
  return summary?.outcomes.has("failed") ? STATUS.failed : STATUS.done;
}

function report(outcome: RunOutcome, out: string, quiet: boolean): void {
  const { status, summary, unfinished, total, finished, taken } = outcome;
  const say = quiet ? () => {} : (line: string) => console.log(line);
  if (status === "nothing-to-do") say(`Nothing to do: ${out} holds this run whole`);
  if (taken > 0) say(`Taken from the store: ${taken} of ${total} rows`);
  if (summary) { for (const line of summaryLines(summary)) say(line); }
  for (const row of unfinished) console.error(`interrupted: ${row.case}: ${row.error}`);
  if (status === "interrupted") {
    const missing = `${total - finished} of ${total} rows are missing`;
    console.error(`Interrupted: ${missing}; finished ones are kept, run again`);
  }
  if (summary) say(`Results: ${out}/${FILES.results}`);
}

/** Progress as it was asked for. */
function progressOf(
  { quiet, progressLines: to }: RunRequest,
): { onProgress: (counts: Counts) => void; end: (status: string) => void } {
  const display = quiet || to === STANDARD_ERROR ? undefined : progressDisplay();
  const lines = to === undefined ? undefined : progressLines(to);
  return {
    onProgress: (counts) => {
      display?.(counts);
      lines?.rows(counts);
    },
    end: (status) => lines?.end(status),
  };
}

async function main(request: RunRequest): Promise<number> {
  const { table, out, quiet } = request, signal = interruption();
  const bytes = read(table, "the table"), { onProgress, end } = progressOf(request);
  const { workers, rowLimit, store, replace, command } = request;
  const outcome = await runTable({
    table: bytes,
    folder: out,
    workers,
    rowLimit,
    ...(store === undefined ? {} : { store }),
    replace,
    command,
    signal,
    onProgress,
    onNotice: (text) => console.error(text),
    ...profilesOf(request),
  }).catch((error) => {
    end("error");
    throw error;
  });
  end(outcome.status);
  report(outcome, out, quiet);
  await figures(out, outcome, quiet);
  return statusOf(outcome);
}

if (import.meta.main) Deno.exit(await closing(() => main(JSON.parse(Deno.args[0]!))));
