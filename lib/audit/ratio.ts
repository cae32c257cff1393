/**
 * The factor between two expressions: a simple constant, or a product that vanishes nowhere.
 *
 * @module
 */
import { normalForm } from "../expr/normal.ts";
import { points, type Ranges } from "../expr/points.ts";
import { precise } from "../expr/precise.ts";
import { print } from "../expr/print.ts";
import { div, type Expr, isNum, names } from "../expr/tree.ts";
import { isPositive } from "../expr/zero.ts";
import { recognise } from "./rational.ts";

/** How a ratio is looked for. */
export interface RatioOptions {
  readonly seed: number;
  readonly digits: number;
  readonly ranges: Ranges;
}

/** What left/right is. */
export type Ratio =
  | { readonly kind: "constant"; readonly text: string }
  /** The same at five points, but no number that is recognised; its first digits. */
  | { readonly kind: "unknown-constant"; readonly digits: string }
  | { readonly kind: "none" };

/** The constant that left/right equals at five points, if it does. */
export async function constantRatio(left: Expr, right: Expr, how: RatioOptions): Promise<Ratio> {
  const none = { kind: "none" } as const;
  if (isNum(right, 0) || isNum(left, 0)) return none;
  const p = await precise(how.digits), e = div(left, right);
  const next = points(names(e), how.seed + 1, how.ranges);
  let first: ReturnType<typeof p.big> | undefined;
  for (let tries = 0, used = 0; used < 5; tries++) {
    if (tries > 200) return none;
    const x = p.evaluate(e, next());
    if (!x.isFinite()) continue;
    used++;
    first ??= x;
    // 30 digits, as for the recognition of the constant
    if (x.minus(first).abs().gt(first.abs().times("1e-30"))) return none;
  }
  if (!first || first.isZero()) return none;
  const text = recognise(first, p);
  if (text !== undefined) return { kind: "constant", text };
  return { kind: "unknown-constant", digits: first.toPrecision(15) };
}

/**
 * left/right where it is a product of numbers, exponentials and powers of positive names, as text; undefined
 * otherwise. Whoever uses it checks that it is right.
 */
export function productRatio(left: Expr, right: Expr, ranges: Ranges): string | undefined {
  if (isNum(right, 0) || isNum(left, 0)) return undefined;
  const positive = (name: string) => isPositive(name, ranges);
  const ratio = normalForm(div(left, right), { positive });
  return nowhereZero(ratio, positive) ? print(ratio) : undefined;
}

function nowhereZero(e: Expr, positive: (name: string) => boolean): boolean {
  const both = (...list: Expr[]) => list.every((x) => nowhereZero(x, positive));
  switch (e.kind) {
    case "num":
      return e.p !== 0n;
    case "sym":
      return positive(e.name);
    case "neg":
      return both(e.a);
    case "mul":
    case "div":
      return both(e.a, e.b);
    case "pow":
      return both(e.a);
    case "call":
      return e.fn === "exp" || (e.fn === "sqrt" && both(e.a));
    default:
      return false;
  }
}
