/**
 * Outputs of a program without unknowns (constants of a model).
 *
 * @module
 */
import type { Program } from "../../expr/program.ts";
import type { Arithmetic } from "../arithmetic/arithmetic.ts";
import { valueOf } from "./value.ts";

/** Values of the outputs for the given parameters. */
export function constants<T>(
  A: Arithmetic<T>,
  program: Program,
  parameters: Readonly<Record<string, T>>,
): Readonly<Record<string, T>> {
  const v: T[] = [], point = { x: [], t: A.from(0), parameter: (n: string) => parameters[n]! };
  program.operations.forEach((o, i) => {
    if (!program.varies[i]) v[i] = valueOf(A, o, v, point);
  });
  return Object.fromEntries(Object.entries(program.outputs).map(([n, i]) => [n, v[i]!]));
}
