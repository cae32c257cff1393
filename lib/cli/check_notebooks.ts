/**
 * Check of notebook cells: the cells of each notebook become one module, in a folder that is removed again.
 * `deno check` reads no notebooks, and `deno fmt --check` calls formatted ones unformatted.
 *
 * @module
 */
import { basename, join } from "node:path";
import { parseNotebook, wholeText } from "../show/notebook/document.ts";
import { spawnDeno } from "../show/notebook/spawn_deno.ts";
import { programPath } from "./launch.ts";
import { closing, STATUS } from "./status.ts";

/**
 * The code cells of a notebook as one module, each under a comment that names it.
 *
 * @param text text of the notebook
 * @param name name of the file
 * @returns TypeScript
 */
export function cellsModule(text: string, name: string): string {
  const cells = parseNotebook(text, name).cells;
  const parts = cells.flatMap((cell, i) =>
    cell.cell_type === "code"
      ? [`// ${name}, cell ${i + 1} (${cell.id})\n${wholeText(cell.source)}\n`]
      : []
  );
  return parts.join("\n");
}

async function main(): Promise<number> {
  const folder = await Deno.makeTempDir();
  try {
    const modules: string[] = [];
    for await (const entry of Deno.readDir(programPath("notebooks"))) {
      if (!entry.name.endsWith(".ipynb")) continue;
      const text = await Deno.readTextFile(programPath(`notebooks/${entry.name}`));
      const module = join(folder, `${basename(entry.name, ".ipynb")}.ts`);
      await Deno.writeTextFile(module, cellsModule(text, entry.name));
      modules.push(module);
    }
    if (modules.length === 0) return STATUS.done;
    let status: number = STATUS.done;
    for (const check of [["fmt", "--check"], ["check"]]) {
      const args = [...check, "--config", programPath("deno.json"), ...modules];
      const { success } = await spawnDeno({ args }).status;
      if (!success) status = STATUS.failed;
    }
    return status;
  } finally {
    await Deno.remove(folder, { recursive: true });
  }
}

if (import.meta.main) Deno.exit(await closing(main));
