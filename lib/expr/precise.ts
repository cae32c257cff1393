/**
 * High-precision values and a second differentiator, both from mathjs; no other file imports mathjs.
 * Trees are walked here: mathjs never reads a user's text, and every name is replaced by a neutral one
 * before it sees a tree (mathjs predefines phi, tau, e, i and unit names).
 *
 * Beside each value stands its `scale`: the first-order bound of the absolute error per unit of
 * relative rounding (terms of a sum, factors of a product, propagated through functions). A value that
 * is zero up to rounding has |value| of about 10^-digits * scale, whatever form hides the cancellation.
 *
 * @module
 */
import type { BigNumber, MathNode } from "mathjs";
import { elementary } from "./elementary.ts";
import { print } from "./print.ts";
import { shared } from "./shared.ts";
import { PI } from "./points.ts";
import {
  add,
  call,
  div,
  type Expr,
  type FunctionName,
  mul,
  names,
  neg,
  num,
  pow,
  sub,
  substitute,
  sym,
} from "./tree.ts";

export type { BigNumber };

/** A value and the scale its rounding error is proportional to. */
export interface Evaluated {
  readonly value: BigNumber;
  readonly scale: BigNumber;
}

/** Values of names: decimal texts, or doubles read by their shortest decimal text. */
export type Values = Readonly<Record<string, string | number | BigNumber>>;

/** An evaluator of fixed working precision. */
export interface Precise {
  /** Working precision, decimal digits. */
  readonly digits: number;
  /** The big number of a decimal text. */
  big(x: string | number | bigint | BigNumber): BigNumber;
  /** The value of a tree; not a number where it leaves the real domain. */
  evaluate(e: Expr, values: Values): BigNumber;
  /** The value and its scale. */
  evaluateScaled(e: Expr, values: Values): Evaluated;
}

// deno-lint-ignore no-explicit-any
type Mathjs = any;
let library: Promise<Mathjs> | undefined;
const made = new Map<number, Promise<Precise>>();

function mathjs(): Promise<Mathjs> {
  library ??= import("mathjs").then((m) =>
    m.create(
      {
        BigNumberDependencies: m.BigNumberDependencies,
        parseDependencies: m.parseDependencies,
        derivativeDependencies: m.derivativeDependencies,
      } as unknown as Parameters<typeof m.create>[0],
      { number: "BigNumber", precision: 64 },
    )
  );
  return library;
}

/**
 * An evaluator of `digits` decimal digits; mathjs is loaded at the first call.
 *
 * @param digits Working precision, decimal digits, 20 to 1000.
 * @throws {RangeError} if digits is out of range.
 * @example Sixty digits of exp(1)
 * ```ts
 * import { parse } from "./parse.ts";
 * import { precise } from "./precise.ts";
 * const { evaluate } = await precise(60);
 * const e = evaluate(parse("exp(x)"), { x: 1 });
 * if (!e.toString().startsWith("2.71828182845904523536028747135")) throw new Error("not e");
 * ```
 */
export function precise(digits = 64): Promise<Precise> {
  if (!(Number.isInteger(digits) && digits >= 20 && digits <= 1000)) {
    throw new RangeError(
      `Cannot set up precise evaluation as digits must be an integer from 20 to 1000: current value is ${digits}`,
    );
  }
  const known = made.get(digits) ?? mathjs().then((m) => evaluator(m, digits));
  made.set(digits, known);
  return known;
}

function evaluator(m: Mathjs, digits: number): Precise {
  const Big = m.BigNumber.clone({ precision: digits });
  const Fine = m.BigNumber.clone({ precision: 2 * digits + 10 });
  const big = (x: string | number | bigint | BigNumber): BigNumber =>
    new Big(typeof x === "bigint" ? x.toString() : x);
  const zero = big(0), one = big(1), pi: BigNumber = Big.acos(-1);
  const small = big(`1e-${Math.ceil(digits / 2)}`);
  const max = (a: BigNumber, b: BigNumber) => a.gt(b) ? a : b;

  const apply = (fn: FunctionName, x: BigNumber): BigNumber => {
    switch (fn) {
      case "exp":
        return x.exp();
      case "log":
        return x.isZero() ? big(NaN) : x.ln();
      case "sqrt":
        return x.sqrt();
      case "expm1": // series where the difference would lose digits, doubled precision elsewhere
        if (x.abs().lt(small)) return x.times(one.plus(x.div(2)).plus(x.times(x).div(6)));
        return big(new Fine(x).exp().minus(1));
      case "log1p":
        if (x.abs().lt(small)) return x.times(one.minus(x.div(2)).plus(x.times(x).div(3)));
        return x.lte(-1) ? big(NaN) : big(new Fine(x).plus(1).ln());
      case "sqrt1pm1":
        return x.div(one.plus(x).sqrt().plus(1));
    }
  };
  /** Derivative of fn at x where its value is y, magnitude only. */
  const slope = (fn: FunctionName, x: BigNumber, y: BigNumber): BigNumber => {
    switch (fn) {
      case "exp":
        return y;
      case "log":
        return one.div(x).abs();
      case "sqrt":
        return y.isZero() ? zero : one.div(y.times(2));
      case "expm1":
        return y.plus(1);
      case "log1p":
        return one.div(one.plus(x)).abs();
      case "sqrt1pm1":
        return one.div(y.plus(1).times(2));
    }
  };
  const power = (a: BigNumber, b: BigNumber): BigNumber =>
    a.isZero() && b.isNeg() ? big(NaN) : a.pow(b);

  const evaluateScaled = (e: Expr, values: Values): Evaluated => {
    const seen = new Map<Expr, Evaluated>();
    const known = new Map<string, BigNumber>();
    const walk = (x: Expr): Evaluated => {
      const before = seen.get(x);
      if (before) return before;
      const out = node(x);
      seen.set(x, out);
      return out;
    };
    const node = (x: Expr): Evaluated => {
      switch (x.kind) {
        case "num": {
          const value = big(x.p).div(big(x.q));
          return { value, scale: value.abs() };
        }
        case "sym": {
          if (!Object.hasOwn(values, x.name)) {
            if (x.name === PI) return { value: pi, scale: pi };
            throw new ReferenceError(
              `Cannot evaluate the expression as every name needs a value: current name is ${x.name}`,
            );
          }
          const value = known.get(x.name) ?? big(values[x.name]!);
          known.set(x.name, value);
          return { value, scale: value.abs() };
        }
        case "neg": {
          const a = walk(x.a);
          return { value: a.value.neg(), scale: a.scale };
        }
        case "call": {
          const a = walk(x.a), value = apply(x.fn, a.value);
          return {
            value,
            scale: max(value.abs(), slope(x.fn, a.value, value).times(a.scale)),
          };
        }
      }
      const a = walk(x.a), b = walk(x.b);
      switch (x.kind) {
        case "add":
          return { value: a.value.plus(b.value), scale: max(a.scale, b.scale) };
        case "sub":
          return { value: a.value.minus(b.value), scale: max(a.scale, b.scale) };
        case "mul":
          return {
            value: a.value.times(b.value),
            scale: max(a.scale.times(b.value.abs()), b.scale.times(a.value.abs())),
          };
        case "div": {
          const value = b.value.isZero() ? big(NaN) : a.value.div(b.value);
          return {
            value,
            scale: max(a.scale, value.abs().times(b.scale)).div(b.value.abs()),
          };
        }
        case "pow": {
          const value = power(a.value, b.value);
          const da = a.value.isZero()
            ? zero
            : value.times(b.value).div(a.value).abs().times(a.scale);
          const exact = x.b.kind === "num" || !a.value.gt(0);
          const db = exact ? zero : value.times(a.value.ln()).abs().times(b.scale);
          return { value, scale: max(value.abs(), max(da, db)) };
        }
      }
    };
    return walk(shared(e));
  };
  return {
    digits,
    big,
    evaluateScaled,
    evaluate: (e, values) => evaluateScaled(e, values).value,
  };
}

/** A tree with neutral names and elementary functions, and the way back. */
export function neutral(
  e: Expr,
): { tree: Expr; to: (name: string) => string; back(t: Expr): Expr } {
  const list = names(e);
  const there: Record<string, Expr> = {}, here: Record<string, Expr> = {};
  list.forEach((n, i) => {
    there[n] = sym(`v${i}`);
    here[`v${i}`] = sym(n);
  });
  return {
    tree: elementary(substitute(e, there)),
    to: (name) => `v${list.indexOf(name)}`,
    back: (t) => substitute(t, here),
  };
}

/**
 * The derivative of `e` by mathjs, unsimplified but with exact constants folded. The second
 * differentiator beside the algebra system's.
 *
 * @param e An expression.
 * @param name The variable.
 */
export async function mathjsDerivative(e: Expr, name: string): Promise<Expr> {
  if (!names(e).includes(name)) return num(0);
  const m = await mathjs();
  const { tree, to, back } = neutral(e);
  const node = m.derivative(m.parse(print(tree)), to(name), { simplify: false });
  return back(fromNode(node));
}

function fromNode(n: MathNode): Expr {
  // deno-lint-ignore no-explicit-any
  const x = n as any;
  switch (x.type) {
    case "ParenthesisNode":
      return fromNode(x.content);
    case "ConstantNode": {
      const text: string = x.value.toFixed ? x.value.toFixed() : String(x.value);
      const [whole, fraction = ""] = text.split(".") as [string, string?];
      return num(BigInt(whole + fraction), 10n ** BigInt(fraction.length));
    }
    case "SymbolNode":
      return sym(x.name);
    case "FunctionNode": {
      const fn: string = x.fn.name ?? x.fn;
      if (x.args.length === 1 && (fn === "exp" || fn === "log" || fn === "sqrt")) {
        return call(fn, fromNode(x.args[0]));
      }
      break;
    }
    case "OperatorNode": {
      const [a, b] = x.args.map(fromNode) as [Expr, Expr];
      if (x.fn === "unaryMinus") return neg(a);
      if (x.fn === "unaryPlus") return a;
      const make = { add, subtract: sub, multiply: mul, divide: div, pow }[x.fn as string];
      if (make && x.args.length === 2) return make(a, b);
      if (x.fn === "multiply") return x.args.map(fromNode).reduce(mul);
      if (x.fn === "add") return x.args.map(fromNode).reduce(add);
    }
  }
  throw new TypeError(`Cannot read mathjs's derivative as its nodes must be known: ${x.type}`);
}
