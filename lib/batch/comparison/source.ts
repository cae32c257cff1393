/**
 * A results table as a comparison reads it: once, row by row, each row checked as it comes.
 *
 * @module
 */
import { createHash } from "node:crypto";
import { basename, dirname, resolve } from "node:path";
import { type CsvRecord, lengthFault } from "../csv.ts";
import { csvRecords } from "../csv_stream.ts";
import { csvLines } from "../csv_writer.ts";
import type { Fault } from "../fault.ts";
import { FILES } from "../folder.ts";
import type { RunIdentity, RunRecord } from "../record.ts";
import { readRecordHead } from "../record_file.ts";
import type { ResultCells } from "../result_row.ts";
import { ComparisonError, faultText, MOST_FAULTS } from "./comparison_error.ts";
import { rowChecker } from "./row_check.ts";

/** Inputs of a row: columns of the parameter table, defaults filled in. */
export type Inputs = Readonly<Record<string, string | number>>;

/** Rows in memory, such as those of a run that was read, or of rows that were solved again. */
export interface RowsInMemory {
  /** What they are called. */
  readonly name: string;
  /** Cells by column name. */
  readonly rows: readonly ResultCells[];
  /** Folder of the run that they are from: its record says what entered their stamps. */
  readonly folder?: string;
  /** What entered their stamps, where no folder tells. */
  readonly identity?: RunIdentity;
  /** Inputs by case as they enter stamps, where no folder tells. */
  readonly inputs?: ReadonlyMap<string, Inputs>;
}

/** What is compared: the output folder of a run, a results table, or rows in memory. */
export type ComparedSource = string | RowsInMemory;

/** A row under way. */
export interface SourceRow {
  /** Case. */
  readonly case: string;
  /** Cells by column name. */
  readonly cells: ResultCells;
}

/** What is known about all rows of a run. */
export type KnownRun =
  & Pick<RunRecord, "identity">
  & Partial<Pick<RunRecord, "total" | "results">>;

/** A results table that is about to be read. */
export interface Source {
  /** What it is called. */
  readonly name: string;
  /** Where it is, for errors. */
  readonly place: string;
  /** Folder of the run. */
  readonly folder?: string;
  /** Inputs by case, where they are known without a folder. */
  readonly inputs?: ReadonlyMap<string, Inputs>;
  /** The run, where its record can be read. */
  readonly run?: KnownRun;
  /** Header. */
  readonly columns: readonly string[];
  /** The rows; can be read once. */
  readonly rows: AsyncGenerator<SourceRow>;
  /** SHA-256 of the table, once all rows were read. */
  readonly digest: () => string;
  /** Everything that was wrong so far. */
  readonly faults: readonly Fault[];
}

/** Columns without which a table is no results table. */
const REQUIRED = ["case", "model", "state", "outcome", "kind", "stamp"];
function headerFaults({ fields, line }: CsvRecord): Fault[] {
  const twice = fields.filter((name, i) => fields.indexOf(name) !== i);
  return [
    ...REQUIRED.filter((name) => !fields.includes(name)).map((column) => ({
      line,
      column,
      text: "is missing in the header",
    })),
    ...twice.map((column) => ({ line, column, text: "must stand in the header once only" })),
  ];
}

interface Opened {
  readonly name: string;
  readonly place: string;
  readonly folder?: string;
  readonly records: AsyncGenerator<CsvRecord>;
  readonly digest: () => string;
  readonly faults: Fault[];
  readonly run?: KnownRun;
  readonly inputs?: ReadonlyMap<string, Inputs>;
}

async function* checkedRows(columns: readonly string[], { records, faults }: Opened) {
  const check = rowChecker(columns);
  for await (const record of records) {
    const length = lengthFault(record, columns.length);
    const cells = Object.fromEntries(columns.map((name, i) => [name, record.fields[i] ?? ""]));
    const found = length ? [length] : check(cells, record.line);
    if (faults.length <= MOST_FAULTS) faults.push(...found);
    if (found.length === 0) yield { case: cells["case"], cells };
  }
}

async function sourceOf(opened: Opened): Promise<Source> {
  const { records, ...rest } = opened, { faults } = rest;
  const first = await records.next();
  if (first.done) {
    if (faults.length === 0) {
      faults.push({ line: 1, text: "a header must stand here: it is empty" });
    }
  } else faults.push(...headerFaults(first.value));
  const text = faultText(opened);
  if (text !== undefined) {
    await records.return(undefined);
    throw new ComparisonError([text]);
  }
  const columns = (first.value as CsvRecord).fields;
  return { ...rest, columns, rows: checkedRows(columns, opened) };
}

function knownRun(folder: string): { readonly run?: KnownRun } {
  const record = readRecordHead(`${folder}/${FILES.record}`);
  if (record === undefined) return {};
  const { identity, total, results } = record;
  return { run: { identity, total, ...(results ? { results } : {}) } };
}

function nameOf(path: string): string {
  const whole = resolve(path);
  return basename(basename(whole) === FILES.results ? dirname(whole) : whole);
}

async function openFile(path: string): Promise<Opened> {
  let folder: string | undefined, file: Deno.FsFile;
  try {
    if ((await Deno.stat(path)).isDirectory) folder = path;
    file = await Deno.open(folder === undefined ? path : `${folder}/${FILES.results}`);
  } catch (error) {
    const must = "it must be the output folder of a run or its results.csv";
    const absent = error instanceof Deno.errors.NotFound;
    const found = absent ? `there is no ${folder ? FILES.results : "such path"}` : String(error);
    throw new ComparisonError([`Cannot compare ${path} as ${must}: ${found}`]);
  }
  const hash = createHash("sha256"), faults: Fault[] = [];
  async function* bytes() {
    for await (const piece of file.readable) {
      hash.update(piece);
      yield piece;
    }
  }
  const digest = () => hash.copy().digest("hex");
  const known = folder === undefined ? {} : { folder, ...knownRun(folder) };
  return {
    ...known,
    name: nameOf(path),
    place: path,
    records: csvRecords(bytes(), faults),
    faults,
    digest,
  };
}

function openRows({ rows, name, identity, folder, inputs }: RowsInMemory): Opened {
  const hash = createHash("sha256"), columns = Object.keys(rows[0] ?? {});
  async function* records() {
    const lines = rows.map((row) => columns.map((column) => row[column] ?? ""));
    for (const [i, fields] of [columns, ...lines].entries()) {
      hash.update(csvLines([fields]));
      yield { fields, line: i + 1 };
    }
  }
  const digest = () => hash.copy().digest("hex");
  const told = identity ??
    (folder === undefined ? undefined : readRecordHead(`${folder}/${FILES.record}`)?.identity);
  const run = told === undefined ? {} : { run: { identity: told } };
  const given = inputs ? { inputs } : folder === undefined ? {} : { folder };
  return { name, place: name, records: records(), faults: [], digest, ...run, ...given };
}

/**
 * Opens what is compared.
 *
 * @param source Folder of a run, results table, or rows in memory with the same columns each.
 * @returns The table, its header read.
 * @throws {ComparisonError} if there is no such table or its header is not that of results.
 */
export async function openSource(source: ComparedSource): Promise<Source> {
  return await sourceOf(typeof source === "string" ? await openFile(source) : openRows(source));
}
