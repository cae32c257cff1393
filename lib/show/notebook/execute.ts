/**
 * Headless execution of a notebook on Deno's own Jupyter kernel, without losing an output.
 *
 * @module
 */
import { type Ending, type Limits, supervise, syntaxFault } from "./cell.ts";
import type { KernelPlace } from "./child.ts";
import { type Cell, type Notebook, type Output, wholeText } from "./document.ts";
import { Flusher, silentRequest } from "./flush.ts";
import { type Kernel, startKernel } from "./kernel.ts";
import type { Message } from "./message.ts";
import { OutputCollector } from "./outputs.ts";
import { reportStrayErrors } from "./stray_errors.ts";
import { trackTimers } from "./timers.ts";

/** Options of {@linkcode executeNotebook}: where the kernel runs, and for how long at most. */
export interface ExecuteOptions extends KernelPlace, Limits {}

/** The cell at which an execution stopped. */
export interface CellFailure {
  /** Position of the cell among all cells, from 1. */
  readonly position: number;
  /** Identifier of the cell. */
  readonly id: string;
  /** Name and message of the error. */
  readonly message: string;
}

/** An executed notebook. */
export interface Executed {
  /** The notebook with fresh outputs; cells after a failure have none. */
  readonly notebook: Notebook;
  /** The failure, unless all cells ran. */
  readonly failure?: CellFailure;
  /** What the kernel's process itself said, such as the reason of a crash; not what a cell wrote. */
  readonly strayText: string;
}

/** What the kernel itself writes: a warning at its start, a note at every interrupt. */
const CHATTER = /^(Warning "deno jupyter" is unstable|CDP response has null result).*\n+/gm;

/** Timers set by the notebook that fire within this time after the last cell are waited for (ms). */
const SETTLE = 10_000;

/**
 * Executes a notebook from top to bottom, up to the first cell that fails. The kernel has all permissions
 * and is gone when this returns. What a cell writes to `Deno.stdout` instead of the console is not kept: the
 * kernel drops it.
 *
 * @param original notebook, left as it is
 * @param options working directory, environment and limits
 * @returns the executed notebook
 * @throws {Error} if no kernel starts
 */
export async function executeNotebook(
  original: Notebook,
  options: ExecuteOptions,
): Promise<Executed> {
  const notebook = structuredClone(original);
  const codeCells = notebook.cells.filter((cell) => cell.cell_type === "code");
  for (const cell of codeCells) Object.assign(cell, { outputs: [], execution_count: null });
  const filled = codeCells.filter((cell) => wholeText(cell.source).trim() !== "");
  const kernel = await startKernel(options);
  notebook.metadata.language_info = kernel.languageInfo;
  try {
    const failed = await runCells(kernel, filled, options);
    const strayText = kernel.strayText().replace(CHATTER, "");
    if (failed === undefined) return { notebook, strayText };
    const position = notebook.cells.indexOf(failed.cell) + 1;
    const failure = { position, id: failed.cell.id ?? "", message: failed.message };
    return { notebook, failure, strayText };
  } finally {
    await kernel.stop();
  }
}

async function runCells(
  kernel: Kernel,
  cells: readonly Cell[],
  limits: Limits,
): Promise<{ cell: Cell; message: string } | undefined> {
  const collector = new OutputCollector();
  const flusher = new Flusher();
  const early: Message[] = [];
  kernel.onPublished = (message) => {
    if (flusher.take(message)) return;
    // the error that ends a cell is published past the queue of its outputs: it waits for them
    if (message.type === "error" && message.metadata.stray !== true) early.push(message);
    else collector.take(message);
  };
  const run = async (code: string, silent: boolean): Promise<Ending> => {
    const work = async (): Promise<Message> => {
      const reply = await (silent ? silentRequest(kernel, code) : cellRequest(kernel, code));
      await flusher.flush(kernel);
      return reply;
    };
    return await supervise(kernel, work(), limits);
  };
  const finish = async (outputs: Output[], code: string, ending: Ending): Promise<string> => {
    for (const message of early.splice(0)) collector.take(message);
    const { error } = ending;
    const shown = outputs.some((o) => o.output_type === "error" && o.evalue === error?.evalue);
    if (error !== undefined && !shown) collector.add(await errorOutput(error, code));
    const first = outputs.find((output) => output.output_type === "error");
    return first === undefined ? "" : `${first.ename}: ${first.evalue}`;
  };
  const settle = Math.min(SETTLE, limits.timeout / 2);
  collector.begin([]);
  await run(`(${reportStrayErrors})(); (${trackTimers})();`, true);
  for (const [i, cell] of cells.entries()) {
    const outputs = cell.outputs as Output[];
    const code = wholeText(cell.source);
    collector.begin(outputs);
    let ending = await run(code, false);
    cell.execution_count = ending.count;
    if (i === cells.length - 1 && ending.error === undefined) {
      const settled = await run(
        `await globalThis[Symbol.for("backstamp.settled")](${settle})`,
        true,
      );
      if (settled.error !== undefined) ending = settled;
    }
    const message = await finish(outputs, code, ending);
    if (message !== "") return { cell, message };
  }
}

function cellRequest(kernel: Kernel, code: string): Promise<Message> {
  return kernel.request("execute_request", {
    code,
    silent: false,
    store_history: true,
    user_expressions: {},
    allow_stdin: false,
    stop_on_error: true,
  });
}

/** The kernel replies to code that does not parse with "Execution failed" and no more. */
async function errorOutput(error: NonNullable<Ending["error"]>, code: string): Promise<Output> {
  const { ename, evalue, traceback } = error;
  const mute = ename === "Error" && evalue === "Execution failed" && traceback.length === 0;
  if (!mute) return { output_type: "error", ename, evalue, traceback };
  const fault = await syntaxFault(code);
  return { output_type: "error", ename: "SyntaxError", evalue: fault, traceback: [fault] };
}
