/**
 * A finished run, read for a notebook.
 *
 * @module
 */
import { basename } from "node:path";
import { fileURLToPath } from "node:url";
import { readCsv } from "../batch/csv.ts";
import { FILES, readIfPresent } from "../batch/folder.ts";
import { readResultNumber } from "../batch/number.ts";
import { readRecordHead } from "../batch/record_file.ts";
import { RESULT_COLUMNS } from "../batch/result_columns.ts";
import type { ResultCells } from "../batch/result_row.ts";
import { sha256 } from "../batch/stamp.ts";
import type { Bounded, NumericColumn } from "../observe/result.ts";
import { RUN_VARIABLE } from "./notebook/variables.ts";

/** A finished run. */
export interface Run {
  /** Absolute path of its folder. */
  readonly folder: string;
  /** Last part of the path. */
  readonly name: string;
  /** Cells of `results.csv`, in the order of the parameter table. */
  readonly rows: readonly ResultCells[];
  /** Bytes of `results.csv`. */
  readonly results: Uint8Array<ArrayBuffer>;
  /** SHA-256 of `results.csv`: the stamp of everything that is read from here. */
  readonly stamp: string;
  /** Cases with a profile, in the order of the table. */
  readonly profiles: readonly string[];
}

/** Folder of the demo run. */
const DEMO = fileURLToPath(new URL("../../out/demo", import.meta.url));

/**
 * Reads a finished run.
 *
 * @param folder its folder; by default the one that a notebook is executed for, by hand the demo's
 * @returns the run
 * @throws {Error} if there is no such run, if it has other columns, or if `results.csv` is not the one that
 * the run wrote
 * @example
 * ```ts
 * import { readRun } from "@backstamp/backstamp";
 * let message = "";
 * try {
 *   readRun("lib");
 * } catch (error) {
 *   message = (error as Error).message;
 * }
 * if (!message.includes("must hold results.csv")) throw new Error(message);
 * ```
 */
export function readRun(folder: string = Deno.env.get(RUN_VARIABLE) || DEMO): Run {
  const results = readIfPresent(`${folder}/${FILES.results}`);
  if (results === undefined) {
    throw new Error(
      `Cannot read the run as ${folder} must hold ${FILES.results}: there is none; ` +
        '"deno task run" makes the demo',
    );
  }
  const stamp = sha256(results);
  const written = readRecordHead(`${folder}/${FILES.record}`)?.results?.sha256;
  if (written !== undefined && written !== stamp) {
    throw new Error(
      `Cannot read the run as ${FILES.results} must be as the run wrote it (SHA-256 ${written}): ` +
        `current value is ${stamp}`,
    );
  }
  const { records: [header, ...lines], faults } = readCsv(results);
  const missing = RESULT_COLUMNS.filter(({ name }) => !header?.fields.includes(name));
  if (faults.length > 0 || missing.length > 0) {
    throw new Error(
      `Cannot read the run as ${FILES.results} must be a results table: ` +
        [...faults.map((f) => f.text), ...missing.map((c) => `no column ${c.name}`)].join("; "),
    );
  }
  const rows = lines.map(({ fields }) =>
    Object.fromEntries(header.fields.map((name, i) => [name, fields[i]]))
  );
  return {
    folder,
    name: basename(folder),
    rows,
    results: new Uint8Array(results),
    stamp,
    profiles: rows.map((row) => row.case).filter((name) =>
      isFile(`${folder}/profiles/${name}.csv`)
    ),
  };
}

/**
 * A number of a results row with its bound.
 *
 * @param row cells
 * @param column numeric column
 * @returns value and bound, or undefined where the cell is empty
 * @example
 * ```ts
 * import { numberOf } from "@backstamp/backstamp";
 * const row = { mass: "10", mass_err: "0" };
 * if (numberOf(row, "mass")?.value !== 10) throw new Error();
 * ```
 */
export function numberOf(row: ResultCells, column: NumericColumn): Bounded | undefined {
  const value = readResultNumber(row[column]);
  const error = readResultNumber(row[`${column}_err`]);
  if (value === undefined) return undefined;
  return error === undefined ? { value } : { value, error };
}

function isFile(path: string): boolean {
  try {
    return Deno.statSync(path).isFile;
  } catch (error) {
    if (error instanceof Deno.errors.NotFound) return false;
    throw error;
  }
}
