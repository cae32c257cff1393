/**
 * One solution by hand: solved at once, and shown richly where a notebook page can.
 *
 * @module
 */
import { coreIdentity } from "../batch/core.ts";
import { readResultNumber } from "../batch/number.ts";
import { type ResultCells, resultCells } from "../batch/result_row.ts";
import type { TableRow } from "../batch/row_reader.ts";
import { type StampContext, stamper } from "../batch/stamp.ts";
import { type CompiledModel, compileModel } from "../model/compile.ts";
import type { ModelName } from "../model/input.ts";
import {
  NUMERIC_COLUMNS,
  type NumericColumn,
  type Profile,
  type RowResult,
} from "../observe/result.ts";
import { computeRow } from "../observe/row.ts";
import { SETTINGS } from "../solve/settings.ts";
import { Solution } from "./solution.ts";
import { rowOf, type SolveOptions } from "./solve_options.ts";

const compiled = new Map<ModelName, Promise<CompiledModel>>();
let identity: ReturnType<typeof coreIdentity> | undefined;

/** A row that was solved here. */
export interface SolvedRow {
  /** What the solver returned. */
  readonly result: RowResult;
  /** Cells of a results table. */
  readonly cells: ResultCells;
  /** Stamp of the row. */
  readonly stamp: string;
  /** Profile, where there is one. */
  readonly profile?: Profile;
  /** What entered the stamp but the inputs. */
  readonly context: StampContext;
}

/**
 * Solves a row as a run does.
 *
 * @param row a valid row
 * @returns result, cells and stamp
 */
export async function solveRow(row: TableRow): Promise<SolvedRow> {
  const { model } = row.input;
  if (!compiled.has(model)) compiled.set(model, compileModel(model));
  const program = await compiled.get(model)!;
  identity ??= coreIdentity();
  const context = { expressions: program.expressions, settings: SETTINGS, ...await identity };
  const stamp = stamper(context)(row.input);
  const solved = computeRow(row.input, program, { profile: true });
  return { ...solved, cells: resultCells(row, solved.result, stamp), stamp, context };
}

/**
 * Solves one static state with its back-reaction.
 *
 * @param options model, state and parameters: the columns of a parameter table in camel case, units
 * hbar = c = G = k_B = 1
 * @returns the solution, also where the physics refuses it (see its `outcome`)
 * @throws {OptionsError} if the options are not those of a valid row, with the nearest right names
 * @example
 * ```ts
 * import { solve } from "@backstamp/backstamp";
 * const solution = await solve({ model: "rst", state: "boulware", kappa: 1, mass: 10 });
 * if (solution.kind !== "throat") throw new Error(solution.kind);
 * ```
 */
export async function solve(options: SolveOptions): Promise<Solution> {
  const row = rowOf(options);
  const { result, cells, stamp, profile } = await solveRow(row);
  const numbers = Object.fromEntries(
    NUMERIC_COLUMNS.filter((name) => cells[name] !== "").map((name: NumericColumn) => {
      const value = readResultNumber(cells[name])!;
      const error = readResultNumber(cells[`${name}_err`]);
      return [name, error === undefined ? { value } : { value, error }];
    }),
  );
  return new Solution({
    input: row.input,
    result: { ...result, numbers },
    stamp,
    ...(profile === undefined ? {} : { profile }),
  });
}
