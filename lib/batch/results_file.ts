/**
 * results.csv as a whole: written in table order, read back to be completed.
 *
 * @module
 */
import { readCsv } from "./csv.ts";
import { csvLines } from "./csv_writer.ts";
import { RESULT_COLUMNS } from "./result_columns.ts";
import type { ResultCells } from "./result_row.ts";

const NAMES = RESULT_COLUMNS.map((column) => column.name);

/**
 * Writes results.
 *
 * @param rows Finished rows in table order.
 * @returns The text of results.csv.
 */
export function resultsText(rows: readonly ResultCells[]): string {
  return csvLines([NAMES, ...rows.map((cells) => NAMES.map((name) => cells[name]!))]);
}

/**
 * Reads results back.
 *
 * @param bytes The file.
 * @returns Cells by case; empty if the header is not that of this version.
 */
export function readResults(bytes: Uint8Array): ReadonlyMap<string, ResultCells> {
  const { records, faults } = readCsv(bytes);
  const [header, ...rest] = records;
  if (faults.length > 0 || header?.fields.join() !== NAMES.join()) return new Map();
  return new Map(
    rest.map(({ fields }) => {
      const cells = Object.fromEntries(NAMES.map((name, i) => [name, fields[i]!]));
      return [cells["case"]!, cells] as const;
    }),
  );
}
