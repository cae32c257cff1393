/**
 * Options of `deno task compare`, and what they ask for.
 *
 * @module
 */
import { absolutePath } from "./launch.ts";
import { ARGUMENTS, type CommandOption, UsageError, type Values } from "./options.ts";

/** Options of `deno task compare`. */
export const COMPARE_OPTIONS: readonly CommandOption[] = [
  {
    name: ARGUMENTS,
    value: "A B",
    many: true,
    meaning: "Output folders of two runs, or two results tables.",
  },
  {
    name: "out",
    value: "DIR",
    meaning: "Where comparison.csv and comparison.svg go. Default: nowhere.",
  },
  { name: "lines", value: "N", meaning: "Most lines of a printed table. Default: 20." },
  { name: "replace", meaning: "Write over a comparison that is there." },
];

/** What `deno task compare` was asked, with absolute paths. */
export interface CompareRequest {
  /** The first run. */
  readonly a: string;
  /** The second run. */
  readonly b: string;
  /** Folder of the comparison; absent if none is written. */
  readonly out?: string;
  /** Most lines of a printed table. */
  readonly lines: number;
  /** Whether a comparison there may be written over. */
  readonly replace: boolean;
}

const DEFAULT_LINES = 20;
const MOST_LINES = 1000;

/**
 * Reads what is asked.
 *
 * @param values Parsed options.
 * @returns The request.
 * @throws {UsageError} with every fault.
 */
export function compareRequest(values: Values): CompareRequest {
  const paths = (values.get(ARGUMENTS) ?? []).map(absolutePath), faults: string[] = [];
  if (paths.length !== 2) {
    faults.push(`Cannot compare as two runs must be named: current count is ${paths.length}`);
  }
  const typed = values.get("lines")?.[0] ?? String(DEFAULT_LINES);
  const lines = /^\d+$/.test(typed) ? Number(typed) : NaN;
  if (!(lines >= 1 && lines <= MOST_LINES)) {
    const must = `it must be a whole number from 1 to ${MOST_LINES}`;
    faults.push(`Cannot use --lines as ${must}: current value is ${typed}`);
  }
  if (faults.length > 0) throw new UsageError(faults);
  const [a, b] = paths, out = values.get("out")?.[0];
  return {
    a,
    b,
    lines,
    replace: values.has("replace"),
    ...(out === undefined ? {} : { out: absolutePath(out) }),
  };
}
