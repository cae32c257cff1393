/**
 * Which parameters of a row differ, by the parameter tables that two runs keep beside their results.
 *
 * @module
 */
import { FILES, readIfPresent } from "../folder.ts";
import { canonicalJson, sha256, stampInputs } from "../stamp.ts";
import { readTable } from "../table.ts";
import type { Unjudged } from "./row_change.ts";
import type { Source } from "./source.ts";

/** Tells the parameters of a case that differ; nothing is given where a table does not have the case. */
export type GivenDifferences = (name: string) => readonly Unjudged[];

/** Inputs by case as canonical JSON; undefined where the table is not there or not readable any more. */
function inputsOf({ folder, run }: Source): ReadonlyMap<string, string> | undefined {
  const bytes = folder === undefined ? undefined : readIfPresent(`${folder}/${FILES.table}`);
  if (bytes === undefined || sha256(bytes) !== run?.identity.table) return undefined;
  try {
    return new Map(
      readTable(bytes).map(({ case: name, input }) => [name, canonicalJson(stampInputs(input))]),
    );
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
  const tables = [a, b].map(({ run }) => run?.identity.table);
  if (tables[0] !== undefined && tables[0] === tables[1]) return () => [];
  const first = inputsOf(a), second = first && inputsOf(b);
  if (first === undefined || second === undefined) return undefined;
  return (name) => {
    const [x, y] = [first.get(name), second.get(name)];
    if (x === undefined || y === undefined || x === y) return [];
    const [p, q] = [JSON.parse(x), JSON.parse(y)];
    const columns = [...new Set([...Object.keys(p), ...Object.keys(q)])].sort();
    return columns.filter((column) => column !== "tolerance" && p[column] !== q[column])
      .map((column) => {
        const [text, other] = [p, q].map((cells) => String(cells[column] ?? ""));
        return { case: name, column, a: text, aError: "", b: other, bError: "" };
      });
  };
}
