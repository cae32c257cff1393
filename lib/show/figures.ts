/**
 * Figures of a finished run: reads its tables and writes SVG files beside them.
 *
 * @module
 */
import { COMPARISON_AXES, COMPARISON_TITLE } from "./comparison_figure.ts";
import { HIERARCHY_AXES, HIERARCHY_TITLE } from "./hierarchy.ts";
import { KINDS_MAP_AXES, KINDS_MAP_TITLE, kindsMap } from "./kinds_map.ts";
import { LINEAR_DILATON_AXES, SWAVE_AXES } from "./profile_axes.ts";
import type { Axis } from "./axis.ts";
import { PROFILE_TITLE, profilePanels } from "./profile_panels.ts";
import { readProfileRows, readResultRows, type ResultRow } from "./result_rows.ts";

/** Titles of all figures. */
export const FIGURE_TITLES: readonly string[] = [
  KINDS_MAP_TITLE,
  PROFILE_TITLE,
  COMPARISON_TITLE,
  HIERARCHY_TITLE,
];

/** Axes of all figures. */
export const FIGURE_AXES: readonly Axis[] = [
  ...KINDS_MAP_AXES,
  ...Object.values(LINEAR_DILATON_AXES),
  ...Object.values(SWAVE_AXES),
  ...COMPARISON_AXES,
  ...HIERARCHY_AXES,
];

/** Largest number of profiles that are drawn for a run. */
export const MOST_PROFILES = 6;

const CASE = /^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/;

/**
 * Chooses the cases whose profiles are drawn: the first case of every kind, then of every model, then of
 * every pair of kind and model, in the table's order, {@linkcode MOST_PROFILES} at most.
 *
 * @param rows Rows of a results table that have a profile.
 * @returns The chosen rows in the table's order.
 *
 * @example
 * ```ts
 * import { chosenCases } from "@backstamp/backstamp";
 * const row = { model: "rst", state: "boulware", outcome: "solved", stamp: "", numbers: {} };
 * const rows = ["a", "b"].map((name) => ({ ...row, case: name, kind: "throat" }));
 * if (chosenCases(rows).map((r) => r.case).join() !== "a") throw new Error("one of a kind");
 * ```
 */
export function chosenCases(rows: readonly ResultRow[]): ResultRow[] {
  const chosen = new Set<ResultRow>();
  const of = [
    (row: ResultRow) => row.kind,
    (row: ResultRow) => row.model,
    (row: ResultRow) => `${row.kind} ${row.model}`,
  ];
  for (const key of of) {
    for (const row of rows) {
      const seen = [...chosen].some((other) => key(other) === key(row));
      if (!seen && chosen.size < MOST_PROFILES) chosen.add(row);
    }
  }
  return rows.filter((row) => chosen.has(row));
}

/**
 * Draws the figures of a run from its `results.csv` and `profiles/`, into its folder `figures`.
 *
 * @param outDir Folder of the run.
 * @returns Paths of the written files: the map of kinds, then profiles in the table's order.
 * @throws {Error} if `results.csv` or a profile of a chosen case cannot be read.
 */
export async function writeFigures(outDir: string): Promise<string[]> {
  const bytes = await Deno.readFile(`${outDir}/results.csv`);
  const rows = readResultRows(bytes);
  const unsafe = rows.find((row) => !CASE.test(row.case));
  if (unsafe !== undefined) {
    throw new Error(
      `Cannot draw figures as a case must be a safe file name: current value is "${unsafe.case}"`,
    );
  }
  const profiles = await profileCases(`${outDir}/profiles`);
  const chosen = chosenCases(
    rows.filter((row) => row.outcome === "solved" && profiles.has(row.case)),
  );
  await Deno.mkdir(`${outDir}/figures`, { recursive: true });
  const written: string[] = [];
  const write = async (name: string, svg: string): Promise<void> => {
    const path = `${outDir}/figures/${name}.svg`;
    await Deno.writeTextFile(path, svg);
    written.push(path);
  };
  await write("kinds-map", kindsMap(rows, { stamp: await sha256(bytes) }));
  for (const row of chosen) {
    const profile = readProfileRows(await Deno.readFile(`${outDir}/profiles/${row.case}.csv`));
    await write(`profile-${row.case}`, profilePanels(row, profile));
  }
  return written;
}

async function profileCases(folder: string): Promise<Set<string>> {
  const cases = new Set<string>();
  try {
    for await (const entry of Deno.readDir(folder)) {
      if (entry.isFile && entry.name.endsWith(".csv")) cases.add(entry.name.slice(0, -4));
    }
  } catch (error) {
    if (!(error instanceof Deno.errors.NotFound)) throw error; // a run without profiles has no folder
  }
  return cases;
}

async function sha256(bytes: Uint8Array<ArrayBuffer>): Promise<string> {
  const digest = new Uint8Array(await crypto.subtle.digest("SHA-256", bytes));
  return [...digest].map((byte) => byte.toString(16).padStart(2, "0")).join("");
}
