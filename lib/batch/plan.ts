/**
 * The plan of a run: everything that follows from the parameter table and the program alone, before
 * anything is solved or written. The same plan is made on every machine.
 *
 * @module
 */
import { type CompiledModel, compileModel } from "../model/compile.ts";
import type { ModelName } from "../model/input.ts";
import { SETTINGS } from "../solve/settings.ts";
import { coreIdentity } from "./core.ts";
import type { RunIdentity } from "./record.ts";
import type { TableRow } from "./row_reader.ts";
import { selectProfiles } from "./selection.ts";
import { sha256, stamper } from "./stamp.ts";
import { readTable } from "./table.ts";

/** What is to be computed. */
export interface Plan {
  /** Bytes of the parameter table. */
  readonly table: Uint8Array;
  /** Its rows. */
  readonly rows: readonly TableRow[];
  /** Stamp of each row. */
  readonly stamps: readonly string[];
  /** First row of each stamp: rows of one stamp are solved once. */
  readonly firsts: ReadonlyMap<string, number>;
  /** Cases that get a profile. */
  readonly profiles: ReadonlySet<string>;
  /** Compiled models of the rows. */
  readonly models: readonly CompiledModel[];
  /** What tells this run from another. */
  readonly identity: RunIdentity;
}

async function compileAll(rows: readonly TableRow[]): Promise<Map<ModelName, CompiledModel>> {
  const models = new Map<ModelName, CompiledModel>();
  for (const name of new Set(rows.map((row) => row.input.model))) {
    models.set(name, await compileModel(name));
  }
  return models;
}

/**
 * Plans a run.
 *
 * @param table Bytes of the parameter table.
 * @param profiles Rows that get a profile, see {@linkcode selectProfiles}.
 * @returns The plan.
 * @throws {TableError} if the table or the list of profiles has faults.
 */
export async function planRun(
  table: Uint8Array,
  profiles?: Parameters<typeof selectProfiles>[1],
): Promise<Plan> {
  const rows = readTable(table);
  const chosen = selectProfiles(rows, profiles);
  const models = await compileAll(rows);
  const expressions = Object.fromEntries([...models].map(([name, m]) => [name, m.expressions]));
  const shared = { settings: SETTINGS, ...await coreIdentity() };
  const stampOf = new Map(
    [...models].map(([name, m]) => [name, stamper({ ...shared, expressions: m.expressions })]),
  );
  const stamps = rows.map(({ input }) => stampOf.get(input.model)!(input));
  const firsts = new Map<string, number>();
  for (const [i, stamp] of stamps.entries()) if (!firsts.has(stamp)) firsts.set(stamp, i);
  return {
    table,
    rows,
    stamps,
    firsts,
    profiles: chosen,
    models: [...models.values()],
    identity: { table: sha256(table), expressions, ...shared },
  };
}
