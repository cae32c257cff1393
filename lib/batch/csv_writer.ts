/**
 * Records of output tables as CSV lines (RFC 4180 fields, each line ended by one LF).
 *
 * @module
 */
import { stringify } from "csv-stringify/sync";

/**
 * Writes records.
 *
 * @param records Fields of each record.
 * @returns Lines; a field is quoted only if it must be.
 */
export function csvLines(records: readonly (readonly string[])[]): string {
  return stringify(records as string[][], { record_delimiter: "\n" });
}
