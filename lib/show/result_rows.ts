/**
 * Reads a results table and a profile back for drawing: text in, rows out.
 *
 * @module
 */
import { readCsv } from "../batch/csv.ts";
import { readResultNumber } from "../batch/number.ts";
import { PROFILE_COLUMNS, type ProfileColumn } from "../observe/result.ts";

/** One row of a results table, as far as figures need it; absent where the cell is empty. */
export interface ResultRow {
  /** Name of the case. */
  readonly case: string;
  /** Model. */
  readonly model: string;
  /** State of the matter fields. */
  readonly state: string;
  /** solved, refused or failed. */
  readonly outcome: string;
  /** Kind of solution, empty unless solved. */
  readonly kind: string;
  /** Stamp, 64 hexadecimal digits. */
  readonly stamp: string;
  /** Every numeric cell that is not empty, by column; infinities for divergent quantities. */
  readonly numbers: Readonly<Record<string, number>>;
}

/** Columns of a profile; NaN stands for an empty cell and is never drawn. */
export type ProfileRows = Readonly<Record<ProfileColumn, readonly number[]>>;

const TEXT_COLUMNS = [
  "case",
  "model",
  "state",
  "outcome",
  "reason",
  "kind",
  "inner_end",
  "validity",
  "stamp",
];

/** Numeric columns that the figures read. */
const NEEDED = [
  "kappa",
  "lambda",
  "a",
  "wall_radius",
  "mass",
  "bath_ratio",
  "dilaton_locus",
  "log10_minus_gtt_locus",
  "curvature_locus",
];

/**
 * Reads a results table.
 *
 * @param bytes Contents of `results.csv`.
 * @throws {Error} if the file is not readable, a column is missing or a cell is not a number.
 */
export function readResultRows(bytes: Uint8Array): ResultRow[] {
  const { header, rows } = records(bytes, "results table");
  demand(
    header,
    ["case", "model", "state", "outcome", "kind", "stamp", ...NEEDED],
    "results table",
  );
  return rows.map(({ fields, line }) => {
    const text = (name: string) => fields[header.indexOf(name)];
    const numbers: Record<string, number> = {};
    header.forEach((name, i) => {
      if (TEXT_COLUMNS.includes(name)) return;
      const value = numberAt(fields[i], { line, name });
      if (value !== undefined) numbers[name] = value;
    });
    return {
      case: text("case"),
      model: text("model"),
      state: text("state"),
      outcome: text("outcome"),
      kind: text("kind"),
      stamp: text("stamp"),
      numbers,
    };
  });
}

/**
 * Reads a profile.
 *
 * @param bytes Contents of a file of `profiles/`.
 * @throws {Error} if the file is not readable, a column is missing or a cell is not a number.
 */
export function readProfileRows(bytes: Uint8Array): ProfileRows {
  const { header, rows } = records(bytes, "profile");
  demand(header, PROFILE_COLUMNS, "profile");
  const columns = {} as Record<ProfileColumn, number[]>;
  for (const name of PROFILE_COLUMNS) {
    const at = header.indexOf(name);
    columns[name] = rows.map(({ fields, line }) => numberAt(fields[at], { line, name }) ?? NaN);
  }
  return columns;
}

interface Line {
  readonly fields: readonly string[];
  readonly line: number;
}

function records(bytes: Uint8Array, what: string): { header: readonly string[]; rows: Line[] } {
  const { records: [first, ...rows], faults } = readCsv(bytes);
  if (faults.length > 0) {
    const all = faults.map((fault) => `line ${fault.line}: ${fault.text}`).join("; ");
    throw new Error(`Cannot read the ${what} as it must be a CSV file: ${all}`);
  }
  const header = first?.fields ?? [];
  const odd = rows.find((row) => row.fields.length !== header.length);
  if (odd !== undefined) {
    throw new Error(
      `Cannot read the ${what} as every line must have ${header.length} fields: ` +
        `line ${odd.line} has ${odd.fields.length}`,
    );
  }
  return { header, rows };
}

function demand(header: readonly string[], names: readonly string[], what: string): void {
  const missing = names.filter((name) => !header.includes(name));
  if (missing.length === 0) return;
  throw new Error(
    `Cannot read the ${what} as columns must be present: missing ${missing.join(", ")}`,
  );
}

function numberAt(text: string, at: { line: number; name: string }): number | undefined {
  const value = readResultNumber(text);
  if (!Number.isNaN(value)) return value;
  throw new Error(
    `Cannot read line ${at.line}, column ${at.name} as it must be a number, INF, -INF or empty: ` +
      `current value is "${text}"`,
  );
}
