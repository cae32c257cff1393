/**
 * The parameter table: read whole, checked whole, and refused whole if anything is wrong with it.
 *
 * @module
 */
import { EXCLUSIVE, FIELD_COLUMNS, TABLE_COLUMNS } from "./columns.ts";
import { type CsvRecord, lengthFault, readCsv } from "./csv.ts";
import { type Fault, quoted, TableError } from "./fault.ts";
import { nearest } from "./nearest.ts";
import { type Cells, readRow, type TableRow } from "./row_reader.ts";

const REQUIRED = ["case", "model", "state"] as const;
/** Groups of which every row of every model and state needs a member. */
const NEEDED_BY_ALL = EXCLUSIVE.filter((group) => group[0] === "kappa" || group[0] === "mass");

function headerFaults({ fields, line }: CsvRecord): Fault[] {
  const faults: Fault[] = [];
  const seen = new Set<string>();
  for (const [index, name] of fields.entries()) {
    if (name === "") {
      faults.push({ line, text: `column ${index + 1} must have a name: current name is empty` });
    } else if (!TABLE_COLUMNS.includes(name)) {
      const right = nearest(name, TABLE_COLUMNS);
      const must = `must be one of ${TABLE_COLUMNS.join(", ")} (nearest: ${right})`;
      faults.push({ line, column: name.slice(0, 64), text: `${must}: current name is unknown` });
    } else if (seen.has(name)) {
      faults.push({ line, column: name, text: "must stand in the header once only" });
    }
    seen.add(name);
  }
  for (const name of REQUIRED) {
    if (!seen.has(name)) faults.push({ line, column: name, text: "is missing in the header" });
  }
  const counted = FIELD_COLUMNS.some((name) => seen.has(name)); // rows may have no kappa
  for (const group of NEEDED_BY_ALL) {
    if (group.some((name) => seen.has(name)) || (counted && group[0] === "kappa")) continue;
    const text = `is missing in the header, as is ${
      group.slice(1).join(" and ")
    }: every row needs one`;
    faults.push({ line, column: group[0]!, text });
  }
  return faults;
}

/**
 * Reads a parameter table.
 *
 * @param bytes The file: CSV (RFC 4180), UTF-8, with a header line.
 * @returns Its rows in order.
 * @throws {TableError} with every fault, each with line, column and what would be right.
 */
export function readTable(bytes: Uint8Array): readonly TableRow[] {
  const { records, faults: textFaults } = readCsv(bytes);
  const faults: Fault[] = [...textFaults];
  const [header, ...rest] = records;
  if (header === undefined) {
    if (faults.length === 0) {
      faults.push({ line: 1, text: "a header must follow: the file is empty" });
    }
    throw new TableError(faults);
  }
  faults.push(...headerFaults(header));
  if (rest.length === 0 && textFaults.length === 0) {
    faults.push({ line: header.line, text: "at least one row must follow the header" });
  }
  const index = new Map(header.fields.map((name, i) => [name, i]));
  const counted = FIELD_COLUMNS.some((name) => index.has(name));
  const absent = NEEDED_BY_ALL.filter((group) =>
    !group.some((name) => index.has(name)) && !(counted && group[0] === "kappa")
  ).flat();
  const rows: TableRow[] = [], lineOfCase = new Map<string, number>();
  for (const record of rest) {
    const short = lengthFault(record, header.fields.length);
    if (short) {
      faults.push(short);
      continue;
    }
    const cells: Cells = {
      line: record.line,
      text: (column) => record.fields[index.get(column) ?? -1] ?? "",
      has: (column) => index.has(column),
    };
    const read = readRow(cells);
    // A column that is missing as a whole is one fault of the header, not one of each row.
    faults.push(...read.faults.filter((f) => !absent.includes(f.column ?? "")));
    const first = lineOfCase.get(read.case.toLowerCase());
    if (read.case !== "" && first !== undefined) {
      const text = `must be unique, ignoring case, and line ${first} has it: current value is ${
        quoted(read.case)
      }`;
      faults.push({ line: record.line, column: "case", text });
    } else lineOfCase.set(read.case.toLowerCase(), record.line);
    if (read.row) rows.push(read.row);
  }
  if (faults.length > 0) throw new TableError(faults);
  return rows;
}
