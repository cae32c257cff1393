/**
 * Which parameters of a row differ, by the parameter tables that two runs keep beside their results.
 *
 * @module
 */
import { FILES, readIfPresent } from "../folder.ts";
import { sha256, stampInputs } from "../stamp.ts";
import { readTable } from "../table.ts";
import type { Unjudged } from "./row_change.ts";
import type { Inputs, Source } from "./source.ts";

/** Tells the parameters of a case that differ; nothing is given where a table does not have the case. */
export type GivenDifferences = (name: string) => readonly Unjudged[];

/** Inputs by case; undefined where the table is not there or not readable any more. */
function inputsOf({ folder, run, inputs }: Source): ReadonlyMap<string, Inputs> | undefined {
  if (inputs !== undefined) return inputs;
  const bytes = folder === undefined ? undefined : readIfPresent(`${folder}/${FILES.table}`);
  if (bytes === undefined || sha256(bytes) !== run?.identity.table) return undefined;
  try {
    return new Map(readTable(bytes).map(({ case: name, input }) => [name, stampInputs(input)]));
  } catch {
    return undefined; // a table of another version: the results themselves repeat most inputs
  }
}

/**
 * Compares the parameter tables of two runs.
 *
 * @param a The first run.
 * @param b The second.
 * @returns What differs for a case, or undefined if a table is not known.
 */
export function givenDifferences(a: Source, b: Source): GivenDifferences | undefined {
  const tables = [a, b].map(({ run, inputs }) => inputs ? undefined : run?.identity.table);
  if (tables[0] !== undefined && tables[0] === tables[1]) return () => [];
  const first = inputsOf(a), second = first && inputsOf(b);
  if (first === undefined || second === undefined) return undefined;
  return (name) => {
    const x = first.get(name), y = second.get(name);
    if (x === undefined || y === undefined) return [];
    const columns = [...new Set([...Object.keys(x), ...Object.keys(y)])];
    return columns.filter((column) => column !== "tolerance" && x[column] !== y[column])
      .map((column) => {
        const [from, to] = [x, y].map((inputs) => String(inputs[column] ?? ""));
        return { case: name, column, a: from, aError: "", b: to, bError: "" };
      });
  };
}
