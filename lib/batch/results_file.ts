/**
 * results.csv as lines, in table order.
 *
 * @module
 */
import { csvLines } from "./csv_writer.ts";
import { RESULT_COLUMNS } from "./result_columns.ts";
import type { ResultCells } from "./result_row.ts";

const NAMES = RESULT_COLUMNS.map((column) => column.name);

/** The header line. */
export const RESULTS_HEADER = csvLines([NAMES]);

/**
 * Writes results.
 *
 * @param rows Finished rows in table order.
 * @returns Their lines.
 */
export function resultsLines(rows: readonly ResultCells[]): string {
  return csvLines(rows.map((cells) => NAMES.map((name) => cells[name]!)));
}
