/**
 * Options of `deno task execute`, and what they ask for.
 *
 * @module
 */
import { basename } from "node:path";
import { absolutePath, programPath } from "./launch.ts";
import { ARGUMENTS, type CommandOption, UsageError, type Values } from "./options.ts";
import { type RunRequest, runRequest } from "./run_options.ts";

/** Options of `deno task execute`. */
export const EXECUTE_OPTIONS: readonly CommandOption[] = [
  { name: ARGUMENTS, value: "NOTEBOOK...", many: true, meaning: "Notebooks to execute." },
  { name: "run", value: "DIR", meaning: "Output folder of a finished run that they read." },
  { name: "table", value: "FILE", meaning: "Parameter table that is solved first, as by run." },
  {
    name: "out",
    value: "DIR",
    meaning: "Where the executed notebooks go. Default: the run's folder, else out/notebooks.",
  },
  {
    name: "timeout",
    value: "SECONDS",
    meaning: "Longest time of a cell. Default: 600.",
  },
];

/** What `deno task execute` was asked, with absolute paths. */
export interface ExecuteRequest {
  /** Notebooks. */
  readonly notebooks: readonly string[];
  /** Folder of the run that they read; absent if none was named. */
  readonly run?: string;
  /** Run to be made first. */
  readonly solve?: RunRequest;
  /** Folder of the executed notebooks. */
  readonly out: string;
  /** Longest time of a cell (milliseconds). */
  readonly timeout: number;
}

/** Longest time of a cell unless asked otherwise (seconds). */
const DEFAULT_TIMEOUT = 600;
/** A timer of the runtime cannot be longer (seconds; 2^31 milliseconds). */
const LONGEST_TIMEOUT = 2_000_000;

/**
 * Reads what is asked.
 *
 * @param values parsed options
 * @returns the request
 * @throws {UsageError} with every fault
 */
export function executeRequest(values: Values): ExecuteRequest {
  const one = (name: string) => values.get(name)?.[0];
  const notebooks = (values.get(ARGUMENTS) ?? []).map(absolutePath);
  const faults: string[] = [];
  if (notebooks.length === 0) faults.push("Cannot execute as a notebook must be named: got none");
  const names = notebooks.map((path) => basename(path));
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined) {
    faults.push(`Cannot execute as file names must differ: ${twice} is named twice`);
  }
  if (values.has("run") && values.has("table")) {
    faults.push("Cannot use --run and --table together as one run must be read: got both");
  }
  const seconds = Number(one("timeout") ?? DEFAULT_TIMEOUT);
  if (!(seconds > 0 && seconds <= LONGEST_TIMEOUT)) {
    faults.push(
      `Cannot use --timeout as it must be seconds above 0 and at most ${LONGEST_TIMEOUT}: ` +
        `current value is ${one("timeout")}`,
    );
  }
  if (faults.length > 0) throw new UsageError(faults);
  const table = one("table"), out = one("out"), folder = one("run");
  const solveValues = new Map([...values].filter(([name]) => name === "table" || name === "out"));
  const solve = table === undefined ? undefined : runRequest(solveValues, ["--table", table]);
  const run = solve?.out ?? (folder === undefined ? undefined : absolutePath(folder));
  return {
    notebooks,
    ...(run === undefined ? {} : { run }),
    ...(solve === undefined ? {} : { solve }),
    out: out === undefined ? run ?? programPath("out/notebooks") : absolutePath(out),
    timeout: 1000 * seconds,
  };
}
