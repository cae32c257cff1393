/**
 * What names a text of claims may use, and what is wrong with those it uses.
 *
 * @module
 */
import { closest } from "fastest-levenshtein";
import { names } from "../expr/tree.ts";
import { derivativeOf, written } from "../expr/written.ts";

/** Names by what may be done with them. */
export interface Known {
  /** Names that an expression may hold. */
  readonly names: ReadonlySet<string>;
  /** Names that may stand behind the comma of a derivative. */
  readonly variables: ReadonlySet<string>;
}

const HINTS: Readonly<Record<string, string>> = {
  e: "write exp(1)",
  ln: "write log",
  Pi: "write pi",
  PI: "write pi",
};

/**
 * Faults of a text: that it is no expression, or names that mean nothing.
 *
 * @param text What was written.
 * @param known What there is.
 * @returns One line for each fault, without the place.
 */
export function faultsOf(text: string, known: Known): string[] {
  const out = new Set<string>();
  const stranger = (name: string, set: ReadonlySet<string>, must: string) => {
    const hint = HINTS[name] ?? `nearest: ${closest(name, [...set])}`;
    out.add(`Cannot use the name ${name} as it must be ${must} (${hint})`);
  };
  const check = (part: string) => {
    for (const name of names(written(part))) {
      const d = derivativeOf(name);
      if (!d) {
        if (!known.names.has(name)) stranger(name, known.names, "declared or part of the setting");
        continue;
      }
      check(d.inner);
      for (const x of d.by) {
        if (!known.variables.has(x)) {
          stranger(x, known.variables, "a coordinate, field or constant to differentiate by it");
        }
      }
    }
  };
  try {
    check(text);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    out.add(error.message);
  }
  return [...out];
}
