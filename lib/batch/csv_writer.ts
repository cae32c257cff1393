/**
 * Records of output tables as CSV lines (RFC 4180 fields, each line ended by one LF).
 *
 * @module
 */

function fieldText(field: string): string {
  return /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;
}

/**
 * Writes records.
 *
 * @param records Fields of each record.
 * @returns Lines; a field is quoted only if it must be.
 */
export function csvLines(records: readonly (readonly string[])[]): string {
  return records.map((fields) => `${fields.map(fieldText).join(",")}\n`).join("");
}
