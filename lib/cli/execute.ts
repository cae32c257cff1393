/**
 * `deno task execute`: notebooks on Deno's own kernel, for a finished run or for a table that is solved
 * first.
 *
 * @module
 */
import { relative } from "node:path";
import { type ExecutedFile, executeFile } from "../show/notebook/file.ts";
import { EXECUTE_OPTIONS, type ExecuteRequest, executeRequest } from "./execute_options.ts";
import { helpText, parseOptions, UsageError } from "./options.ts";
import { watchTask } from "./orphan.ts";
import { solveTable } from "./run.ts";
import { closing, STATUS } from "./status.ts";

const PURPOSE = "Executes notebooks; their code may do whatever you may do on this machine.";

/** A run without results.csv would only be found out in the middle of a notebook. */
function checkPaths(notebooks: readonly string[], run?: string): void {
  const missing = (path: string): boolean => {
    try {
      return !Deno.statSync(path).isFile;
    } catch {
      return true;
    }
  };
  const faults = notebooks.filter(missing).map((path) =>
    `Cannot execute ${path} as it must be a file: there is none`
  );
  if (run !== undefined && missing(`${run}/results.csv`)) {
    faults.push(`Cannot read the run ${run} as it must hold results.csv: there is none`);
  }
  if (faults.length > 0) throw new UsageError(faults);
}

function report(notebook: string, { path, failure, strayText }: ExecutedFile): void {
  if (strayText !== "") console.error(`${notebook}: the kernel said:\n${strayText}`);
  if (failure === undefined) return console.log(`Executed: ${path}`);
  const { position, id, message } = failure;
  console.error(`${notebook}: cell ${position} (${id}): ${message}`);
  console.error(`Written as far as it came: ${path}`);
}

async function executeAll(request: ExecuteRequest, signal: AbortSignal): Promise<number> {
  const { notebooks, run, out, timeout } = request;
  let status: number = STATUS.done;
  for (const path of notebooks) {
    const name = relative(Deno.cwd(), path);
    try {
      const options = { out, timeout, signal, ...(run === undefined ? {} : { run }) };
      const executed = await executeFile(path, options);
      report(name, executed);
      if (executed.failure !== undefined) status = STATUS.failed;
    } catch (error) {
      console.error(`${name}: ${(error as Error).message}`);
      status = STATUS.failed;
    }
    if (signal.aborted) return STATUS.interrupted;
  }
  return status;
}

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, EXECUTE_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("execute", PURPOSE, EXECUTE_OPTIONS));
    return STATUS.done;
  }
  const request = executeRequest(values);
  let solved: number = STATUS.done;
  if (request.solve !== undefined) {
    checkPaths(request.notebooks);
    solved = await solveTable(request.solve);
    if (solved > STATUS.failed) return solved;
  }
  checkPaths(request.notebooks, request.run);
  const stop = new AbortController();
  for (const signal of ["SIGINT", "SIGTERM"] as const) {
    Deno.addSignalListener(signal, () => stop.abort());
  }
  watchTask(() => stop.abort());
  return Math.max(solved, await executeAll(request, stop.signal));
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
