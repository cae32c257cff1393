/**
 * What a notebook shows of a run: the results, the worst bounds, the rows without result, the figure and
 * the stamp.
 *
 * @module
 */
import { RESULT_COLUMNS } from "../batch/result_columns.ts";
import { NUMERIC_COLUMNS, type NumericColumn } from "../observe/result.ts";
import { boundedText } from "./bounded_text.ts";
import { SHORT_STAMP } from "./figure.ts";
import { KINDS_MAP_TITLE, kindsMap } from "./kinds_map.ts";
import { type Displayable, displayable } from "./notebook/display.ts";
import { readProfileRows, readResultRows } from "./result_rows.ts";
import { numberOf, type Run } from "./run_reader.ts";
import { tableBundle } from "./table_bundle.ts";

/** Numeric columns of the shown results table. */
const SHOWN: readonly NumericColumn[] = [
  "mass",
  "bath_ratio",
  "dilaton_locus",
  "log10_minus_gtt_locus",
  "curvature_locus",
  "temperature_horizon",
];

const titleOf = (name: string): string =>
  RESULT_COLUMNS.find((column) => column.name === name)?.title ?? name;

/**
 * The results, one line a row, numbers with their bounds.
 *
 * @param run run
 * @returns a table that shows itself
 * @example
 * ```ts
 * import { DISPLAY, resultsTable } from "@backstamp/backstamp";
 * const run = { folder: "", name: "demo", rows: [], results: new Uint8Array(), stamp: "", profiles: [] };
 * const text = resultsTable(run)[DISPLAY]()["text/plain"];
 * if (!/^Case/.test(String(text))) throw new Error(String(text));
 * ```
 */
export function resultsTable(run: Run): Displayable {
  const header = ["Case", "Model", "State", "Kind", ...SHOWN.map(titleOf), "Validity", "Stamp"];
  const rows = run.rows.map((row) => [
    row.case,
    row.model,
    row.state,
    row.kind || row.outcome,
    ...SHOWN.map((column) => {
      const number = numberOf(row, column);
      return number === undefined ? "" : boundedText(number);
    }),
    row.validity,
    row.stamp.slice(0, SHORT_STAMP),
  ]);
  return displayable(tableBundle(header, rows));
}

/**
 * The numbers whose bounds are largest in relation to them; zeros, and numbers that diverge, have no such
 * relation.
 *
 * @param run run
 * @param count how many
 * @returns a table that shows itself
 * @example
 * ```ts
 * import { DISPLAY, worstBounds } from "@backstamp/backstamp";
 * const run = { folder: "", name: "demo", rows: [], results: new Uint8Array(), stamp: "", profiles: [] };
 * const text = worstBounds(run)[DISPLAY]()["text/plain"];
 * if (!/Bound over value/.test(String(text))) throw new Error(String(text));
 * ```
 */
export function worstBounds(run: Run, count = 10): Displayable {
  const all = run.rows.flatMap((row) =>
    NUMERIC_COLUMNS.flatMap((column) => {
      const number = numberOf(row, column);
      if (number === undefined || number.value === 0 || !number.error) return [];
      return [{ row, column, number, relative: number.error / Math.abs(number.value) }];
    })
  );
  const worst = all.sort((x, y) => y.relative - x.relative).slice(0, count);
  const rows = worst.map(({ row, column, number, relative }) => [
    row.case,
    titleOf(column),
    boundedText(number),
    relative.toExponential(1),
  ]);
  return displayable(tableBundle(["Case", "Quantity", "Value", "Bound over value"], rows));
}

/**
 * Rows that the physics refuses or the solver gave up, with the reason, and solved rows too near to a
 * boundary between kinds.
 *
 * @param run run
 * @returns a table that shows itself
 * @example
 * ```ts
 * import { DISPLAY, reasonsTable } from "@backstamp/backstamp";
 * const run = { folder: "", name: "demo", rows: [], results: new Uint8Array(), stamp: "", profiles: [] };
 * const text = reasonsTable(run)[DISPLAY]()["text/plain"];
 * if (!/No row/.test(String(text))) throw new Error(String(text));
 * ```
 */
export function reasonsTable(run: Run): Displayable {
  const rows = run.rows.filter((row) => row.reason !== "")
    .map((row) => [row.case, row.model, row.state, row.outcome, row.reason]);
  if (rows.length === 0) return displayable({ "text/plain": "No row was refused or failed" });
  return displayable(tableBundle(["Case", "Model", "State", "Outcome", "Reason"], rows));
}

/**
 * The map of kinds of a run.
 *
 * @param run run
 * @returns a figure that shows itself
 * @example
 * ```ts
 * import { kindsFigure, type Run } from "@backstamp/backstamp";
 * const show = (run: Run) => Deno.jupyter.display(kindsFigure(run));
 * ```
 */
export function kindsFigure(run: Run): Displayable {
  const svg = kindsMap(readResultRows(run.results), { stamp: run.stamp });
  return displayable({ "image/svg+xml": svg, "text/plain": KINDS_MAP_TITLE });
}

/** The largest residual of each equation along a profile, relative to the largest term. */
export interface Residuals {
  /** Case. */
  readonly case: string;
  /** Number of points. */
  readonly points: number;
  /** Largest magnitude by equation: (1), (2), (C). */
  readonly largest: readonly [number, number, number];
}

/**
 * Reads the profile of a case and finds how well it fulfils the field equations.
 *
 * @param run run
 * @param name case with a profile
 * @returns largest residuals
 * @example
 * ```ts
 * import { profileResiduals, type Run } from "@backstamp/backstamp";
 * const first = (run: Run) => profileResiduals(run, run.profiles[0]);
 * ```
 */
export async function profileResiduals(run: Run, name: string): Promise<Residuals> {
  const profile = readProfileRows(await Deno.readFile(`${run.folder}/profiles/${name}.csv`));
  const largest = (values: readonly number[]): number =>
    values.reduce((most, value) => Math.max(most, Math.abs(value) || 0), 0);
  const { residual_1, residual_2, residual_c, sigma } = profile;
  return {
    case: name,
    points: sigma.length,
    largest: [largest(residual_1), largest(residual_2), largest(residual_c)],
  };
}

/**
 * The profiles that fulfil the field equations least well.
 *
 * @param residuals residuals of profiles
 * @param count how many
 * @returns a table that shows itself
 * @example
 * ```ts
 * import { DISPLAY, residualsTable } from "@backstamp/backstamp";
 * const one = { case: "x", points: 9, largest: [1e-12, 2e-12, 0] as const };
 * const text = residualsTable([one])[DISPLAY]()["text/plain"];
 * if (!/2.0e-12/.test(String(text))) throw new Error(String(text));
 * ```
 */
export function residualsTable(residuals: readonly Residuals[], count = 10): Displayable {
  const worst = [...residuals]
    .sort((x, y) => Math.max(...y.largest) - Math.max(...x.largest)).slice(0, count);
  const rows = worst.map(({ case: name, points, largest }) => [
    name,
    String(points),
    ...largest.map((value) => value.toExponential(1)),
  ]);
  const header = ["Case", "Points", "Equation (1)", "Equation (2)", "Constraint (C)"];
  return displayable(tableBundle(header, rows));
}

/**
 * What was shown: name, rows and stamp.
 *
 * @param run run
 * @returns a table that shows itself
 * @example
 * ```ts
 * import { DISPLAY, runStamp } from "@backstamp/backstamp";
 * const run = { folder: "", name: "demo", rows: [], results: new Uint8Array(), stamp: "", profiles: [] };
 * const text = runStamp(run)[DISPLAY]()["text/plain"];
 * if (!/demo/.test(String(text))) throw new Error(String(text));
 * ```
 */
export function runStamp(run: Run): Displayable {
  return displayable(tableBundle([], [
    ["Run", run.name],
    ["Rows", String(run.rows.length)],
    ["SHA-256 of results.csv", run.stamp],
  ]));
}
