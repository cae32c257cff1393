/**
 * `deno task run`: a parameter table into results, profiles and figures.
 *
 * @module
 */
import { launch } from "./launch.ts";
import { helpText, parseOptions } from "./options.ts";
import { RUN_OPTIONS, runRequest } from "./run_options.ts";
import { closing } from "./status.ts";

const PURPOSE = "Solves every row of a parameter table; run again, it completes what is missing.";

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, RUN_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("run", PURPOSE, RUN_OPTIONS));
    return 0;
  }
  const request = runRequest(values, args);
  const { table, out, profiles } = request;
  const lists = typeof profiles === "object" ? [profiles.file] : [];
  return await launch("solve.ts", {
    read: [table, out, ...lists],
    write: [out],
    sys: ["hostname", "osRelease", "systemMemoryInfo"],
  }, request);
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
