/**
 * Expression trees: exact rationals, names, the four operations, powers and the elementary functions
 * that the field equations need. Trees are immutable; the builders below fold exact constants and
 * drop neutral elements, and do nothing else (no rearrangement, so an expression keeps its author's
 * form).
 *
 * @module
 */

/** Functions an expression may call; `expm1`, `log1p` and `sqrt1pm1` (sqrt(1+x) - 1) keep small numbers exact. */
export const FUNCTIONS = ["exp", "log", "sqrt", "expm1", "log1p", "sqrt1pm1"] as const;

/** One of {@linkcode FUNCTIONS}. */
export type FunctionName = (typeof FUNCTIONS)[number];

/** An expression tree node. */
export type Expr =
  | { readonly kind: "num"; readonly p: bigint; readonly q: bigint }
  | { readonly kind: "sym"; readonly name: string }
  | { readonly kind: "add" | "sub" | "mul" | "div"; readonly a: Expr; readonly b: Expr }
  | { readonly kind: "neg"; readonly a: Expr }
  | { readonly kind: "pow"; readonly a: Expr; readonly b: Expr }
  | { readonly kind: "call"; readonly fn: FunctionName; readonly a: Expr };

/** An exact rational node. */
export type Num = Extract<Expr, { kind: "num" }>;

function gcd(a: bigint, b: bigint): bigint {
  if (a < 0n) a = -a;
  if (b < 0n) b = -b;
  while (b !== 0n) [a, b] = [b, a % b];
  return a;
}

/**
 * The rational p/q in lowest terms.
 *
 * @throws {RangeError} if q is zero.
 * @example Lowest terms
 * ```ts
 * import { num } from "@backstamp/backstamp";
 * const half = num(2n, 4n);
 * if (half.p !== 1n || half.q !== 2n) throw new Error("not in lowest terms");
 * ```
 */
export function num(p: bigint | number, q: bigint | number = 1n): Num {
  let a = BigInt(p), b = BigInt(q);
  if (b === 0n) {
    throw new RangeError(
      "Cannot build a rational as its denominator must not be 0: current value is 0",
    );
  }
  if (b < 0n) [a, b] = [-a, -b];
  const g = gcd(a, b) || 1n;
  return { kind: "num", p: a / g, q: b / g };
}

/** The name node `name`. */
export function sym(name: string): Expr {
  return { kind: "sym", name };
}

/** Whether `e` is the exact number `n`. */
export function isNum(e: Expr, n: bigint | number): boolean {
  return e.kind === "num" && e.q === 1n && e.p === BigInt(n);
}

/** a + b, exact constants folded. */
export function add(a: Expr, b: Expr): Expr {
  if (a.kind === "num" && b.kind === "num") return num(a.p * b.q + b.p * a.q, a.q * b.q);
  if (isNum(a, 0)) return b;
  if (isNum(b, 0)) return a;
  if (b.kind === "neg") return sub(a, b.a);
  return { kind: "add", a, b };
}

/** a - b, exact constants folded. */
export function sub(a: Expr, b: Expr): Expr {
  if (a.kind === "num" && b.kind === "num") return num(a.p * b.q - b.p * a.q, a.q * b.q);
  if (isNum(b, 0)) return a;
  if (isNum(a, 0)) return neg(b);
  if (b.kind === "neg") return add(a, b.a);
  return { kind: "sub", a, b };
}

/** a * b, exact constants folded; an exact zero factor gives the exact zero. */
export function mul(a: Expr, b: Expr): Expr {
  if (a.kind === "num" && b.kind === "num") return num(a.p * b.p, a.q * b.q);
  if (isNum(a, 0) || isNum(b, 0)) return num(0);
  if (isNum(a, 1)) return b;
  if (isNum(b, 1)) return a;
  if (isNum(a, -1)) return neg(b);
  if (isNum(b, -1)) return neg(a);
  return { kind: "mul", a, b };
}

/**
 * a / b, exact constants folded.
 *
 * @throws {RangeError} if b is the exact zero.
 */
export function div(a: Expr, b: Expr): Expr {
  if (isNum(b, 0)) {
    throw new RangeError(
      "Cannot divide as the divisor must not be the exact zero: current value is 0",
    );
  }
  if (a.kind === "num" && b.kind === "num") return num(a.p * b.q, a.q * b.p);
  if (isNum(a, 0)) return a;
  if (isNum(b, 1)) return a;
  if (isNum(b, -1)) return neg(a);
  return { kind: "div", a, b };
}

/** -a. */
export function neg(a: Expr): Expr {
  if (a.kind === "num") return num(-a.p, a.q);
  if (a.kind === "neg") return a.a;
  if (a.kind === "sub") return sub(a.b, a.a);
  return { kind: "neg", a };
}

const LARGE = 10n ** 120n;

/** a ^ b; exact for rational a and small integer b. */
export function pow(a: Expr, b: Expr): Expr {
  if (isNum(b, 0)) return num(1);
  if (isNum(b, 1)) return a;
  if (b.kind === "num" && b.q === 1n && a.kind === "num" && b.p >= -64n && b.p <= 64n && small(a)) {
    if (b.p > 0n) return num(a.p ** b.p, a.q ** b.p);
    return num(a.q ** -b.p, a.p ** -b.p);
  }
  return { kind: "pow", a, b };
}

/** Whether powers up to 64 stay within some thousand digits; larger ones are not folded. */
function small(a: Num): boolean {
  return a.p > -LARGE && a.p < LARGE && a.q < LARGE;
}

/** fn(a); exact at the neutral argument (exp 0 = 1, log 1 = 0, ...). */
export function call(fn: FunctionName, a: Expr): Expr {
  if (isNum(a, 0) && fn !== "log") return num(fn === "exp" ? 1 : 0);
  if (isNum(a, 1) && fn === "log") return num(0);
  if (isNum(a, 1) && fn === "sqrt") return num(1);
  return { kind: "call", fn, a };
}

/** The direct parts of a node. */
export function parts(e: Expr): readonly Expr[] {
  switch (e.kind) {
    case "num":
    case "sym":
      return [];
    case "neg":
    case "call":
      return [e.a];
    default:
      return [e.a, e.b];
  }
}

/** The node of the same kind over new parts, rebuilt through the folding builders. */
export function rebuild(e: Expr, f: (part: Expr) => Expr): Expr {
  switch (e.kind) {
    case "num":
    case "sym":
      return e;
    case "neg":
      return neg(f(e.a));
    case "call":
      return call(e.fn, f(e.a));
    case "add":
      return add(f(e.a), f(e.b));
    case "sub":
      return sub(f(e.a), f(e.b));
    case "mul":
      return mul(f(e.a), f(e.b));
    case "div":
      return div(f(e.a), f(e.b));
    case "pow":
      return pow(f(e.a), f(e.b));
  }
}

/** Replaces names by expressions, all at once. */
export function substitute(e: Expr, values: Readonly<Record<string, Expr>>): Expr {
  const seen = new Map<Expr, Expr>();
  const walk = (x: Expr): Expr => {
    const known = seen.get(x);
    if (known) return known;
    const out = x.kind === "sym"
      ? (Object.hasOwn(values, x.name) ? values[x.name]! : x)
      : rebuild(x, walk);
    seen.set(x, out);
    return out;
  };
  return walk(e);
}

/** The names in an expression, sorted. */
export function names(e: Expr): string[] {
  const found = new Set<string>(), seen = new Set<Expr>();
  const walk = (x: Expr): void => {
    if (seen.has(x)) return;
    seen.add(x);
    if (x.kind === "sym") found.add(x.name);
    parts(x).forEach(walk);
  };
  walk(e);
  return [...found].sort();
}
