/**
 * One record of results.csv, checked on the way out: what breaks the contract of the table is never
 * written.
 *
 * @module
 */
import {
  type Bounded,
  NUMERIC_COLUMNS,
  type NumericColumn,
  type RowResult,
} from "../observe/result.ts";
import { echoedNumbers } from "./echo.ts";
import { writeNumber } from "./number.ts";
import { RESULT_COLUMNS } from "./result_columns.ts";
import type { TableRow } from "./row_reader.ts";

/** Cells of one record by column name; every column of the results table is a key. */
export type ResultCells = Readonly<Record<string, string>>;

/** Kinds at whose locus a given horizon dilaton is the dilaton itself. */
const AT_HORIZON = ["horizon", "extremal-horizon", "singular-horizon"];

function fail(row: TableRow, must: string, value: unknown): never {
  throw new Error(
    `Cannot write the result of case ${row.case} as ${must}: current value is ${value}`,
  );
}

function check(row: TableRow, name: string, { value, error }: Bounded): void {
  if (Number.isNaN(value)) fail(row, `${name} must not be NaN`, value);
  if (!Number.isFinite(value)) {
    if (error !== undefined) fail(row, `${name}_err must be absent where ${name} diverges`, error);
  } else if (error === undefined || !(error >= 0 && error < Infinity)) {
    fail(row, `${name}_err must be finite and >= 0`, error);
  }
}

function checkUnderflow(row: TableRow, numbers: RowResult["numbers"]): void {
  const gtt = numbers.minus_gtt_locus, log = numbers.log10_minus_gtt_locus;
  if (gtt?.value !== 0 || log === undefined || log.value === -Infinity) return;
  // A finite logarithm says that -g_tt is not 0 but below the smallest double.
  if (!(gtt.error! >= Number.MIN_VALUE)) {
    fail(row, "a -g_tt too small for a double must be 0 with error 5e-324", gtt.error);
  }
}

function numbersOf(row: TableRow, result: RowResult): Partial<Record<NumericColumn, Bounded>> {
  const { horizonDilaton } = row.input;
  const numbers = { ...result.numbers };
  if (result.outcome !== "solved" && Object.keys(numbers).length > 0) {
    for (const name of NUMERIC_COLUMNS) delete numbers[name]; // only the inputs stay
  }
  Object.assign(numbers, echoedNumbers(row));
  if (
    horizonDilaton !== undefined && numbers.dilaton_locus && AT_HORIZON.includes(result.kind ?? "")
  ) {
    numbers.dilaton_locus = { value: horizonDilaton, error: 0 };
  }
  return numbers;
}

/**
 * Text columns with what they match. Each begins with a letter or a digit, so that no spreadsheet takes a
 * text of the table for a formula, and nothing need be added to texts that would have to be taken off again.
 */
const TEXTS = RESULT_COLUMNS.flatMap(({ name, datatype }) =>
  datatype === "double" || name === "stamp" ? [] : [[name, new RegExp(`^(${datatype.format})$`)]]
) as readonly (readonly [string, RegExp])[];

/** A row with all columns and nothing in them. */
const EMPTY: ResultCells = Object.fromEntries(RESULT_COLUMNS.map(({ name }) => [name, ""]));
/** Numeric columns with their columns of bounds. */
const PAIRS = NUMERIC_COLUMNS.map((name) => [name, `${name}_err`] as const);

/**
 * Cells of one results row.
 *
 * @param row The row of the parameter table.
 * @param result What the solver returned for it.
 * @param stamp Its stamp.
 * @returns Text by column name, empty where not applicable.
 * @throws {Error} if the result has a text that its column does not allow, a NaN, a missing or negative bound, or a kind without being solved.
 */
export function resultCells(row: TableRow, result: RowResult, stamp: string): ResultCells {
  const { input } = row;
  const solved = result.outcome === "solved";
  if (solved !== (result.kind !== undefined)) {
    fail(row, "kind must be given if solved", result.kind);
  }
  if (!solved && result.reason === "") fail(row, "a reason must be given", result.outcome);
  const numbers = numbersOf(row, result);
  const cells: Record<string, string> = { ...EMPTY };
  const write = (name: string, value: number | undefined) => {
    if (value !== undefined) cells[name] = writeNumber(value);
  };
  Object.assign(cells, {
    case: row.case,
    model: input.model,
    state: input.state,
    outcome: result.outcome,
    reason: result.reason,
    kind: result.kind ?? "",
    inner_end: solved ? result.innerEnd ?? "" : "",
    validity: solved ? result.validity ?? "" : "",
    stamp,
  });
  write("kappa", input.model === "anomaly4d" ? undefined : input.kappa);
  write("lambda", input.lambda);
  write("a", input.a);
  write("wall_radius", input.wallRadius);
  write("tolerance", input.tolerance);
  for (const [name, bound] of PAIRS) {
    const number = numbers[name];
    if (number === undefined) continue;
    check(row, name, number);
    write(name, number.value);
    write(bound, number.error);
  }
  checkUnderflow(row, numbers);
  for (const [name, format] of TEXTS) {
    const text = cells[name]!;
    if (text === "" || format.test(text)) continue;
    fail(row, `${name} must match ${format.source}`, JSON.stringify(text));
  }
  return cells;
}
