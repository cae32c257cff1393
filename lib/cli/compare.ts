/**
 * `deno task compare`: what changed between two runs.
 *
 * @module
 */
import { COMPARE_OPTIONS, compareRequest } from "./compare_options.ts";
import { launch } from "./launch.ts";
import { helpText, parseOptions } from "./options.ts";
import { closing } from "./status.ts";

const PURPOSE = "Compares the results of two runs; ends with 1 if they differ beyond their bounds.";

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, COMPARE_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("compare", PURPOSE, COMPARE_OPTIONS));
    return 0;
  }
  const request = compareRequest(values), { a, b, out } = request;
  const written = out === undefined ? [] : [out];
  return await launch("contrast.ts", { read: [a, b, ...written], write: written }, request);
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
