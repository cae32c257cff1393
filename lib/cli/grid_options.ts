/**
 * Options of `deno task grid`, and what they ask for.
 *
 * @module
 */
import type { Grid, GridRange, SteppedRange } from "../batch/grid.ts";
import { readNumber } from "../batch/number.ts";
import { absolutePath } from "./launch.ts";
import { type CommandOption, UsageError, type Values } from "./options.ts";

const STEPPED = "COLUMN=FROM:TO:COUNT", RANDOM = "COLUMN=FROM:TO";

/** Options of `deno task grid`. */
export const GRID_OPTIONS: readonly CommandOption[] = [
  { name: "out", value: "FILE", meaning: "Table to write. Default: standard output." },
  { name: "set", value: "COLUMN=VALUE", many: true, meaning: "One value in every row." },
  { name: "linear", value: STEPPED, many: true, meaning: "Equally spaced values, ends included." },
  { name: "log", value: STEPPED, many: true, meaning: "Values equally spaced in the logarithm." },
  { name: "uniform", value: RANDOM, many: true, meaning: "Random values, uniform." },
  {
    name: "log-uniform",
    value: RANDOM,
    many: true,
    meaning: "Random values, uniform in the logarithm.",
  },
  { name: "draws", value: "N", meaning: "Random rows for each combination. Default: 1." },
  { name: "seed", value: "N", meaning: "Seed of the random values. Default: 1." },
  { name: "prefix", value: "NAME", meaning: "First part of the cases' names. Default: row." },
  { name: "replace", meaning: "Write over a file that is there." },
];

/** What `deno task grid` was asked. */
export interface GridRequest {
  /** Ranges and fixed columns. */
  readonly grid: Grid;
  /** Absolute path of the table; absent for standard output. */
  readonly out?: string;
  /** Whether a file there may be written over. */
  readonly replace: boolean;
}

function whole(text: string, least: number, most: number): number | undefined {
  const value = /^\d+$/.test(text) ? Number(text) : NaN;
  return value >= least && value <= most ? value : undefined;
}

/**
 * Reads what is asked.
 *
 * @param values Parsed options.
 * @returns The request.
 * @throws {UsageError} with every value that is not of its form.
 */
export function gridRequest(values: Values): GridRequest {
  const faults: string[] = [];
  const all = (name: string) => values.get(name) ?? [];
  const fault = (name: string, must: string, text: string) =>
    faults.push(`Cannot use --${name} as it must be ${must}: current value is ${text}`);
  const ranges = (name: string, counted: boolean): SteppedRange[] =>
    all(name).flatMap((text) => {
      const [, column, rest] = /^([^=]+)=(.*)$/.exec(text) ?? [];
      const [from = "", to = "", count = "", ...more] = rest?.split(":") ?? [];
      const ends = [from, to].map(readNumber);
      const n = counted ? whole(count, 1, 1_000_000) : count === "" ? 1 : undefined;
      if (
        column === undefined || more.length > 0 || n === undefined ||
        ends.some((end) => typeof end !== "number")
      ) {
        fault(name, counted ? STEPPED : RANDOM, text);
        return [];
      }
      return [{ column, from: ends[0] as number, to: ends[1] as number, count: n }];
    });
  const number = (name: string, least: number, most: number) => {
    const text = all(name)[0];
    if (text === undefined) return {};
    const value = whole(text, least, most);
    if (value === undefined) fault(name, `a whole number from ${least} to ${most}`, text);
    return { [name]: value ?? least };
  };
  const fixed = all("set").map((text) => {
    const [, column, value] = /^([^=]+)=(.*)$/.exec(text) ?? [];
    if (column === undefined) fault("set", "COLUMN=VALUE", text);
    return [column ?? "", value ?? ""] as const;
  });
  const random = (name: string): GridRange[] => ranges(name, false);
  const prefix = all("prefix")[0], out = all("out")[0];
  const grid: Grid = {
    fixed,
    linear: ranges("linear", true),
    log: ranges("log", true),
    uniform: random("uniform"),
    logUniform: random("log-uniform"),
    ...number("draws", 1, 1_000_000),
    ...number("seed", 0, 4_294_967_295),
    ...(prefix === undefined ? {} : { prefix }),
  };
  if (faults.length > 0) throw new UsageError(faults);
  return {
    grid,
    replace: values.has("replace"),
    ...(out === undefined ? {} : { out: absolutePath(out) }),
  };
}
