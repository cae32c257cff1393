/**
 * Two runs compared, shown in a notebook or on a terminal.
 *
 * @module
 */
import {
  compareResults,
  type Comparison,
  type ComparisonOptions,
} from "../batch/comparison/comparison.ts";
import type { ComparedSource } from "../batch/comparison/source.ts";
import { COMPARISON_TITLE, comparisonFigure } from "./comparison_figure.ts";
import { comparisonTables } from "./comparison_tables.ts";
import { escapeXml } from "./figure.ts";
import { DISPLAY, type Displayable, displayable, limited } from "./notebook/display.ts";
import type { MimeBundle } from "./notebook/document.ts";
import type { Figure } from "./solution.ts";
import { tableBundle } from "./table_bundle.ts";

/** What changed between two runs; shows itself as tables in a notebook. */
export interface RunComparison extends Comparison, Displayable {
  /**
   * The tables as plain text.
   *
   * @param lines most lines of one table; 20 by default
   */
  text(lines?: number): string;
  /** Differences in units of the sum of the bounds, one lane a column. */
  figure(): Figure;
}

/** Most lines of one table unless asked otherwise. */
const DEFAULT_LINES = 20;

/**
 * Compares two results tables row by row: which rows came or went, which ask something else, whose kind
 * changed, whose numbers differ by more than the sum of their error bounds, or less, and what of the stamps
 * differs as far as the records of the runs tell. Files are read piece by piece.
 *
 * @param a the first: output folder of a run, its `results.csv`, a run that was read, or other rows
 * @param b the second
 * @param options how many differences are kept, and a function that gets all of them
 * @returns what changed; numbers are compared with their absolute bounds, in the units of their columns
 * @throws {ComparisonError} with every fault, if one of the two is not a whole results table
 * @example
 * ```ts
 * import { compareRuns } from "@backstamp/backstamp";
 * const row = { case: "x", model: "rst", state: "boulware", outcome: "solved", kind: "throat" };
 * const rows = (mass: string) => [{ ...row, mass, mass_err: "1e-3", stamp: "" }];
 * const result = await compareRuns({ name: "a", rows: rows("2") }, { name: "b", rows: rows("2.001") });
 * if (!result.same || result.rows.within !== 1) throw new Error(result.text());
 * ```
 */
export async function compareRuns(
  a: ComparedSource,
  b: ComparedSource,
  options: ComparisonOptions = {},
): Promise<RunComparison> {
  const comparison = await compareResults(a, b, options);
  return {
    ...comparison,
    text: (lines = DEFAULT_LINES) => plainText(comparison, lines),
    figure: () => {
      const svg = comparisonFigure(comparison), title = COMPARISON_TITLE;
      return { title, svg, ...displayable({ "image/svg+xml": svg, "text/plain": title }) };
    },
    [DISPLAY]: () => limited(bundle(comparison)),
  };
}

function plainText(comparison: Comparison, lines: number): string {
  return comparisonTables(comparison, lines).map(({ title, header, rows }) =>
    `${title}\n${tableBundle(header, rows)["text/plain"].replace(/^/gm, "  ")}`
  ).join("\n\n");
}

function bundle(comparison: Comparison): MimeBundle & Record<string, string> {
  const tables = comparisonTables(comparison, DEFAULT_LINES);
  const html = tables.map(({ title, header, rows }) =>
    `<p><strong>${escapeXml(title)}</strong></p>${tableBundle(header, rows)["text/html"]}`
  );
  return { "text/html": html.join("\n"), "text/plain": plainText(comparison, DEFAULT_LINES) };
}
