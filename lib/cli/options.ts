/**
 * Options of a command: one list that is parsed, checked, explained and looked up in the glossary.
 *
 * @module
 */
import { parseArgs } from "node:util";
import { nearest } from "../batch/nearest.ts";

/** One option of a command. */
export interface CommandOption {
  /** Name without the leading hyphens. */
  readonly name: string;
  /** What its value is; absent for a switch. */
  readonly value?: string;
  /** Whether it may be given more than once. */
  readonly many?: boolean;
  /** One sentence. */
  readonly meaning: string;
}

/** A command line that cannot be carried out. */
export class UsageError extends Error {
  /** @param faults Every fault, one line each. */
  constructor(faults: readonly string[]) {
    super(faults.join("\n"));
    this.name = "UsageError";
  }
}

/** Key of the arguments that are no options, in a command that takes them. */
export const ARGUMENTS = "";

/** Values by option: each value given, in order; a switch that is given has one empty value. */
export type Values = ReadonlyMap<string, readonly string[]>;

/** The option that every command has. */
export const HELP: CommandOption = { name: "help", meaning: "Print this text." };

/**
 * Parses a command line.
 *
 * @param args Arguments.
 * @param options What the command takes; one named {@linkcode ARGUMENTS} takes the other arguments.
 * @returns Values of the options given.
 * @throws {UsageError} with every unknown, valueless or repeated option and stray argument.
 */
export function parseOptions(args: readonly string[], options: readonly CommandOption[]): Values {
  const known = new Map([...options, HELP].map((option) => [option.name, option]));
  const taken = known.delete(ARGUMENTS);
  const { tokens } = parseArgs({
    args: [...args],
    options: Object.fromEntries(
      [...known.values()].map((o) => [o.name, { type: o.value ? "string" : "boolean" } as const]),
    ),
    strict: false,
    allowPositionals: true,
    tokens: true,
  });
  const values = new Map<string, string[]>(), faults: string[] = [];
  for (const token of tokens) {
    if (token.kind === "positional") {
      const { value } = token;
      if (taken) values.set(ARGUMENTS, [...values.get(ARGUMENTS) ?? [], value]);
      else {faults.push(
          `Cannot use the argument ${JSON.stringify(value)} as only options are taken`,
        );}
    }
    if (token.kind !== "option") continue;
    const option = known.get(token.name);
    if (option === undefined) {
      const right = nearest(token.name, [...known.keys()]);
      faults.push(`Cannot use ${token.rawName} as there is no such option (nearest: --${right})`);
    } else if (option.value !== undefined && !token.value) {
      faults.push(`Cannot use --${option.name} as it must have a value: ${option.value}`);
    } else if (option.value === undefined && token.value !== undefined) {
      faults.push(`Cannot use --${option.name}=${token.value} as it takes no value`);
    } else if (values.has(option.name) && !option.many) {
      faults.push(`Cannot use --${option.name} as it must be given once`);
    } else values.set(option.name, [...values.get(option.name) ?? [], token.value ?? ""]);
  }
  if (faults.length > 0) throw new UsageError(faults);
  return values;
}

/**
 * Explains a command.
 *
 * @param command How it is called.
 * @param purpose One sentence.
 * @param options What it takes.
 * @returns Text for the terminal.
 */
export function helpText(
  command: string,
  purpose: string,
  options: readonly CommandOption[],
): string {
  const head = ({ name, value }: CommandOption) =>
    name === ARGUMENTS ? value! : `--${name}${value ? ` ${value}` : ""}`;
  const all = [...options, HELP], width = Math.max(...all.map((o) => head(o).length));
  const lines = all.map((o) => `  ${head(o).padEnd(width)}  ${o.meaning}`);
  return [`deno task ${command} [options]`, purpose, "", ...lines].join("\n");
}
