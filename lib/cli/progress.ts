/**
 * Progress of a run on standard error: a bar on a terminal, plain lines otherwise.
 *
 * @module
 */
import type { Counts } from "../batch/progress.ts";

const WIDTH = 30; // characters of the bar
const REDRAW_MS = 100; // between redraws of the bar
const STEPS = 10; // plain lines between begin and end

/** Where progress is written. */
export interface ProgressOutput {
  /** Whether lines can be drawn over. */
  readonly terminal: boolean;
  /** Writes text as it is. */
  readonly write: (text: string) => void;
  /** Milliseconds from any fixed moment. */
  readonly now: () => number;
}

function standardError(): ProgressOutput {
  const encoder = new TextEncoder();
  return {
    terminal: Deno.stderr.isTerminal(),
    write: (text) => void Deno.stderr.writeSync(encoder.encode(text)),
    now: () => performance.now(),
  };
}

/**
 * Makes a progress display.
 *
 * @param output Where to write. @default standard error
 * @returns A function to be called with each progress.
 */
export function progressDisplay(output: ProgressOutput = standardError()): (p: Counts) => void {
  let last = -Infinity, step = 0;
  return ({ done, total }) => {
    if (total === 0) return;
    if (!output.terminal) {
      const reached = Math.floor(STEPS * done / total);
      if (reached > step) output.write(`${done} of ${total} rows\n`);
      step = reached;
      return;
    }
    if (done < total && output.now() - last < REDRAW_MS) return;
    last = output.now();
    const filled = Math.floor(WIDTH * done / total);
    const bar = "#".repeat(filled) + "-".repeat(WIDTH - filled);
    output.write(`\r[${bar}] ${done} of ${total} rows${done === total ? "\n" : ""}`);
  };
}
