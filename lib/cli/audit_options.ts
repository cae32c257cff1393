/**
 * Options of `deno task audit`, and what they ask for.
 *
 * @module
 */
import { basename } from "node:path";
import { absolutePath, programPath } from "./launch.ts";
import { ARGUMENTS, type CommandOption, UsageError, type Values } from "./options.ts";

/** Options of `deno task audit`. */
export const AUDIT_OPTIONS: readonly CommandOption[] = [
  {
    name: ARGUMENTS,
    value: "FILE",
    many: true,
    meaning: "Claims file, YAML or JSON. Without one the ready audits are judged.",
  },
  { name: "model", value: "NAME", meaning: "Ready audits of one model only. Default: all." },
  {
    name: "out",
    value: "DIR",
    meaning: "Where the ledger goes. Default: out/audit, or out/audit/ and the file's name.",
  },
  { name: "strict", meaning: "Exit status 1 also where a claim is undecided." },
  { name: "seed", value: "N", meaning: "Seed of the random points. Default: 20." },
  { name: "workers", value: "N", meaning: "Workers for ready audits. Default: one for each core." },
];

/** What `deno task audit` was asked, with absolute paths. */
export interface AuditRequest {
  /** Claims file; absent for ready audits. */
  readonly file?: string;
  /** Model whose ready audits are judged. */
  readonly model?: string;
  readonly out: string;
  readonly strict: boolean;
  readonly seed?: number;
  readonly workers: number;
}

/**
 * Reads what is asked.
 *
 * @param values Parsed options.
 * @returns The request.
 * @throws {UsageError} with every fault.
 */
export function auditRequest(values: Values): AuditRequest {
  const one = (name: string) => values.get(name)?.[0];
  const faults: string[] = [], files = values.get(ARGUMENTS) ?? [];
  if (files.length > 1) {
    faults.push(`Cannot audit as one claims file must be named: got ${files.join(" ")}`);
  }
  const file = files[0], model = one("model"), out = one("out");
  if (file !== undefined && model !== undefined) {
    faults.push("Cannot use --model with a claims file as the file names its model: got both");
  }
  const whole = (name: string, least: number, most: number) => {
    const text = one(name);
    if (text === undefined) return undefined;
    const value = /^\d+$/.test(text) ? Number(text) : NaN;
    if (value >= least && value <= most) return value;
    faults.push(
      `Cannot use --${name} as it must be a whole number from ${least} to ${most}: ` +
        `current value is ${text}`,
    );
    return undefined;
  };
  const seed = whole("seed", 0, 4_294_967_295), workers = whole("workers", 1, 1024);
  if (faults.length > 0) throw new UsageError(faults);
  const name = file === undefined ? "" : `/${basename(file).replace(/\.(ya?ml|json)$/, "")}`;
  return {
    ...(file === undefined ? {} : { file: absolutePath(file) }),
    ...(model === undefined ? {} : { model }),
    out: out === undefined ? programPath(`out/audit${name}`) : absolutePath(out),
    strict: values.has("strict"),
    ...(seed === undefined ? {} : { seed }),
    workers: workers ?? navigator.hardwareConcurrency,
  };
}
