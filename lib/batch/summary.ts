/**
 * The closing summary of a run, from the cells of results.csv.
 *
 * @module
 */
import { NUMERIC_COLUMNS } from "../observe/result.ts";
import { readResultNumber } from "./number.ts";
import type { ResultCells } from "./result_row.ts";

/** The largest relative bound of a table. */
export interface WorstBound {
  /** Bound over magnitude. */
  readonly relative: number;
  /** Case it occurs in. */
  readonly case: string;
  /** Column it occurs in. */
  readonly column: string;
}

/** Counts and extremes of a results table. */
export interface Summary {
  /** Rows by outcome. */
  readonly outcomes: ReadonlyMap<string, number>;
  /** Solved rows by kind. */
  readonly kinds: ReadonlyMap<string, number>;
  /** Refused and failed rows: case and reason. */
  readonly reasons: readonly { readonly case: string; readonly text: string }[];
  /** Largest bound over magnitude of all numbers that are neither 0 nor infinite. */
  readonly worst?: WorstBound;
}

function count(map: Map<string, number>, key: string): void {
  map.set(key, (map.get(key) ?? 0) + 1);
}

/**
 * Sums up a results table.
 *
 * @param rows Its rows.
 * @returns Counts, reasons and the worst relative bound.
 */
export function summarize(rows: readonly ResultCells[]): Summary {
  const outcomes = new Map<string, number>(), kinds = new Map<string, number>();
  const reasons: { case: string; text: string }[] = [];
  let worst: WorstBound | undefined;
  for (const cells of rows) {
    const name = cells["case"]!;
    count(outcomes, cells["outcome"]!);
    if (cells["outcome"] === "solved") count(kinds, cells["kind"]!);
    else reasons.push({ case: name, text: `${cells["outcome"]}: ${cells["reason"]}` });
    for (const column of NUMERIC_COLUMNS) {
      const value = readResultNumber(cells[column]!);
      const error = readResultNumber(cells[`${column}_err`]!);
      if (!value || error === undefined) continue; // empty, zero, or divergent
      const relative = error / Math.abs(value);
      if (relative > (worst?.relative ?? -1)) worst = { relative, case: name, column };
    }
  }
  return { outcomes, kinds, reasons, ...(worst ? { worst } : {}) };
}

function counts(map: ReadonlyMap<string, number>): string {
  return [...map].map(([key, n]) => `${n} ${key}`).join(", ");
}

/**
 * A summary as lines of text.
 *
 * @param summary Counts and extremes.
 * @returns Lines without line ends.
 */
export function summaryLines({ outcomes, kinds, reasons, worst }: Summary): readonly string[] {
  const lines = [`Rows: ${counts(outcomes) || "none"}`];
  if (kinds.size > 0) lines.push(`Kinds: ${counts(kinds)}`);
  for (const reason of reasons) lines.push(`  ${reason.case} ${reason.text}`);
  if (worst) {
    const { relative, case: name, column } = worst;
    lines.push(`Worst relative bound: ${relative.toPrecision(2)} (${column} of ${name})`);
  }
  return lines;
}
