/**
 * Progress of a run on standard error: a bar on a terminal, plain lines otherwise.
 *
 * @module
 */
import type { Counts } from "../batch/progress.ts";

const WIDTH = 20; // characters of the bar
const REDRAW_MS = 100; // between redraws of the bar
const STEPS = 10; // plain lines between begin and end

/** Where progress is written. */
export interface ProgressOutput {
  /** Columns of the terminal, whose line can be drawn over; absent where there is none. */
  readonly columns?: number;
  /** Writes text as it is. */
  readonly write: (text: string) => void;
  /** Milliseconds from any fixed moment. */
  readonly now: () => number;
}

function standardError(): ProgressOutput {
  const encoder = new TextEncoder();
  return {
    ...(Deno.stderr.isTerminal() ? { columns: Deno.consoleSize().columns } : {}),
    write: (text) => void Deno.stderr.writeSync(encoder.encode(text)),
    now: () => performance.now(),
  };
}

/** Rate and time left. */
export interface Pace {
  /** Rows a second since the first one began; absent before one is done. */
  readonly rate?: number;
  /** Seconds left at this rate. */
  readonly left?: number;
}

/**
 * Pace of a run.
 *
 * @param counts How far it is.
 * @param elapsed Time since it began (milliseconds).
 * @returns Rate and time left.
 */
export function paceOf({ done, total }: Counts, elapsed: number): Pace {
  if (done === 0 || !(elapsed > 0)) return {};
  const rate = 1000 * done / elapsed;
  return { rate, left: (total - done) / rate };
}

/** A time in the two largest of its units. */
function timeText(seconds: number): string {
  const s = Math.ceil(seconds);
  if (s < 60) return `${s} s`;
  if (s < 3600) return `${Math.floor(s / 60)} min ${s % 60} s`;
  return `${Math.floor(s / 3600)} h ${Math.floor(s % 3600 / 60)} min`;
}

/**
 * Counts as text: rows, pace, kinds and what failed.
 *
 * @param counts How far the run is.
 * @param pace Its pace.
 * @returns One line without its end.
 */
export function progressText(counts: Counts, { rate, left }: Pace): string {
  const { done, total, kinds, unfinished } = counts;
  const parts = [`${done} of ${total} rows`];
  if (rate !== undefined) parts.push(`${Number(rate.toPrecision(2))} rows/s`);
  if (left !== undefined && done < total) parts.push(`${timeText(left)} left`);
  const all = [...Object.entries(kinds), ...unfinished > 0 ? [["interrupted", unfinished]] : []];
  const found = all.map(([kind, n]) => `${n} ${kind}`).join(", ");
  return parts.join(", ") + (found === "" ? "" : `: ${found}`);
}

/**
 * Makes a progress display.
 *
 * @param output Where to write. @default standard error
 * @returns A function to be called with each progress.
 */
export function progressDisplay(output: ProgressOutput = standardError()): (c: Counts) => void {
  const { columns, write, now } = output;
  let last = -Infinity, step = 0, began: number | undefined;
  return (counts) => {
    const { done, total } = counts;
    if (total === 0) return;
    began ??= now();
    const text = () => progressText(counts, paceOf(counts, now() - began!));
    if (columns === undefined) {
      const reached = Math.floor(STEPS * done / total);
      if (reached > step) write(`${text()}\n`);
      step = reached;
      return;
    }
    if (done < total && now() - last < REDRAW_MS) return;
    last = now();
    const filled = Math.floor(WIDTH * done / total);
    const bar = "#".repeat(filled) + "-".repeat(WIDTH - filled);
    const line = `[${bar}] ${text()}`.slice(0, columns - 1);
    write(`\r${line}\x1b[K${done === total ? "\n" : ""}`);
  };
}
