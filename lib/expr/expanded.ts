/**
 * How many terms an expression has when everything is multiplied out: counted before the algebra system is
 * asked, since expansion has no end that it would see.
 *
 * @module
 */
import type { Expr } from "./tree.ts";

const MOST = 1e12; // beyond that every number means the same

/** Terms of a sum of `terms` terms to the power `n`: (n + terms - 1 choose n). */
function powered(terms: number, n: number): number {
  if (terms <= 1) return 1;
  let out = 1;
  for (let i = 1; i <= n && out < MOST; i++) out = out * (terms - 1 + i) / i;
  return Math.min(Math.round(out), MOST);
}

/**
 * An upper bound of the number of terms after expansion of numerators and denominators.
 *
 * @param e An expression.
 */
export function expandedTerms(e: Expr): number {
  const seen = new Map<Expr, number>();
  const walk = (x: Expr): number => {
    const known = seen.get(x);
    if (known !== undefined) return known;
    const out = Math.min(node(x), MOST);
    seen.set(x, out);
    return out;
  };
  const node = (x: Expr): number => {
    switch (x.kind) {
      case "num":
      case "sym":
        return 1;
      case "neg":
        return walk(x.a);
      case "add":
      case "sub":
        return walk(x.a) + walk(x.b);
      case "mul":
      case "div":
        return walk(x.a) * walk(x.b);
      case "pow": {
        const n = x.b.kind === "num" ? Math.ceil(Math.abs(Number(x.b.p) / Number(x.b.q))) : 1;
        return powered(walk(x.a), n) * (x.b.kind === "num" ? 1 : walk(x.b));
      }
      case "call":
        return x.fn === "exp" || x.fn === "expm1" ? walk(x.a) : 1 + walk(x.a);
    }
  };
  return walk(e);
}
