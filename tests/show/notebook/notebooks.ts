import type { Notebook } from "../../../lib/show/notebook/document.ts";
import { type Executed, executeNotebook } from "../../../lib/show/notebook/execute.ts";

/** A notebook of code cells `c1`, `c2`, ... */
export function notebookOf(...sources: string[]): Notebook {
  const cells = sources.map((source, i) => ({
    id: `c${i + 1}`,
    cell_type: "code" as const,
    metadata: {},
    source,
    outputs: [],
    execution_count: null,
  }));
  return { cells, metadata: {}, nbformat: 4, nbformat_minor: 5 };
}

/** Executes code cells in a fresh kernel, with a limit of time in seconds. */
export function execute(sources: string[], seconds = 60): Promise<Executed> {
  const options = { cwd: Deno.cwd(), env: { NO_COLOR: "1" }, timeout: 1000 * seconds };
  return executeNotebook(notebookOf(...sources), options);
}

/** Whether a process exists; SIGCONT changes nothing for one that runs. */
export function runs(pid: number): boolean {
  try {
    Deno.kill(pid, "SIGCONT");
    return true;
  } catch {
    return false;
  }
}
