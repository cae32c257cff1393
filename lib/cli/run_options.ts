/**
 * Options of `deno task run`, and what they ask for.
 *
 * @module
 */
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
  const typed = one("table"), profiles = one("profiles");
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
    replace: values.has("replace"),
    command: ["deno", "task", "run", ...command],
  };
}
