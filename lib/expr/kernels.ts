/**
 * Exponential, logarithmic and radical kernels of the rational normal form: exp of a sum becomes a
 * product, logarithms and radicals of products split where the factors are positive, powers of a
 * radical reduce.
 *
 * @module
 */
import * as poly from "./polynomial.ts";
import { type Polynomial, UNIT } from "./polynomial.ts";
import { type Factor, NONE, type Quotient, Quotients } from "./quotient.ts";
import { type Expr, type Num, num } from "./tree.ts";

/** Brings expressions (exp, log and sqrt only) to quotients that share their kernels. */
export class Kernels extends Quotients {
  readonly #seen = new Map<Expr, Quotient>();
  readonly positive: (name: string) => boolean;

  /** `positive` tells the names that take positive values only. */
  constructor(budget: number, positive: (name: string) => boolean) {
    super(budget);
    this.positive = positive;
  }

  form(e: Expr): Quotient {
    const known = this.#seen.get(e);
    if (known) return known;
    const out = this.node(e);
    this.#seen.set(e, out);
    return out;
  }

  node(e: Expr): Quotient {
    switch (e.kind) {
      case "num":
        return this.number(e);
      case "sym":
        return this.generator(`n ${e.name}`, {
          kind: "name",
          name: e.name,
          positive: this.positive(e.name),
        });
      case "neg":
        return this.product(this.number(num(-1)), this.form(e.a));
      case "add":
        return this.sum(this.form(e.a), this.form(e.b), num(1));
      case "sub":
        return this.sum(this.form(e.a), this.form(e.b), num(-1));
      case "mul":
        return this.product(this.form(e.a), this.form(e.b));
      case "div":
        return this.product(this.form(e.a), this.reciprocal(e.b));
      case "pow": {
        if (e.b.kind === "num") return this.power(this.form(e.a), e.b);
        return this.exp(this.product(this.form(e.b), this.log(this.form(e.a))));
      }
      case "call":
        if (e.fn === "exp") return this.exp(this.form(e.a));
        if (e.fn === "log") return this.log(this.form(e.a));
        return this.power(this.form(e.a), num(1, 2));
    }
  }

  /** 1/e, factors kept apart. */
  reciprocal(e: Expr): Quotient {
    if (e.kind === "neg") return this.product(this.number(num(-1)), this.reciprocal(e.a));
    if (e.kind === "mul") return this.product(this.reciprocal(e.a), this.reciprocal(e.b));
    if (e.kind === "div") return this.product(this.form(e.b), this.reciprocal(e.a));
    if (e.kind === "pow" && e.b.kind === "num" && e.b.q === 1n && e.b.p > 0n) {
      return this.integer(this.reciprocal(e.a), Number(e.b.p));
    }
    return this.inverse(this.form(e));
  }

  power(a: Quotient, r: Num): Quotient {
    if (r.q === 1n) return this.integer(a, Number(r.p));
    if (a.n.size === 0) return a;
    const exponent = units(r);
    if (exponent === undefined) return this.exp(this.product(this.number(r), this.log(a)));
    const { unit, base, d } = this.split(a);
    let out = this.number(num(1));
    const [t] = unit.values();
    for (let i = 0; i < t!.m.length; i += 2) {
      const e = t!.m[i + 1]! * (exponent / UNIT);
      if (!Number.isInteger(e)) throw new poly.BudgetSpent("an exponent is too fine");
      out = this.product(out, this.reduced(poly.single([t!.m[i]!, e]), NONE));
    }
    for (
      const [p, k] of [
        ...primes(t!.c.p).map(([p, k]) => [p, k] as const),
        ...primes(t!.c.q).map(([p, k]) => [p, -k] as const),
      ]
    ) {
      const g = this.generator(`p ${p}`, { kind: "prime", value: p }, k * exponent);
      out = this.product(out, this.reduced(g.n, NONE));
    }
    const rest: Quotient = {
      n: base,
      d: new Map([...d].filter(([, f]) => !this.manifest(f.base))),
    };
    for (const f of d.values()) {
      if (!this.manifest(f.base)) continue;
      const of = { n: f.base, d: NONE };
      const g = this.generator(`r ${this.key(of)}`, { kind: "root", of }, -exponent * f.power);
      out = this.product(out, this.reduced(g.n, NONE));
    }
    const one = rest.n.size === 1 && rest.d.size === 0 && [...rest.n.values()][0]!;
    if (one && one.m.length === 0 && one.c.p === 1n) return out;
    const g = this.generator(`r ${this.key(rest)}`, { kind: "root", of: rest }, exponent);
    return this.product(out, this.reduced(g.n, NONE));
  }

  /** a = unit * base / d, where unit is a positive monomial and base and d hold what may be negative. */
  split(a: Quotient): { unit: Polynomial; base: Polynomial; d: ReadonlyMap<string, Factor> } {
    const { unit, base } = this.primitive(a.n);
    const [t] = unit.values();
    const safe: number[] = [], unsafe: number[] = [];
    for (let i = 0; i < t!.m.length; i += 2) {
      const g = this.generators[t!.m[i]!]!;
      const positive = g.kind === "exp" || g.kind === "prime" || g.kind === "root" ||
        (g.kind === "name" && g.positive);
      (positive ? safe : unsafe).push(t!.m[i]!, t!.m[i + 1]!);
    }
    return {
      unit: poly.single(safe, t!.c),
      base: poly.product(base, poly.single(unsafe), this.budget),
      d: a.d,
    };
  }

  exp(a: Quotient): Quotient {
    let out = this.number(num(1));
    if (a.d.size > 0) {
      const c = poly.content(a.n);
      const unit = { n: poly.product(a.n, poly.single([], num(c.q, c.p)), this.budget), d: a.d };
      return this.kernel(unit, c);
    }
    for (const { m, c } of a.n.values()) {
      const g = m.length === 2 && m[1] === UNIT ? this.generators[m[0]!]! : undefined;
      out = this.product(
        out,
        g?.kind === "log" && units(c) !== undefined
          ? this.power(g.of, c)
          : this.kernel({ n: poly.single(m), d: NONE }, c),
      );
    }
    return out;
  }

  kernel(of: Quotient, c: Num): Quotient {
    const e = units(c);
    if (e !== undefined) {
      return this.generator(`e ${this.key(of)}`, { kind: "exp", of }, e);
    }
    const all = this.product(of, this.number(c));
    return this.generator(`e ${this.key(all)}`, { kind: "exp", of: all });
  }

  log(a: Quotient): Quotient {
    if (a.n.size === 0) throw new RangeError("the logarithm of 0");
    const { unit, base, d } = this.split(a);
    let out = this.number(num(0));
    const [t] = unit.values();
    const term = (q: Quotient, k: Num) => {
      out = this.sum(out, this.product(this.number(k), q), num(1));
    };
    const opaque = (of: Quotient) => this.generator(`l ${this.key(of)}`, { kind: "log", of });
    for (let i = 0; i < t!.m.length; i += 2) {
      const g = this.generators[t!.m[i]!]!, k = num(t!.m[i + 1]!, UNIT);
      if (g.kind === "exp") term(g.of, k);
      else if (g.kind === "root") term(this.log(g.of), k);
      else term(opaque({ n: poly.single([t!.m[i]!, UNIT]), d: NONE }), k);
    }
    for (const [p, k] of primes(t!.c.p)) term(opaque(this.number(num(p))), num(k));
    for (const [p, k] of primes(t!.c.q)) term(opaque(this.number(num(p))), num(-k));
    const rest: Quotient = {
      n: base,
      d: new Map([...d].filter(([, f]) => !this.manifest(f.base))),
    };
    for (const f of d.values()) {
      if (this.manifest(f.base)) term(opaque({ n: f.base, d: NONE }), num(-f.power));
    }
    const one = rest.n.size === 1 && rest.d.size === 0 && [...rest.n.values()][0]!;
    if (!(one && one.m.length === 0 && one.c.p === 1n)) term(opaque(rest), num(1));
    return out;
  }
}

/** A rational in units of exponents; undefined if it is no whole number of them or not exact as a double. */
function units(r: Num): number | undefined {
  const whole = r.p * BigInt(UNIT);
  if (whole % r.q !== 0n) return undefined;
  const out = Number(whole / r.q);
  return Number.isSafeInteger(out) ? out : undefined;
}

/** Prime factors up to 1000; what is left stands as one factor. */
function primes(n: bigint): [bigint, number][] {
  const out: [bigint, number][] = [];
  if (n < 0n) n = -n;
  for (let p = 2n; p < 1000n && n > 1n; p++) {
    let k = 0;
    for (; n % p === 0n; n /= p) k++;
    if (k) out.push([p, k]);
  }
  if (n > 1n) out.push([n, 1]);
  return out;
}
