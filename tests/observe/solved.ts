/**
 * Rows of tests in short form.
 *
 * @module
 */
import { type CompiledModel, compileModel } from "../../lib/model/compile.ts";
import { MODEL_NAMES, type RowInput } from "../../lib/model/input.ts";
import type { Profile, RowResult } from "../../lib/observe/result.ts";
import { computeRow } from "../../lib/observe/row.ts";

/** Models of the catalogue, compiled. */
export const models: Readonly<Record<string, CompiledModel>> = Object.fromEntries(
  await Promise.all(MODEL_NAMES.map(async (name) => [name, await compileModel(name)] as const)),
);

/** A row with lambda = 1 and the default tolerance filled in. */
export type ShortRow = Omit<RowInput, "tolerance"> & { readonly tolerance?: number };

/** The row as the solver takes it. */
export function inputOf(row: ShortRow): RowInput {
  return { tolerance: 1e-10, ...(row.model === "swave" ? {} : { lambda: 1 }), ...row };
}

/** The record of a row. */
export function recordOf(row: ShortRow): RowResult {
  return computeRow(inputOf(row), models[row.model]!).result;
}

/** Value of a numeric column of a row. */
export function valueOf(row: ShortRow, column: keyof RowResult["numbers"]): number {
  const { numbers, outcome, reason } = recordOf(row), b = numbers[column];
  if (!b) throw new Error(`no ${column} in ${JSON.stringify(row)}: ${outcome} ${reason}`);
  return b.value;
}

/** Record and profile of a row. */
export function profileOfRow(
  row: ShortRow,
): { readonly result: RowResult; readonly profile: Profile } {
  const { result, profile } = computeRow(inputOf(row), models[row.model]!, { profile: true });
  if (!profile) throw new Error(`no profile of ${JSON.stringify(row)}`);
  return { result, profile };
}
