/**
 * `deno task grid`: a parameter table from ranges.
 *
 * @module
 */
import { GRID_OPTIONS, gridRequest } from "./grid_options.ts";
import { launch } from "./launch.ts";
import { helpText, parseOptions } from "./options.ts";
import { closing } from "./status.ts";

const PURPOSE = "Writes a parameter table with every combination of the given ranges.";

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, GRID_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("grid", PURPOSE, GRID_OPTIONS));
    return 0;
  }
  const request = gridRequest(values);
  const paths = request.out === undefined ? [] : [request.out, `${request.out}.tmp`];
  return await launch("tabulate.ts", { read: paths, write: paths }, request);
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
