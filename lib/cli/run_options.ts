/**
 * Options of `deno task run`, and what they ask for.
 *
 * @module
 */
import { ROW_LIMIT } from "../batch/crew.ts";
import { absolutePath, programPath } from "./launch.ts";
import { type CommandOption, UsageError, type Values } from "./options.ts";

/** Options of `deno task run`. */
export const RUN_OPTIONS: readonly CommandOption[] = [
  {
    name: "table",
    value: "FILE",
    meaning: "Parameter table. Default: the demo, data/tables/cavity-survey.csv.",
  },
  {
    name: "out",
    value: "DIR",
    meaning: "Output folder. Default: out/ and the table's name; out/demo for the demo.",
  },
  { name: "workers", value: "N", meaning: "Number of workers. Default: one for each core." },
  {
    name: "profiles",
    value: "all|none|FILE",
    meaning: "Rows that get a profile; FILE names one case a line. Default: all of up to 200 rows.",
  },
  {
    name: "store",
    value: "DIR",
    meaning: "Folder of finished rows shared with other runs: taken by stamp, checked, added to.",
  },
  {
    name: "row-limit",
    value: "SECONDS",
    meaning: `Longest time of a row, which is tried twice. Default: ${ROW_LIMIT}.`,
  },
  { name: "quiet", meaning: "Print only what goes wrong." },
  {
    name: "progress-lines",
    value: "FILE",
    meaning: "Write progress as JSON lines to FILE; - is standard error, and nothing else there.",
  },
  { name: "replace", meaning: "Remove the files of another run from the output folder." },
];

/** What `deno task run` was asked, with absolute paths. */
export interface RunRequest {
  /** Parameter table. */
  readonly table: string;
  /** Output folder. */
  readonly out: string;
  /** Number of workers. */
  readonly workers: number;
  /** Rows that get a profile: all, none, or a file of cases. */
  readonly profiles?: "all" | "none" | { readonly file: string };
  /** Folder of rows shared with other runs. */
  readonly store?: string;
  /** Longest time of a row (seconds). */
  readonly rowLimit: number;
  /** Whether only what goes wrong is printed. */
  readonly quiet: boolean;
  /** File of progress lines, or `-`. */
  readonly progressLines?: string;
  /** Whether another run's files may be removed. */
  readonly replace: boolean;
  /** Command line as typed. */
  readonly command: readonly string[];
}

const DEMO = "data/tables/cavity-survey.csv";
const MOST_WORKERS = 1024;

function workersOf(text: string | undefined): number {
  if (text === undefined) return navigator.hardwareConcurrency;
  if (/^[1-9]\d*$/.test(text) && Number(text) <= MOST_WORKERS) return Number(text);
  const must = `it must be a whole number from 1 to ${MOST_WORKERS}`;
  throw new UsageError([`Cannot use --workers as ${must}: current value is ${text}`]);
}

/** The watch counts in milliseconds and compares as often as four times a limit. */
const MOST_SECONDS = 1_000_000;

function rowLimitOf(text: string | undefined): number {
  const seconds = Number(text ?? ROW_LIMIT);
  if (seconds >= 0.1 && seconds <= MOST_SECONDS) return seconds;
  const must = `it must be seconds from 0.1 to ${MOST_SECONDS}`;
  throw new UsageError([`Cannot use --row-limit as ${must}: current value is ${text}`]);
}

/**
 * Reads what is asked.
 *
 * @param values Parsed options.
 * @param command Arguments as typed, for the record.
 * @returns The request.
 * @throws {UsageError} if a value is out of range.
 */
export function runRequest(values: Values, command: readonly string[]): RunRequest {
  const one = (name: string) => values.get(name)?.[0];
  const typed = one("table"), profiles = one("profiles"), store = one("store");
  const lines = one("progress-lines");
  const table = typed === undefined ? programPath(DEMO) : absolutePath(typed);
  const name = table === programPath(DEMO) ? "demo" : table.replace(/^.*[/\\]|\.csv$/g, "");
  return {
    table,
    out: absolutePath(one("out") ?? programPath(`out/${name}`)),
    workers: workersOf(one("workers")),
    ...(profiles === undefined ? {} : {
      profiles: profiles === "all" || profiles === "none"
        ? profiles
        : { file: absolutePath(profiles) },
    }),
    ...(store === undefined ? {} : { store: absolutePath(store) }),
    rowLimit: rowLimitOf(one("row-limit")),
    quiet: values.has("quiet"),
    ...(lines === undefined ? {} : { progressLines: lines === "-" ? lines : absolutePath(lines) }),
    replace: values.has("replace"),
    command: ["deno", "task", "run", ...command],
  };
}
