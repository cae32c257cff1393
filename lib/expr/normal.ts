/**
 * Rational normal form: an expression as a quotient of polynomials in its names and in exponential,
 * logarithmic and radical kernels. A rational identity between kernels reduces to the polynomial 0.
 *
 * If the form is 0 the expression vanishes wherever it is real and its names are inside the ranges that
 * were declared positive. If it is not 0 nothing is said: two kernels may still be related.
 *
 * @module
 */
import { elementary } from "./elementary.ts";
import { Kernels } from "./kernels.ts";
import { BudgetSpent, type Monomial, type Polynomial, UNIT } from "./polynomial.ts";
import type { Quotient } from "./quotient.ts";
import { add, call, div, type Expr, isNum, mul, type Num, num, pow, sub, sym } from "./tree.ts";

/** How a normal form is made. */
export interface NormalOptions {
  /** Whether a name takes positive values only. @default all do */
  readonly positive?: (name: string) => boolean;
  /** Term operations that may be spent. @default 400000 */
  readonly budget?: number;
}

function former(options: NormalOptions): Kernels {
  return new Kernels(options.budget ?? 400_000, options.positive ?? (() => true));
}

/**
 * Whether the rational normal form of `e` is 0.
 *
 * @param e An expression.
 * @param options Which names are positive, and the budget.
 * @returns `true`: it is; `false`: it is not, which proves nothing; a text: why there is no form.
 * @example Over a common denominator
 * ```ts
 * import { normalIsZero, parse } from "@backstamp/backstamp";
 * const e = parse("1/(x+y) + 1/(x-y) - 2*x/(x^2-y^2)");
 * if (normalIsZero(e) !== true) throw new Error("not recognised");
 * ```
 */
export function normalIsZero(e: Expr, options: NormalOptions = {}): boolean | string {
  try {
    return former(options).form(elementary(e)).n.size === 0;
  } catch (error) {
    if (error instanceof BudgetSpent || error instanceof RangeError) return error.message;
    throw error;
  }
}

/**
 * The rational normal form as a tree: a sum of terms over a product of factors.
 *
 * @param e An expression.
 * @param options Which names are positive, and the budget.
 * @returns The form; `e` itself if there is none within the budget.
 */
export function normalForm(e: Expr, options: NormalOptions = {}): Expr {
  try {
    const kernels = former(options);
    return tree(kernels, kernels.form(elementary(e)));
  } catch (error) {
    if (error instanceof BudgetSpent || error instanceof RangeError) return e;
    throw error;
  }
}

function tree(kernels: Kernels, a: Quotient): Expr {
  const one = (m: Monomial, c: Num): Expr => {
    let top: Expr = num(c.p < 0n ? -c.p : c.p), bottom: Expr = num(c.q), inside: Expr = num(0);
    for (let i = 0; i < m.length; i += 2) {
      const g = kernels.generators[m[i]!]!, k = num(m[i + 1]!, UNIT);
      if (g.kind === "exp") {
        const size = num(k.p < 0n ? -k.p : k.p, k.q), x = mul(size, tree(kernels, g.of));
        inside = k.p < 0n ? sub(inside, x) : add(inside, x);
      } else {
        const base: Expr = g.kind === "name"
          ? sym(g.name)
          : g.kind === "prime"
          ? num(g.value)
          : g.kind === "log"
          ? call("log", tree(kernels, g.of))
          : tree(kernels, g.of);
        const size = num(k.p < 0n ? -k.p : k.p, k.q);
        const x = size.p === 1n && size.q === 2n ? call("sqrt", base) : pow(base, size);
        if (k.p < 0n) bottom = mul(bottom, x);
        else top = mul(top, x);
      }
    }
    if (!isNum(inside, 0)) top = mul(top, call("exp", inside));
    return div(top, bottom);
  };
  const sumOf = (p: Polynomial): Expr =>
    [...p.values()].reduce<Expr>(
      (s, t) => t.c.p < 0n ? sub(s, one(t.m, t.c)) : add(s, one(t.m, t.c)),
      num(0),
    );
  let out = sumOf(a.n);
  for (const f of a.d.values()) out = div(out, pow(sumOf(f.base), num(f.power)));
  return out;
}
