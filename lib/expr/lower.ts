/**
 * Lowers a system of equations written as text to a series program: shared subexpressions once, exact
 * constants folded, so a counterterm that vanishes identically leaves no trace in the program.
 *
 * @module
 */
import { parse } from "./parse.ts";
import type { Operation, Program } from "./program.ts";
import type { Expr } from "./tree.ts";

/** A system of equations as text; later lines may use the names of earlier ones. */
export interface SystemText {
  /** Name of the independent variable. */
  readonly independent: string;
  /** Names of the unknowns. */
  readonly unknowns: readonly string[];
  /** Names of runtime parameters. */
  readonly parameters: readonly string[];
  /** Auxiliary quantities, in order. */
  readonly let: readonly (readonly [name: string, text: string])[];
  /** Right-hand side of each unknown's equation. */
  readonly derivative: Readonly<Record<string, string>>;
  /** Names followed as series at every step. */
  readonly series: readonly string[];
  /** Names evaluated on demand. */
  readonly outputs: readonly string[];
}

type Rational = { p: bigint; q: bigint };

/**
 * Lowers `system`, with names in `bindings` standing for expressions.
 *
 * @param system The equations.
 * @param bindings Expressions (model functions and their derivatives) that names in the text stand for;
 * they may use unknowns, parameters and earlier lines.
 * @returns The program.
 * @throws {ReferenceError} if a name stands for nothing.
 * @example One unknown
 * ```ts
 * import { lower } from "@backstamp/backstamp";
 * const program = lower({
 *   independent: "t", unknowns: ["x"], parameters: [], let: [], derivative: { x: "-x" }, series: [], outputs: [],
 * }, {});
 * if (program.operations.length !== 3) throw new Error("expected t, x and -x");
 * ```
 */
export function lower(system: SystemText, bindings: Readonly<Record<string, Expr>>): Program {
  const operations: Operation[] = [], varies: boolean[] = [];
  const index = new Map<string, number>();
  const named = new Map<string, number>(), trees = new Map<Expr, number>();

  const put = (o: Operation, v: boolean): number => {
    const key = JSON.stringify(o), known = index.get(key);
    if (known !== undefined) return known;
    operations.push(o);
    varies.push(v);
    index.set(key, operations.length - 1);
    return operations.length - 1;
  };
  const constant = (p: bigint, q: bigint) =>
    put({ op: "constant", p: String(p), q: String(q) }, false);
  const exact = (i: number): Rational | undefined => {
    const o = operations[i]!;
    return o.op === "constant" ? { p: BigInt(o.p), q: BigInt(o.q) } : undefined;
  };
  const is = (i: number, n: bigint) => {
    const r = exact(i);
    return r !== undefined && r.q === 1n && r.p === n;
  };
  const reduced = (p: bigint, q: bigint) => {
    if (q < 0n) [p, q] = [-p, -q];
    let [x, y] = [p < 0n ? -p : p, q];
    while (y !== 0n) [x, y] = [y, x % y];
    return constant(p / (x || 1n), q / (x || 1n));
  };
  const negate = (a: number): number => {
    const r = exact(a), o = operations[a]!;
    if (r) return reduced(-r.p, r.q);
    return o.op === "neg" ? o.a : put({ op: "neg", a }, varies[a]!);
  };
  const binary = (op: "add" | "sub" | "mul" | "div", a: number, b: number): number => {
    const x = exact(a), y = exact(b);
    if (op === "add" || op === "sub") {
      const sign = op === "add" ? 1n : -1n;
      if (x && y) return reduced(x.p * y.q + sign * y.p * x.q, x.q * y.q);
      if (is(b, 0n)) return a;
      if (is(a, 0n)) return op === "add" ? b : negate(b);
      if (op === "sub" && a === b) return constant(0n, 1n);
    } else if (op === "mul") {
      if (x && y) return reduced(x.p * y.p, x.q * y.q);
      if (is(a, 0n) || is(b, 0n)) return constant(0n, 1n);
      if (is(a, 1n)) return b;
      if (is(b, 1n)) return a;
      if (is(a, -1n)) return negate(b);
      if (is(b, -1n)) return negate(a);
      if (a === b) return put({ op: "sqr", a }, varies[a]!);
    } else {
      if (is(b, 0n)) {
        throw new RangeError(
          "Cannot lower a quotient as its divisor must not vanish identically: current value is 0",
        );
      }
      if (x && y) return reduced(x.p * y.q, x.q * y.p);
      if (is(a, 0n) || is(b, 1n)) return a;
    }
    if ((op === "add" || op === "mul") && a > b) [a, b] = [b, a];
    return put({ op, a, b }, varies[a]! || varies[b]!);
  };
  const integerPower = (a: number, n: bigint): number => {
    if (n === 1n) return a;
    const half = integerPower(a, n / 2n), square = binary("mul", half, half);
    return n % 2n ? binary("mul", square, a) : square;
  };
  const power = (a: number, b: number): number => {
    const r = exact(b);
    if (!r) return unary("exp", binary("mul", b, unary("log", a)));
    if (r.p === 0n) return constant(1n, 1n);
    if (r.p < 0n) return binary("div", constant(1n, 1n), power(a, reduced(-r.p, r.q)));
    if (r.q === 1n && r.p <= 16n) return integerPower(a, r.p);
    if (r.q === 2n && r.p === 1n) return unary("sqrt", a);
    return put({ op: "power", a, p: String(r.p), q: String(r.q) }, varies[a]!);
  };
  const unary = (
    fn: "exp" | "log" | "sqrt" | "expm1" | "log1p" | "sqrt1pm1",
    a: number,
  ): number => {
    if (is(a, 0n) && fn !== "log") return constant(fn === "exp" ? 1n : 0n, 1n);
    return put({ op: fn, a }, varies[a]!);
  };
  const name = (n: string): number => {
    const known = named.get(n);
    if (known !== undefined) return known;
    if (Object.hasOwn(bindings, n)) return build(bindings[n]!);
    throw new ReferenceError(
      `Cannot lower the system as every name must stand for something: current name is ${n}`,
    );
  };
  const build = (e: Expr): number => {
    const known = trees.get(e);
    if (known !== undefined) return known;
    const out = (() => {
      switch (e.kind) {
        case "num":
          return constant(e.p, e.q);
        case "sym":
          return name(e.name);
        case "neg":
          return negate(build(e.a));
        case "call":
          return unary(e.fn, build(e.a));
        case "pow":
          return power(build(e.a), build(e.b));
        default:
          return binary(e.kind, build(e.a), build(e.b));
      }
    })();
    trees.set(e, out);
    return out;
  };

  named.set(system.independent, put({ op: "independent" }, true));
  system.unknowns.forEach((n, i) => named.set(n, put({ op: "unknown", index: i }, true)));
  for (const p of system.parameters) named.set(p, put({ op: "parameter", name: p }, false));
  for (const [n, text] of system.let) named.set(n, build(parse(text)));
  const derivatives = system.unknowns.map((n) => build(parse(system.derivative[n]!)));
  const table = (list: readonly string[]) => Object.fromEntries(list.map((n) => [n, name(n)]));
  return {
    independent: system.independent,
    unknowns: system.unknowns,
    parameters: system.parameters,
    operations,
    varies,
    derivatives,
    series: table(system.series),
    outputs: table(system.outputs),
  };
}
