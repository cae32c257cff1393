/**
 * Progress for other programs: one JSON object a line.
 *
 * `{"event":"rows","done":..,"total":..,"kept":..,"kinds":{..},"unfinished":..,"rate":..,"left":..}` at the
 * first row, at the last, and not more than twice a second; `{"event":"end","status":..}` last.
 *
 * @module
 */
import type { Counts } from "../batch/progress.ts";
import { paceOf } from "./progress.ts";

/** What stands for standard error. */
export const STANDARD_ERROR = "-";
const INTERVAL = 500; // milliseconds between lines

/** Where lines go. */
export interface LinesOutput {
  /** Writes a line, its end included. */
  readonly write: (line: string) => void;
  /** Milliseconds from any fixed moment. */
  readonly now: () => number;
}

/** A stream of lines. */
export interface ProgressLines {
  /** Tells how far the run is. */
  readonly rows: (counts: Counts) => void;
  /** Tells that it ended. */
  readonly end: (status: string) => void;
}

/** Opens a file with the first line; one that refuses is told of once, and the run goes on. */
function output(path: string): LinesOutput {
  const encoder = new TextEncoder();
  let file: { writeSync(bytes: Uint8Array): number } | undefined, refused = false;
  const write = (line: string) => {
    if (refused) return;
    try {
      file ??= path === STANDARD_ERROR
        ? Deno.stderr
        : Deno.openSync(path, { write: true, create: true, truncate: true });
      file.writeSync(encoder.encode(line));
    } catch (error) {
      refused = true;
      console.error(`Cannot write progress to ${path}: ${(error as Error).message}`);
    }
  };
  return { write, now: () => performance.now() };
}

/**
 * Makes a stream.
 *
 * @param to Path of a file, which is written anew, `-` for standard error, or any other output.
 * @returns What takes the counts.
 */
export function progressLines(to: string | LinesOutput): ProgressLines {
  const { write, now } = typeof to === "string" ? output(to) : to;
  let last = -Infinity, began: number | undefined;
  const line = (event: Record<string, unknown>) => write(`${JSON.stringify(event)}\n`);
  return {
    rows: (counts) => {
      began ??= now();
      if (counts.done < counts.total && now() - last < INTERVAL) return;
      last = now();
      line({ event: "rows", ...counts, ...paceOf(counts, last - began) });
    },
    end: (status) => line({ event: "end", status }),
  };
}
