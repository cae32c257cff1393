/**
 * The rules of differentiation on trees, for work with jets where thousands of derivatives are taken.
 * Whoever uses it checks the results against mathjs's derivative (see `Jets.verify`).
 *
 * @module
 */
import { add, call, div, type Expr, mul, names, neg, num, pow, sub } from "./tree.ts";

/**
 * The partial derivative of `e` with respect to `name`.
 *
 * @param e An expression; other names are constants.
 * @param name The variable.
 * @returns The derivative, exact constants folded, otherwise as the rules give it.
 * @example Chain rule
 * ```ts
 * import { derive, parse, print } from "@backstamp/backstamp";
 * if (print(derive(parse("exp(2*x)"), "x")) !== "exp(2*x)*2") throw new Error("wrong");
 * ```
 */
export function derive(e: Expr, name: string): Expr {
  const seen = new Map<Expr, Expr>();
  const d = (x: Expr): Expr => {
    const known = seen.get(x);
    if (known) return known;
    const out = rule(x);
    seen.set(x, out);
    return out;
  };
  const rule = (x: Expr): Expr => {
    switch (x.kind) {
      case "num":
        return num(0);
      case "sym":
        return num(x.name === name ? 1 : 0);
      case "neg":
        return neg(d(x.a));
      case "add":
        return add(d(x.a), d(x.b));
      case "sub":
        return sub(d(x.a), d(x.b));
      case "mul":
        return add(mul(d(x.a), x.b), mul(x.a, d(x.b)));
      case "div":
        return sub(div(d(x.a), x.b), div(mul(x.a, d(x.b)), pow(x.b, num(2))));
      case "pow": {
        if (x.b.kind === "num") {
          return mul(mul(x.b, pow(x.a, sub(x.b, num(1)))), d(x.a));
        }
        const outer = mul(mul(x.b, pow(x.a, sub(x.b, num(1)))), d(x.a));
        return names(x.b).includes(name)
          ? add(outer, mul(mul(x, call("log", x.a)), d(x.b)))
          : outer;
      }
      case "call":
        return mul(outside(x.fn, x.a, x), d(x.a));
    }
  };
  return d(e);
}

/** fn'(a), where `whole` is fn(a). */
function outside(fn: Extract<Expr, { kind: "call" }>["fn"], a: Expr, whole: Expr): Expr {
  switch (fn) {
    case "exp":
      return whole;
    case "expm1":
      return call("exp", a);
    case "log":
      return div(num(1), a);
    case "log1p":
      return div(num(1), add(num(1), a));
    case "sqrt":
      return div(num(1, 2), whole);
    case "sqrt1pm1":
      return div(num(1, 2), add(num(1), whole));
  }
}
