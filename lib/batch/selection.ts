/**
 * Which rows of a table get a profile.
 *
 * @module
 */
import { type Fault, quoted, TableError } from "./fault.ts";
import { nearest } from "./nearest.ts";
import type { TableRow } from "./row_reader.ts";

/** Rows up to which every row gets a profile unless told otherwise. */
export const PROFILES_BY_DEFAULT = 200;

/**
 * Selects rows by what was asked for.
 *
 * @param rows Rows of the table.
 * @param asked `all`, `none`, the text of a file with one case a line, or undefined for the default: all
 * of up to {@linkcode PROFILES_BY_DEFAULT} rows, else none.
 * @returns Cases that get a profile.
 * @throws {TableError} for every line that names no case of the table.
 */
export function selectProfiles(
  rows: readonly TableRow[],
  asked: "all" | "none" | { readonly lines: string } | undefined,
): ReadonlySet<string> {
  const cases = new Set(rows.map((row) => row.case));
  if (asked === "all" || (asked === undefined && rows.length <= PROFILES_BY_DEFAULT)) return cases;
  if (asked === "none" || asked === undefined) return new Set();
  const faults: Fault[] = [], chosen = new Set<string>();
  for (const [i, line] of asked.lines.replace(/^\ufeff/, "").split(/\r?\n/).entries()) {
    if (line === "") continue;
    if (cases.has(line)) chosen.add(line);
    else {
      const near = `must be a case of the table (nearest: ${nearest(line, [...cases])})`;
      faults.push({ line: i + 1, text: `${near}: current value is ${quoted(line)}` });
    }
  }
  if (faults.length > 0) throw new TableError(faults, "the list of profiles");
  return chosen;
}
