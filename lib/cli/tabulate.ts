/**
 * The work of `deno task grid`, in a process that may write the table, and nothing else.
 *
 * @module
 */
import { readIfPresent } from "../batch/folder.ts";
import { gridTable } from "../batch/grid.ts";
import { writeWhole } from "../batch/whole_file.ts";
import type { GridRequest } from "./grid_options.ts";
import { UsageError } from "./options.ts";
import { closing, STATUS } from "./status.ts";

function main({ grid, out, replace }: GridRequest): number {
  const text = table(grid);
  if (out === undefined) console.log(text.trimEnd());
  else {
    if (!replace && readIfPresent(out) !== undefined) {
      throw new UsageError([`Cannot write ${out} as it is there already; give --replace`]);
    }
    writeWhole(out, text);
    console.log(`Table: ${out}, ${text.split("\n").length - 2} rows`);
  }
  return STATUS.done;
}

function table(grid: GridRequest["grid"]): string {
  try {
    return gridTable(grid);
  } catch (error) {
    throw error instanceof RangeError ? new UsageError([error.message]) : error;
  }
}

if (import.meta.main) {
  Deno.exit(await closing(() => Promise.resolve(main(JSON.parse(Deno.args[0]!)))));
}
