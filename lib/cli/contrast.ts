/**
 * The work of `deno task compare`, in a process that may read the two runs and write the comparison, and
 * nothing else.
 *
 * @module
 */
import { ComparisonFile } from "../batch/comparison/comparison_file.ts";
import { readIfPresent } from "../batch/folder.ts";
import { writeWhole } from "../batch/whole_file.ts";
import { compareRuns, type RunComparison } from "../show/compare_runs.ts";
import type { CompareRequest } from "./compare_options.ts";
import { UsageError } from "./options.ts";
import { closing, STATUS } from "./status.ts";

/** What `--out` writes. */
const NAMES = { table: "comparison.csv", figure: "comparison.svg" } as const;

function openOut(out: string, replace: boolean): ComparisonFile {
  let there: string | undefined;
  try {
    there = Object.values(NAMES).find((name) => readIfPresent(`${out}/${name}`) !== undefined);
    if (there === undefined || replace) {
      Deno.mkdirSync(out, { recursive: true });
      return new ComparisonFile(`${out}/${NAMES.table}`);
    }
  } catch (error) {
    const must = "it must be a folder that can be written";
    throw new UsageError([`Cannot write to ${out} as ${must}: ${(error as Error).message}`]);
  }
  throw new UsageError([`Cannot write ${out}/${there} as it is there already; give --replace`]);
}

async function compareInto(request: CompareRequest): Promise<RunComparison> {
  const { a, b, out, replace, lines } = request;
  if (out === undefined) return await compareRuns(a, b, { most: lines });
  const file = openOut(out, replace);
  let comparison: RunComparison | undefined;
  try {
    comparison = await compareRuns(a, b, { most: lines, onDifference: file.add });
  } finally {
    file.close(comparison !== undefined);
  }
  writeWhole(`${out}/${NAMES.figure}`, comparison.figure().svg);
  return comparison;
}

async function main(request: CompareRequest): Promise<number> {
  const { a, b, out, lines } = request;
  if (a === b) console.error(`A and B are the same: ${a}`);
  const comparison = await compareInto(request);
  console.log(`A: ${a}\nB: ${b}\n\n${comparison.text(lines)}\n`);
  console.log(
    comparison.same
      ? "Same: nothing differs beyond the bounds"
      : "Not the same: rows came, went, or differ beyond the bounds",
  );
  if (out !== undefined) console.log(`Differences: ${out}/${NAMES.table}, ${out}/${NAMES.figure}`);
  return comparison.same ? STATUS.done : STATUS.failed;
}

if (import.meta.main) Deno.exit(await closing(() => main(JSON.parse(Deno.args[0]!))));
