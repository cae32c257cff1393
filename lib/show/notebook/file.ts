/**
 * Notebook files: read, executed, written.
 *
 * @module
 */
import { basename, dirname, join } from "node:path";
import { notebookText, parseNotebook } from "./document.ts";
import { type CellFailure, executeNotebook } from "./execute.ts";
import { DISPLAYS_VARIABLE, RUN_VARIABLE } from "./variables.ts";

/** How a notebook file is executed. */
export interface ExecuteFileOptions {
  /** Folder of the executed notebook; made if absent. */
  readonly out: string;
  /** Folder of the run that the notebook reads (absolute path). */
  readonly run?: string;
  /** Longest time of a cell (milliseconds). */
  readonly timeout: number;
  /** Stops the execution when aborted. */
  readonly signal?: AbortSignal;
}

/** What came of a notebook file. */
export interface ExecutedFile {
  /** Path of the executed notebook. */
  readonly path: string;
  /** Where it stopped, unless all cells ran. */
  readonly failure?: CellFailure;
  /** What the kernel's process itself said. */
  readonly strayText: string;
}

/**
 * Executes a notebook file in its own folder and writes the executed notebook, whatever came of it.
 *
 * @param path notebook
 * @param options where it goes, what it reads, limits
 * @returns path of the executed notebook and the failure, if any
 * @throws {Error} if it cannot be read or written, is no notebook, or no kernel starts
 */
export async function executeFile(
  path: string,
  options: ExecuteFileOptions,
): Promise<ExecutedFile> {
  const name = basename(path);
  const original = parseNotebook(await Deno.readTextFile(path), path);
  await Deno.mkdir(options.out, { recursive: true });
  const displays = join(options.out, `${name.replace(/\.ipynb$/, "")}_displays`);
  const { notebook, failure, strayText } = await executeNotebook(original, {
    cwd: dirname(path),
    scratch: options.out,
    env: {
      NO_COLOR: "1", // no terminal codes in outputs
      [DISPLAYS_VARIABLE]: displays,
      [RUN_VARIABLE]: options.run ?? "",
    },
    timeout: options.timeout,
    ...(options.signal === undefined ? {} : { signal: options.signal }),
  });
  const target = join(options.out, name);
  await Deno.writeTextFile(`${target}.tmp`, notebookText(notebook));
  await Deno.rename(`${target}.tmp`, target);
  return { path: target, strayText, ...(failure === undefined ? {} : { failure }) };
}
