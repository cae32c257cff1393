/**
 * What must hold of every row of a results table before it can be compared.
 *
 * @module
 */
import { type Fault, quoted } from "../fault.ts";
import { readNumber } from "../number.ts";
import { RESULT_COLUMNS } from "../result_columns.ts";
import type { ResultCells } from "../result_row.ts";

const DIVERGENT = ["INF", "-INF"];

/** The columns that hold numbers: those known to, and those that have a column of bounds. */
function numericColumns(columns: readonly string[]): readonly string[] {
  const known = RESULT_COLUMNS.filter(({ datatype }) => datatype === "double").map((c) => c.name);
  return columns.filter((name) =>
    known.includes(name) || columns.includes(`${name}_err`) || name.endsWith("_err")
  );
}

function numberFault(text: string): string | undefined {
  if (text === "" || DIVERGENT.includes(text)) return undefined;
  const number = readNumber(text);
  if (typeof number === "number") return undefined;
  return `${number.must}, or INF, -INF or empty: current value is ${quoted(text)}`;
}

function boundFault(cells: ResultCells, column: string): string | undefined {
  const bound = cells[`${column}_err`], value = cells[column];
  if (value === "" || DIVERGENT.includes(value)) {
    if (bound === "") return undefined;
    return `must be empty as ${column} is empty or diverges: current value is ${quoted(bound)}`;
  }
  if (bound !== "" && !DIVERGENT.includes(bound) && Number(bound) >= 0) return undefined;
  return `must be finite and >= 0 as ${column} is finite: current value is ${quoted(bound)}`;
}

/**
 * Makes a check of the rows of one table.
 *
 * @param columns Its header.
 * @returns A function from the cells of a row and its line to everything that is wrong with it.
 */
export function rowChecker(
  columns: readonly string[],
): (cells: ResultCells, line: number) => readonly Fault[] {
  const numeric = numericColumns(columns);
  const bounded = numeric.filter((name) => columns.includes(`${name}_err`));
  const lines = new Map<string, number>();
  return (cells, line) => {
    const faults: Fault[] = [], name = cells["case"], first = lines.get(name);
    const report = (column: string, text: string | undefined) =>
      text === undefined ? 0 : faults.push({ line, column, text });
    if (name === "") report("case", "must be given");
    else if (first !== undefined) {
      report("case", `must be unique, and line ${first} has it: current value is ${quoted(name)}`);
    } else lines.set(name, line);
    for (const column of numeric) report(column, numberFault(cells[column]));
    if (faults.length > 0) return faults;
    for (const column of bounded) report(`${column}_err`, boundFault(cells, column));
    return faults;
  };
}
