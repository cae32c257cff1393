/**
 * How one row of a results table differs from the row of the same case in another.
 *
 * @module
 */
import type { Bounded } from "../../observe/result.ts";
import { readResultNumber } from "../number.ts";
import type { ResultCells } from "../result_row.ts";
import { excess } from "./excess.ts";

/** What may have become of a row, from nothing to everything; a row is of the last class that holds. */
export const ROW_CHANGES = [
  "identical",
  "stamp",
  "within",
  "beyond",
  "kind",
  "inputs",
  "added",
  "removed",
] as const;

/**
 * What became of a row. `identical`: every cell reads the same. `stamp`: the stamp differs, perhaps with the
 * tolerance, and no number does. `within`: numbers differ by no more than the sum of their bounds, or bounds
 * or the prose of a reason do. `beyond`: a number differs by more, or became empty or divergent. `kind`: the
 * kind, outcome, reason code, validity or inner end differs. `inputs`: another question was asked. `added`,
 * `removed`: one table only has the case.
 */
export type RowChange = (typeof ROW_CHANGES)[number];

/** One cell that differs, as the tables have it. */
export interface Difference {
  /** Case. */
  readonly case: string;
  /** Column; `case` for a row that only one table has. */
  readonly column: string;
  /** Cell of the first table. */
  readonly a: string;
  /** Bound of the first cell; empty where it has none. */
  readonly aError: string;
  /** Cell of the second table. */
  readonly b: string;
  /** Bound of the second cell; empty where it has none. */
  readonly bError: string;
  /** Distance over the sum of the bounds; absent for words. */
  readonly excess?: number;
  /** What this cell alone would make of its row. */
  readonly change: RowChange;
}

/** A difference before it is judged. */
export type Unjudged = Omit<Difference, "change">;

/** What the comparison of two rows says. */
export interface RowComparison {
  /** What became of the row. */
  readonly change: RowChange;
  /** The cells that differ, in the order of the columns. */
  readonly differences: readonly Difference[];
}

/** Columns that say which question a row asks. */
const INPUTS = ["model", "state", "kappa", "lambda", "a", "wall_radius"];
/** Columns that say what is there, in words. */
const DECISIONS = ["outcome", "reason", "kind", "inner_end", "validity"];
/** Columns that say how it was found out. A tolerance is a demand on the bounds, not another question. */
const PROVENANCE = ["tolerance", "stamp"];
/** Numeric columns that repeat an input where they are exact. */
const ECHOED = ["mass", "bath_ratio", "bath_ratio_minus_one"];

/** A column that two tables share. */
export interface SharedColumn {
  /** Name. */
  readonly name: string;
  /** Whether its cells are compared as words: what is given, decided, or said about provenance. */
  readonly words: boolean;
  /** Column of its bounds; empty where they do not share one. */
  readonly bound: string;
}

/**
 * The columns that two tables share, but for the case.
 *
 * @param a Header of the first table.
 * @param b Header of the second.
 * @returns Columns in the order of the first; columns of bounds belong to those they bound.
 */
export function sharedColumns(a: readonly string[], b: readonly string[]): readonly SharedColumn[] {
  const both = a.filter((name) => b.includes(name));
  return both.filter((name) => name !== "case" && !name.endsWith("_err")).map((name) => ({
    name,
    words: [INPUTS, DECISIONS, PROVENANCE].some((names) => names.includes(name)),
    bound: both.includes(`${name}_err`) ? `${name}_err` : "",
  }));
}

/** A cell as a number with its bound, undefined where it is empty. */
function numberOf(cells: ResultCells, column: string): Bounded | undefined {
  const value = readResultNumber(cells[column]);
  const error = readResultNumber(cells[`${column}_err`] ?? "");
  if (value === undefined) return undefined;
  return error === undefined ? { value } : { value, error };
}

/** Whether both numbers are exact repetitions of what was given, the horizon's dilaton among them. */
function echoed(column: string, a: ResultCells, b: ResultCells): boolean {
  const given = ECHOED.includes(column) ||
    (column === "dilaton_locus" && a["state"] === "hartle-hawking");
  const exact = (cells: ResultCells) =>
    cells[column] !== "" && readResultNumber(cells[`${column}_err`] ?? "") === 0;
  return given && exact(a) && exact(b);
}

type Rows = readonly [a: ResultCells, b: ResultCells];

function numberChange({ name, bound }: SharedColumn, [a, b]: Rows): Unjudged | undefined {
  const [aError, bError] = [a[bound] ?? "", b[bound] ?? ""];
  if (a[name] === b[name] && aError === bError) return undefined;
  const cells = { case: a["case"], column: name, a: a[name], aError, b: b[name], bError };
  const x = numberOf(a, name), y = numberOf(b, name);
  const comparable = x && y && !Number.isNaN(x.value) && !Number.isNaN(y.value);
  if (!comparable) return { ...cells, excess: Infinity }; // one is empty, or words
  const sameBound = readResultNumber(aError) === readResultNumber(bError);
  return x.value === y.value && sameBound ? undefined : { ...cells, excess: excess(x, y) };
}

function wordChange({ name }: SharedColumn, [a, b]: Rows): Unjudged | undefined {
  if (a[name] === b[name]) return undefined;
  const number = name === "stamp" ? undefined : readResultNumber(a[name]);
  if (number !== undefined && number === readResultNumber(b[name])) return undefined; // 1e1 is 10
  return { case: a["case"], column: name, a: a[name], aError: "", b: b[name], bError: "" };
}

const codeOf = (reason: string): string => reason.split(":")[0];

function changeOf(difference: Unjudged, [a, b]: Rows, given?: readonly Unjudged[]): RowChange {
  const { column } = difference;
  if (PROVENANCE.includes(column)) return "stamp";
  if (INPUTS.includes(column) || given?.some((g) => g.column === column)) return "inputs";
  if (column === "reason" && codeOf(difference.a) === codeOf(difference.b)) return "within";
  if (DECISIONS.includes(column)) return "kind";
  if (!(difference.excess! > 1)) return "within";
  return given === undefined && echoed(column, a, b) ? "inputs" : "beyond";
}

/**
 * Compares two rows of one case.
 *
 * @param a Cells of the first table.
 * @param b Cells of the second.
 * @param columns Columns that both tables have.
 * @param given Parameters that differ, from the parameter tables. Without these, exact numbers that a row
 * repeats from its inputs count as inputs.
 * @returns What became of the row, and every cell that differs.
 */
export function compareRow(
  a: ResultCells,
  b: ResultCells,
  columns: readonly SharedColumn[],
  given?: readonly Unjudged[],
): RowComparison {
  const differences: Difference[] = [], rows: Rows = [a, b];
  for (const column of columns) {
    const found = column.words ? wordChange(column, rows) : numberChange(column, rows);
    if (found) differences.push({ ...found, change: changeOf(found, rows, given) });
  }
  const hidden = (given ?? []).filter((g) => !differences.some((d) => d.column === g.column));
  differences.push(...hidden.map((g) => ({ ...g, change: "inputs" as const })));
  const last = differences.reduce((most, d) => Math.max(most, ROW_CHANGES.indexOf(d.change)), 0);
  return { change: ROW_CHANGES[last], differences };
}
