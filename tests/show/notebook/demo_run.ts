import { runTable } from "../../../lib/batch/run.ts";

/**
 * Solves the demo table into a folder `demo` under `parent`.
 *
 * @returns absolute path of the run
 */
export async function demoRun(parent: string): Promise<string> {
  const folder = `${parent}/demo`;
  await Deno.mkdir(folder);
  const table = await Deno.readFile("data/tables/cavity-survey.csv");
  await runTable({ table, folder, workers: navigator.hardwareConcurrency });
  return folder;
}
