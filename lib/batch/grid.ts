/**
 * Parameter tables from ranges: every combination of the linear and logarithmic ranges, each with a number
 * of seeded random draws.
 *
 * @module
 */
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { TABLE_COLUMNS } from "./columns.ts";
import { csvLines } from "./csv_writer.ts";
import { readTable } from "./table.ts";

/** A range of values of one column. */
export interface GridRange {
  /** Column. */
  readonly column: string;
  /** First value. */
  readonly from: number;
  /** Last value. */
  readonly to: number;
}

/** A range with a number of values, ends included. */
export interface SteppedRange extends GridRange {
  /** Number of values, at least 1 (then `from` alone). */
  readonly count: number;
}

/** What a table of ranges is made of. */
export interface Grid {
  /** Columns with one value each: text as it stands. */
  readonly fixed?: readonly (readonly [column: string, text: string])[];
  /** Equally spaced values. */
  readonly linear?: readonly SteppedRange[];
  /** Values equally spaced in the logarithm; ends of one sign, neither 0. */
  readonly log?: readonly SteppedRange[];
  /** Random values, uniform. */
  readonly uniform?: readonly GridRange[];
  /** Random values, uniform in the logarithm; ends of one sign, neither 0. */
  readonly logUniform?: readonly GridRange[];
  /** Random draws for each combination. @default 1 */
  readonly draws?: number;
  /** Seed of the random values, a 32-bit integer. @default 1 */
  readonly seed?: number;
  /** First part of the cases' names. @default "row" */
  readonly prefix?: string;
}

/** Rows a grid may have: more are better split into several tables. */
export const MOST_GRID_ROWS = 1_000_000;

/** Interior values are rounded to 15 digits, so that a decade is written 10 and not 9.999999999999998. */
const DIGITS = 15;

function between(range: GridRange, t: number, log: boolean): number {
  const { from, to } = range;
  if (t === 0) return from;
  if (t === 1) return to;
  const value = log
    ? Math.sign(from) * Math.exp((1 - t) * Math.log(Math.abs(from)) + t * Math.log(Math.abs(to)))
    : (1 - t) * from + t * to;
  return Number(value.toPrecision(DIGITS));
}

function stepped(range: SteppedRange, log: boolean): number[] {
  const { count } = range;
  return Array.from(
    { length: count },
    (_, i) => between(range, count > 1 ? i / (count - 1) : 0, log),
  );
}

function checkGrid({ linear = [], log = [], uniform = [], logUniform = [], ...rest }: Grid): void {
  const names = [...rest.fixed ?? []].map(([name]) => name)
    .concat([...linear, ...log, ...uniform, ...logUniform].map((range) => range.column));
  const twice = names.find((name, i) => names.indexOf(name) < i);
  if (twice !== undefined) {
    throw new RangeError(
      `Cannot make the grid as a column must be set once: ${twice} is set twice`,
    );
  }
  for (const { column, from, to } of [...log, ...logUniform]) {
    if (Math.sign(from) * Math.sign(to) > 0) continue;
    throw new RangeError(
      `Cannot make the grid as the ends of the logarithmic range of ${column} must have one sign: ` +
        `current values are ${from} and ${to}`,
    );
  }
  const count = [...linear, ...log].reduce((n, range) => n * range.count, rest.draws ?? 1);
  if (!(count >= 1 && count <= MOST_GRID_ROWS)) {
    throw new RangeError(
      `Cannot make the grid as it must have 1 to ${MOST_GRID_ROWS} rows: current count is ${count}`,
    );
  }
}

/**
 * Makes a parameter table.
 *
 * @param grid Ranges and fixed columns.
 * @returns The text of the table; the first stepped range varies slowest.
 * @throws {RangeError} if a column is set twice, a logarithmic range touches 0 or the rows are too many.
 * @throws {TableError} if the table would have faults.
 */
export function gridTable(grid: Grid): string {
  checkGrid(grid);
  const { fixed = [], linear = [], log = [], uniform = [], logUniform = [], draws = 1 } = grid;
  const axes = [
    ...linear.map((range) => ({ column: range.column, values: stepped(range, false) })),
    ...log.map((range) => ({ column: range.column, values: stepped(range, true) })),
  ];
  const random = [
    ...uniform.map((range) => ({ range, log: false })),
    ...logUniform.map((range) => ({ range, log: true })),
  ];
  const generator = xoroshiro128plus(grid.seed ?? 1);
  let points: number[][] = [[]];
  for (const { values } of axes) points = points.flatMap((p) => values.map((v) => [...p, v]));
  const drawn = points.flatMap((point) =>
    Array.from({ length: draws }, () => [
      ...point,
      ...random.map(({ range, log }) => between(range, uniformFloat64(generator), log)),
    ])
  );
  const width = String(drawn.length).length;
  const names = [...axes.map((axis) => axis.column), ...random.map(({ range }) => range.column)];
  const order = (name: string) => {
    const place = TABLE_COLUMNS.indexOf(name);
    return place < 0 ? TABLE_COLUMNS.length : place;
  };
  const columns = ["case", ...fixed.map(([name]) => name), ...names];
  const sorted = [...columns].sort((x, y) => order(x) - order(y));
  const records = drawn.map((values, i) => {
    const name = `${grid.prefix ?? "row"}-${String(i + 1).padStart(width, "0")}`;
    const cells = [name, ...fixed.map(([, text]) => text), ...values.map(String)];
    return sorted.map((column) => cells[columns.indexOf(column)]!);
  });
  const text = csvLines([sorted, ...records]);
  readTable(new TextEncoder().encode(text));
  return text;
}
