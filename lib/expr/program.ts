/**
 * Series programs: a system of ordinary differential equations as a flat list of operations, each of
 * which has a power-series recurrence. Plain data; workers turn it into code without any algebra.
 *
 * @module
 */

/** One operation; operands are indices of earlier operations. */
export type Operation =
  | { readonly op: "constant"; readonly p: string; readonly q: string }
  | { readonly op: "parameter"; readonly name: string }
  | { readonly op: "unknown"; readonly index: number }
  | { readonly op: "independent" }
  | { readonly op: "add" | "sub" | "mul" | "div"; readonly a: number; readonly b: number }
  | {
    readonly op: "neg" | "sqr" | "exp" | "log" | "sqrt" | "expm1" | "log1p" | "sqrt1pm1";
    readonly a: number;
  }
  | { readonly op: "power"; readonly a: number; readonly p: string; readonly q: string };

/** A system x' = f(x, t; parameters) with named further quantities. */
export interface Program {
  /** Name of the independent variable. */
  readonly independent: string;
  /** Names of the unknowns x, in order. */
  readonly unknowns: readonly string[];
  /** Names of the runtime parameters. */
  readonly parameters: readonly string[];
  /** All operations in an order in which they can be carried out. */
  readonly operations: readonly Operation[];
  /** Whether an operation depends on an unknown or the independent variable. */
  readonly varies: readonly boolean[];
  /** Operation that holds x_i'. */
  readonly derivatives: readonly number[];
  /** Operations followed as series at every step (event functions, step control). */
  readonly series: Readonly<Record<string, number>>;
  /** Operations evaluated on demand. */
  readonly outputs: Readonly<Record<string, number>>;
}
