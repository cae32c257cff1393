/**
 * Rows of a finished run solved again, as they were or with other parameters.
 *
 * @module
 */
import { PARAMETER_COLUMNS } from "../batch/columns.ts";
import type { Inputs, RowsInMemory } from "../batch/comparison/source.ts";
import { readCsv } from "../batch/csv.ts";
import { FILES, readIfPresent } from "../batch/folder.ts";
import { nearest } from "../batch/nearest.ts";
import type { RunIdentity } from "../batch/record.ts";
import type { ResultCells } from "../batch/result_row.ts";
import { stampInputs } from "../batch/stamp.ts";
import type { Run } from "./run_reader.ts";
import { solveRow } from "./solve.ts";
import { camel, rowOf, type SolveOptions } from "./solve_options.ts";

/** A numeric parameter of a row: a column of the parameter table in camel case. */
export type ParameterOption =
  | "kappa"
  | "nScalars"
  | "lambda"
  | "mass"
  | "massAboveCritical"
  | "horizonDilaton"
  | "bathRatio"
  | "bathRatioMinusOne"
  | "a"
  | "wallRadius"
  | "tolerance";

/** Parameters of a row that are to be others; undefined takes one away. */
export type ChangedParameters = { readonly [K in ParameterOption]?: number | undefined };

type Options = Readonly<Record<string, string | number | undefined>>;

/** Parameters of every case of a run, from the table that it keeps. */
function parameters({ folder }: Run): ReadonlyMap<string, Options> {
  const bytes = readIfPresent(`${folder}/${FILES.table}`);
  if (bytes === undefined) {
    throw new Error(`Cannot solve again as ${folder} must hold ${FILES.table}: there is none`);
  }
  const { records: [header, ...records] } = readCsv(bytes);
  const numeric = new Set(PARAMETER_COLUMNS.map(({ name }) => name));
  return new Map(records.map(({ fields }) => {
    const cells = header.fields.map((name, i) => [name, fields[i]] as const);
    const options = cells.filter(([name, text]) => name !== "case" && text !== "")
      .map(([name, text]) => [camel(name), numeric.has(name) ? Number(text) : text]);
    return [fields[header.fields.indexOf("case")], Object.fromEntries(options)];
  }));
}

/**
 * Solves rows of a finished run again, here and now.
 *
 * @param run run
 * @param changes parameters to be changed, by case; none for a row that is solved as it was
 * @returns rows of a results table in the order of `changes`, to be given to {@linkcode compareRuns}
 * @throws {Error} if the run does not have a case, or keeps no parameter table
 * @throws {OptionsError} if a changed row is not valid
 * @example
 * ```ts
 * import { compareRuns, type Run, solveAgain } from "@backstamp/backstamp";
 * const reproduced = async (run: Run, name: string) => {
 *   const rows = run.rows.filter((row) => row.case === name);
 *   return (await compareRuns({ ...run, rows }, await solveAgain(run, { [name]: {} }))).same;
 * };
 * ```
 */
export async function solveAgain(
  run: Run,
  changes: Readonly<Record<string, ChangedParameters>>,
): Promise<RowsInMemory> {
  const known = parameters(run), names = Object.keys(changes);
  const unknown = names.filter((name) => !known.has(name))
    .map((name) => `${name} (nearest: ${nearest(name, [...known.keys()])})`);
  if (unknown.length > 0) {
    throw new Error(`Cannot solve again as ${run.name} must have the case: ${unknown.join(", ")}`);
  }
  const rows: ResultCells[] = [], inputs = new Map<string, Inputs>();
  const expressions: Record<string, RunIdentity["expressions"][string]> = {};
  let shared: Pick<RunIdentity, "settings" | "core" | "pins" | "runtime"> | undefined;
  for (const [name, changed] of Object.entries(changes)) {
    const row = rowOf({ ...known.get(name), ...changed } as unknown as SolveOptions);
    const { cells, context } = await solveRow({ ...row, case: name });
    const { expressions: own, ...rest } = context;
    rows.push(cells);
    inputs.set(name, stampInputs(row.input));
    expressions[row.input.model] = own;
    shared = rest;
  }
  if (shared === undefined) throw new Error("Cannot solve again as a case must be named: got none");
  const identity = { table: "", expressions, ...shared };
  return { name: `${run.name}, solved again`, rows, identity, inputs };
}
