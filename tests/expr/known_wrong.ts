/**
 * Inputs that the algebra system gets wrong, with correct values by SymPy and mpmath.
 *
 * @module
 */
import { readFileSync } from "node:fs";
import type { Point } from "./outside.ts";

/** One input. */
export interface KnownWrong {
  readonly op: "diff" | "expand" | "simplify" | "factor" | "integrate";
  readonly input: string;
  /** The variable of diff and integrate. */
  readonly variable?: string;
  readonly at: Point;
  /** The value at the point, 25 digits: of the derivative (diff), the integrand (integrate), the input. */
  readonly value: string;
  /** Whether the answer is wrong as the library asks, or only without its patch of diff. */
  readonly wrong: "as wrapped" | "unpatched";
}

/** Reads `tests/reference/known_wrong.json`, made by `known_wrong.py` beside it. */
export function knownWrong(): KnownWrong[] {
  const file = new URL("../reference/known_wrong.json", import.meta.url);
  return JSON.parse(readFileSync(file, "utf8")).entries;
}
