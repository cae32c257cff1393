import { type RunOptions, type RunOutcome, runTable } from "../../lib/batch/run.ts";

/** The text of a table; each row is case, mass, and optionally tolerance and kappa. */
export function stubTable(
  rows: readonly (readonly [
    name: string,
    mass: number,
    tolerance?: number | undefined,
    kappa?: number,
  ])[],
): Uint8Array {
  const lines = rows.map(([name, mass, tolerance = "", kappa = 1]) =>
    `${name},swave,boulware,${kappa},${mass},${tolerance}`
  );
  return new TextEncoder().encode(
    `case,model,state,kappa,mass,tolerance\n${lines.join("\n")}\n`,
  );
}

/** Runs a table with the stub worker. */
export function runStub(
  table: Uint8Array,
  folder: string,
  options: Partial<RunOptions> = {},
): Promise<RunOutcome> {
  const worker = new URL("./stub_worker.ts", import.meta.url);
  return runTable({ table, folder, workers: 2, profiles: "none", worker, ...options });
}

/** Cells of the first columns of results.csv by case, in order. */
export function casesOf(folder: string): string[] {
  return Deno.readTextFileSync(`${folder}/results.csv`).split("\n").slice(1, -1)
    .map((line) => line.split(",")[0]!);
}
