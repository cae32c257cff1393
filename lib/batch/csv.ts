/**
 * Records of a CSV file (RFC 4180, UTF-8) with the lines they stand on.
 *
 * @module
 */
import { type CsvError, parse } from "csv-parse/sync";
import { type Fault, quoted } from "./fault.ts";

/** One record: its fields and the line of the file it begins on. */
export interface CsvRecord {
  /** Fields, unquoted. */
  readonly fields: readonly string[];
  /** Line of the file, from 1. */
  readonly line: number;
}

/** The readable records of a file, and the faults of the others. */
export interface CsvFile {
  /** Records in order, the header first. */
  readonly records: readonly CsvRecord[];
  /** Faults of encoding, line ends and quotes. */
  readonly faults: readonly Fault[];
}

function decode(bytes: Uint8Array): string | Fault {
  const decoder = new TextDecoder("utf-8", { fatal: true }); // drops a byte order mark
  try {
    return decoder.decode(bytes);
  } catch {
    let line = 1;
    for (let from = 0; from < bytes.length; line++) {
      const end = bytes.indexOf(10, from);
      const to = end < 0 ? bytes.length : end + 1;
      try {
        decoder.decode(bytes.subarray(from, to));
      } catch {
        break;
      }
      from = to;
    }
    return { line, text: "must be UTF-8 text: current value has bytes that are not" };
  }
}

/** Bytes of a record at most: an unclosed quotation mark makes one of the whole file. */
const LONGEST_RECORD = 1 << 16;

const QUOTE_FAULTS: Readonly<Record<string, string>> = {
  INVALID_OPENING_QUOTE: "a quotation mark must begin a field and be doubled inside it",
  CSV_INVALID_CLOSING_QUOTE: "a closing quotation mark must end its field",
  CSV_MAX_RECORD_SIZE:
    `a record must have at most ${LONGEST_RECORD} bytes: a quotation mark may not be closed`,
  CSV_QUOTE_NOT_CLOSED: "a quoted field must be closed before the end of the file",
};

function quoteFaults(errors: readonly CsvError[]): Fault[] {
  const faults: Fault[] = [];
  for (const error of errors) {
    const must = QUOTE_FAULTS[error.code];
    const at = error as CsvError & { readonly lines?: number };
    faults.push({ line: at.lines ?? 1, text: must ?? error.message });
    // What follows a wrongly closed field is read inside out: its complaints would mislead.
    if (error.code !== "INVALID_OPENING_QUOTE") break;
  }
  return faults;
}

/** Lines without quotation marks need no parser. */
function eachPlainRecord(text: string, onRecord: (record: CsvRecord) => void): void {
  for (let from = 0, line = 1; from < text.length; line++) {
    const end = text.indexOf("\n", from), to = end < 0 ? text.length : end;
    const last = text.charCodeAt(to - 1) === 13 && to > from ? to - 1 : to;
    if (last > from) onRecord({ fields: text.slice(from, last).split(","), line });
    from = to + 1;
  }
}

function eachQuotedRecord(text: string, onRecord: (record: CsvRecord) => void): Fault[] {
  const errors: CsvError[] = [];
  parse(text, {
    record_delimiter: ["\r\n", "\n"],
    relax_column_count: true,
    skip_empty_lines: true,
    skip_records_with_error: true,
    max_record_size: LONGEST_RECORD,
    on_record: (fields: string[], { lines }: { lines: number }) => {
      const inner = fields.reduce((n, field) => n + field.split("\n").length - 1, 0);
      onRecord({ fields, line: lines - inner });
      return null; // gathered by nobody
    },
    on_skip: (error) => {
      if (error) errors.push(error);
      return undefined;
    },
  });
  return quoteFaults(errors);
}

/**
 * Reads records one by one. Line ends may be LF or CRLF, a byte order mark and blank lines are passed over.
 *
 * @param bytes The file.
 * @param onRecord Called for each record in order, the header first.
 * @returns Faults of encoding, line ends and quotes; records may be missing only if there are faults.
 */
export function eachRecord(bytes: Uint8Array, onRecord: (record: CsvRecord) => void): Fault[] {
  const text = decode(bytes);
  if (typeof text !== "string") return [text];
  const stray = text.search(/\r(?!\n)/);
  if (stray >= 0) {
    const line = text.slice(0, stray).split("\n").length;
    return [{ line, text: "a line must end with LF or CRLF: current value has a lone CR" }];
  }
  if (text.includes('"')) return eachQuotedRecord(text, onRecord);
  eachPlainRecord(text, onRecord);
  return [];
}

/**
 * Reads all records, see {@linkcode eachRecord}.
 *
 * @param bytes The file.
 * @returns Records and faults.
 */
export function readCsv(bytes: Uint8Array): CsvFile {
  const records: CsvRecord[] = [];
  const faults = eachRecord(bytes, (record) => records.push(record));
  return { records, faults };
}

/** A field count that differs from the header's, as a fault. */
export function lengthFault(record: CsvRecord, width: number): Fault | undefined {
  if (record.fields.length === width) return undefined;
  const text =
    `must have ${width} fields as the header has: current count is ${record.fields.length}`;
  return { line: record.line, text: `${text}, beginning with ${quoted(record.fields[0] ?? "")}` };
}
