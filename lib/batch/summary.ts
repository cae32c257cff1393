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
  /** Refused and failed rows, the first {@linkcode MOST_REASONS}: case and reason. */
  readonly reasons: readonly { readonly case: string; readonly text: string }[];
  /** Largest bound over magnitude of all numbers that are neither 0 nor infinite. */
  readonly worst?: WorstBound;
}

/** A summary as JSON. */
export interface SummaryJson extends Omit<Summary, "outcomes" | "kinds"> {
  /** Rows by outcome. */
  readonly outcomes: Readonly<Record<string, number>>;
  /** Solved rows by kind. */
  readonly kinds: Readonly<Record<string, number>>;
}

/** A summary for run.json. */
export function summaryJson({ outcomes, kinds, ...rest }: Summary): SummaryJson {
  return { outcomes: Object.fromEntries(outcomes), kinds: Object.fromEntries(kinds), ...rest };
}

/** A summary of run.json. */
export function summaryOf({ outcomes, kinds, ...rest }: SummaryJson): Summary {
  const map = (counts: Readonly<Record<string, number>>) => new Map(Object.entries(counts));
  return { outcomes: map(outcomes), kinds: map(kinds), ...rest };
}

/** Reasons that are told one by one; the others stand in results.csv. */
export const MOST_REASONS = 50;

function count(map: Map<string, number>, key: string): void {
  map.set(key, (map.get(key) ?? 0) + 1);
}

/** A summary that grows row by row. */
export class GrowingSummary implements Summary {
  readonly outcomes: Map<string, number> = new Map();
  readonly kinds: Map<string, number> = new Map();
  readonly reasons: { readonly case: string; readonly text: string }[] = [];
  worst?: WorstBound;

  /** Adds a row. */
  add(cells: ResultCells): void {
    const name = cells["case"]!, outcome = cells["outcome"]!;
    count(this.outcomes, outcome);
    if (outcome === "solved") count(this.kinds, cells["kind"]!);
    else if (this.reasons.length < MOST_REASONS) {
      this.reasons.push({ case: name, text: `${outcome}: ${cells["reason"]}` });
    }
    for (const column of NUMERIC_COLUMNS) {
      const value = readResultNumber(cells[column]!);
      const error = readResultNumber(cells[`${column}_err`]!);
      if (!value || error === undefined) continue; // empty, zero, or divergent
      const relative = error / Math.abs(value);
      if (relative > (this.worst?.relative ?? -1)) this.worst = { relative, case: name, column };
    }
  }
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
  const without = [...outcomes].reduce((n, [key, m]) => key === "solved" ? n : n + m, 0);
  if (without > reasons.length) lines.push(`  and ${without - reasons.length} more`);
  if (worst) {
    const { relative, case: name, column } = worst;
    lines.push(`Worst relative bound: ${relative.toPrecision(2)} (${column} of ${name})`);
  }
  return lines;
}
