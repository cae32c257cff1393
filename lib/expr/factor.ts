/**
 * Factored forms that can be believed.
 *
 * @module
 */
import { type AlgebraOptions, equal, proposal } from "./algebra.ts";
import type { Expr } from "./tree.ts";

/**
 * A factored form of `e`, verified at high precision; `e` itself if the algebra system's proposal differs
 * from it in value or cannot be read.
 *
 * @param e An expression.
 * @param options Points, digits, seed, ranges, record of discarded proposals.
 * @throws {Error} named `AlgebraKilled` if the algebra system does not end within half a minute.
 * @example A proposal with the wrong sign is not taken
 * ```ts
 * import { compare, factor, parse } from "@backstamp/backstamp";
 * const e = parse("1 - 2*M/r");
 * const { outcome } = await compare(e, await factor(e));
 * if (outcome !== "agree") throw new Error("changed its value");
 * ```
 */
export async function factor(e: Expr, options: AlgebraOptions = {}): Promise<Expr> {
  const p = await proposal("factor", e, undefined, options);
  return p && await equal("factor", e, p, options) || e;
}
