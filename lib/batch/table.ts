/**
 * The parameter table: read whole, checked whole, and refused whole if anything is wrong with it.
 *
 * @module
 */
import { EXCLUSIVE, FIELD_COLUMNS, TABLE_COLUMNS } from "./columns.ts";
import { type CsvRecord, eachRecord, lengthFault } from "./csv.ts";
import { type Fault, quoted, TableError } from "./fault.ts";
import { nearest } from "./nearest.ts";
import { type Cells, readRow, type TableRow } from "./row_reader.ts";

const REQUIRED = ["case", "model", "state"] as const;
/** Groups of which every row of every model and state needs a member. */
const NEEDED_BY_ALL = EXCLUSIVE.filter((group) => group[0] === "kappa" || group[0] === "mass");

/** Groups of which every row needs a member and the header has none; rows that count fields need no kappa. */
function lacking(has: (column: string) => boolean): readonly (readonly string[])[] {
  const counted = FIELD_COLUMNS.some(has);
  return NEEDED_BY_ALL.filter((group) => !group.some(has) && !(counted && group[0] === "kappa"));
}

function headerFaults({ fields, line }: CsvRecord): Fault[] {
  const faults: Fault[] = [];
  if (fields.length > 2 * TABLE_COLUMNS.length) {
    const most = `must have at most ${TABLE_COLUMNS.length} columns`;
    return [{ line, text: `${most}: current count is ${fields.length}` }];
  }
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
  for (const group of lacking((name) => seen.has(name))) {
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
  const faults: Fault[] = [], rows: TableRow[] = [];
  let header: CsvRecord | undefined, records = 0;
  let readRecord: (record: CsvRecord) => void = () => {};
  const textFaults = eachRecord(bytes, (record) => {
    if (header === undefined) {
      header = record;
      faults.push(...headerFaults(record));
      readRecord = recordReader(record, faults, rows);
    } else if (faults.length < MOST_FAULTS && records <= MOST_ROWS) readRecord(record);
    if (++records === MOST_ROWS + 2) {
      const text = `must be at most ${MOST_ROWS} rows, of which more are better split`;
      faults.push({ line: record.line, text: `${text}: there is one more` });
    }
  });
  // A header that could not be read makes a header of the row below it, and nonsense of the rest.
  if (textFaults.some(({ line }) => line < (header?.line ?? 0))) throw new TableError(textFaults);
  faults.push(...textFaults);
  if (textFaults.length === 0 && records === 0) {
    faults.push({ line: 1, text: "a header must follow: the file is empty" });
  }
  if (textFaults.length === 0 && records === 1) {
    faults.push({ line: header!.line, text: "at least one row must follow the header" });
  }
  if (faults.length > 0) throw new TableError(faults);
  return rows;
}

/** Rows a table may have. */
const MOST_ROWS = 1_000_000;
/** Faults that are told; whoever has more of them has one kind of fault many times. */
const MOST_FAULTS = 1000;

/** Reads the records after the header into rows or faults. */
function recordReader(
  header: CsvRecord,
  faults: Fault[],
  rows: TableRow[],
): (record: CsvRecord) => void {
  const index = new Map(header.fields.map((name, i) => [name, i]));
  const lineOfCase = new Map<string, number>(), has = (column: string) => index.has(column);
  const absent = lacking(has).flat();
  return (record) => {
    const short = lengthFault(record, header.fields.length);
    if (short) {
      faults.push(short);
      return;
    }
    const { line, fields } = record;
    const cells: Cells = { line, text: (column) => fields[index.get(column) ?? -1] ?? "", has };
    const read = readRow(cells);
    // A column that is missing as a whole is one fault of the header, not one of each row.
    faults.push(...read.faults.filter((f) => !absent.includes(f.column ?? "")));
    const name = read.case.toLowerCase(), first = lineOfCase.get(name);
    if (name !== "" && first !== undefined) {
      const text = `must be unique, ignoring case, and line ${first} has it: current value is ${
        quoted(read.case)
      }`;
      faults.push({ line, column: "case", text });
    } else lineOfCase.set(name, line);
    if (read.row) rows.push(read.row);
  };
}
