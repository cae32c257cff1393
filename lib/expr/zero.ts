/**
 * Decides whether an expression vanishes identically. The numeric witness (20 points, 64 digits) says
 * zero or not; an algebraic route that reaches zero as well makes it a proof.
 *
 * @module
 */
import { type AlgebraOptions, proposal } from "./algebra.ts";
import { normalIsZero } from "./normal.ts";
import { print } from "./print.ts";
import type { Ranges } from "./points.ts";
import { type Expr, isNum, num } from "./tree.ts";
import { compare, type Witness } from "./verify.ts";

const SELF_CHECK = 20_000; // term operations: milliseconds, enough for what people write

/** A decision about `e = 0`. */
export interface ZeroDecision {
  /**
   * `proved`: algebra reached zero and the witness agrees. `holds-numerically`: the witness alone.
   * `nonzero`: a point where it does not vanish. `undecided`: too few points inside the domain.
   */
  readonly verdict: "proved" | "holds-numerically" | "nonzero" | "undecided";
  /** The algorithm that reached zero, empty if none did. */
  readonly algorithm: string;
  /** The numeric witness. */
  readonly witness: Witness;
}

/**
 * Decides whether `e` is zero for all values of its names.
 *
 * @param e An expression.
 * @param options Points (20 by default), digits, seed, ranges.
 * @returns The decision; a non-zero value at one point is final, whatever the algebra system would propose.
 * @throws {Error} if the normal form is 0 where the value is not: that would be a defect of this program.
 * @example A square
 * ```ts
 * import { decideZero, parse } from "@backstamp/backstamp";
 * const { verdict } = await decideZero(parse("(x+y)^2 - x^2 - 2*x*y - y^2"));
 * if (verdict !== "proved") throw new Error(verdict);
 * ```
 */
export async function decideZero(e: Expr, options: AlgebraOptions = {}): Promise<ZeroDecision> {
  const witness = await compare(e, num(0), { count: 20, ...options });
  if (witness.outcome === "differ") {
    refuse(e, witness, options);
    return { verdict: "nonzero", algorithm: "", witness };
  }
  const algorithm = await reachesZero(e, options);
  if (witness.outcome === "no-points") return { verdict: "undecided", algorithm, witness };
  return { verdict: algorithm ? "proved" : "holds-numerically", algorithm, witness };
}

/** Algebra that reaches zero where numbers do not is a defect of this program, and said so. */
function refuse(e: Expr, witness: Witness, options: AlgebraOptions): void {
  const positive = (n: string) => isPositive(n, options.ranges);
  if (normalIsZero(e, { positive, budget: SELF_CHECK }) !== true) return;
  throw new Error(
    `Cannot decide about ${print(e).slice(0, 80)} as algebra and numbers must agree: ` +
      `algebra reaches 0, the value is ${witness.left} at ${JSON.stringify(witness.at)}`,
  );
}

/** Whether a name is drawn from positive values only. */
export function isPositive(name: string, ranges: Ranges = {}): boolean {
  return (ranges[name]?.[0] ?? 0) >= 0;
}

async function reachesZero(e: Expr, options: AlgebraOptions): Promise<string> {
  if (isNum(e, 0)) return "exact constants";
  if (normalIsZero(e, { positive: (n) => isPositive(n, options.ranges) }) === true) {
    return "rational normal form";
  }
  const expanded = await proposal("expand", e, undefined, options);
  return expanded && isNum(expanded, 0) ? "expansion by the algebra system" : "";
}
