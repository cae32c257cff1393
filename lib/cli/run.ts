/**
 * `deno task run`: a parameter table into results, profiles and figures.
 *
 * @module
 */
import { launch, programPath, runDeno } from "./launch.ts";
import { helpText, parseOptions } from "./options.ts";
import { RUN_OPTIONS, type RunRequest, runRequest } from "./run_options.ts";
import { closing, STATUS } from "./status.ts";

const PURPOSE = "Solves every row of a parameter table; run again, it completes what is missing.";

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, RUN_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("run", PURPOSE, RUN_OPTIONS));
    return 0;
  }
  const request = runRequest(values, args);
  const status = await solveTable(request);
  if (values.has("table") || status > STATUS.failed) return status;
  return Math.max(status, await executeSurvey(request.out));
}

/** The survey of the demo is part of what the command makes without arguments. */
async function executeSurvey(out: string): Promise<number> {
  const permissions = [
    "--allow-run",
    "--allow-read",
    "--allow-write",
    "--allow-net=127.0.0.1",
    "--allow-env=INIT_CWD",
  ];
  const paths = [programPath("lib/cli/execute.ts"), programPath("notebooks/survey.ipynb")];
  return await runDeno(["--no-prompt", ...permissions, ...paths, "--run", out]);
}

/**
 * Solves a table in a process that may read and write only what belongs to the run.
 *
 * @param request What `deno task run` is asked.
 * @returns Exit status.
 */
export async function solveTable(request: RunRequest): Promise<number> {
  const { table, out, profiles, store, progressLines } = request;
  const lists = typeof profiles === "object" ? [profiles.file] : [];
  const stores = store === undefined ? [] : [store];
  const lines = progressLines === undefined || progressLines === "-" ? [] : [progressLines];
  return await launch("solve.ts", {
    read: [table, out, ...lists, ...stores],
    write: [out, ...stores, ...lines],
    sys: ["hostname", "osRelease", "systemMemoryInfo"],
  }, request);
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
