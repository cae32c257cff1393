/**
 * Rewrites the small-number functions by the elementary ones they abbreviate, for symbolic work:
 * expm1(x) = exp(x) - 1, log1p(x) = log(1+x), sqrt1pm1(x) = sqrt(1+x) - 1.
 *
 * @module
 */
import { add, call, type Expr, num, rebuild, sub } from "./tree.ts";

/**
 * `e` with only exp, log and sqrt as functions.
 *
 * @param e An expression.
 * @returns An expression of equal value everywhere.
 * @example log1p is a logarithm
 * ```ts
 * import { elementary, parse, print } from "@backstamp/backstamp";
 * if (print(elementary(parse("log1p(x)"))) !== "log(1 + x)") throw new Error("not rewritten");
 * ```
 */
export function elementary(e: Expr): Expr {
  const seen = new Map<Expr, Expr>();
  const walk = (x: Expr): Expr => {
    const known = seen.get(x);
    if (known) return known;
    const y = rebuild(x, walk);
    let out = y;
    if (y.kind === "call") {
      if (y.fn === "expm1") out = sub(call("exp", y.a), num(1));
      if (y.fn === "log1p") out = call("log", add(num(1), y.a));
      if (y.fn === "sqrt1pm1") out = sub(call("sqrt", add(num(1), y.a)), num(1));
    }
    seen.set(x, out);
    return out;
  };
  return walk(e);
}
