/**
 * Quotients of polynomials over a growing list of kernels: the arithmetic of the rational normal form.
 * A denominator is kept as its factors, so that sums come over a least common denominator.
 *
 * @module
 */
import { divided } from "./division.ts";
import * as poly from "./polynomial.ts";
import { type Polynomial, UNIT } from "./polynomial.ts";
import { type Num, num } from "./tree.ts";

/** A factor of a denominator. */
export interface Factor {
  readonly base: Polynomial;
  readonly power: number;
}

/** n over the product of the factors d. */
export interface Quotient {
  readonly n: Polynomial;
  readonly d: ReadonlyMap<string, Factor>;
}

/** What a generator of the polynomials stands for. */
export type Generator =
  | { readonly kind: "name"; readonly name: string; readonly positive: boolean }
  | { readonly kind: "prime"; readonly value: bigint }
  | { readonly kind: "exp" | "log" | "root"; readonly of: Quotient };

/** No denominator. */
export const NONE: ReadonlyMap<string, Factor> = new Map();

/** Arithmetic of quotients over shared generators, within one counted budget. */
export class Quotients {
  readonly generators: Generator[] = [];
  readonly budget: poly.Budget;
  readonly #index = new Map<string, number>();

  constructor(budget: number) {
    this.budget = { left: budget };
  }

  number(c: Num): Quotient {
    return { n: poly.single([], c), d: NONE };
  }

  generator(key: string, g: Generator, power: number = UNIT): Quotient {
    let i = this.#index.get(key);
    if (i === undefined) {
      i = this.generators.push(g) - 1;
      this.#index.set(key, i);
    }
    return { n: poly.single([i, power]), d: NONE };
  }

  key(a: Quotient): string {
    const d = [...a.d].map(([k, f]) => `(${k})^${f.power}`).sort().join("*");
    return `${poly.keyOf(a.n)}|${d}`;
  }

  sum(a: Quotient, b: Quotient, k: Num): Quotient {
    if (b.n.size === 0) return a;
    const d = new Map(a.d);
    for (const [key, f] of b.d) {
      if ((d.get(key)?.power ?? 0) < f.power) d.set(key, f);
    }
    const lift = (x: Quotient) => {
      let n = x.n;
      for (const [key, f] of d) {
        const missing = f.power - (x.d.get(key)?.power ?? 0);
        for (let i = 0; i < missing; i++) n = poly.product(n, f.base, this.budget);
      }
      return n;
    };
    const n = poly.sum(lift(a), lift(b), this.budget, k);
    return this.reduced(n, n.size === 0 ? NONE : d);
  }

  product(a: Quotient, b: Quotient): Quotient {
    const d = new Map(a.d);
    for (const [key, f] of b.d) {
      d.set(key, { base: f.base, power: f.power + (d.get(key)?.power ?? 0) });
    }
    return this.reduced(poly.product(a.n, b.n, this.budget), d);
  }

  /** Brings exponents of primes and radicals into [0, 1) and cancels equal factors. */
  reduced(n: Polynomial, d: ReadonlyMap<string, Factor>): Quotient {
    if (n.size === 0) return { n, d: NONE };
    let open = false;
    const bad = (g: number, e: number) =>
      (this.generators[g]!.kind === "prime" || this.generators[g]!.kind === "root") &&
      (e < 0 || e >= UNIT);
    for (const { m } of n.values()) {
      for (let i = 0; i < m.length; i += 2) open ||= bad(m[i]!, m[i + 1]!);
    }
    if (!open) return this.cancelled(n, d);
    let out: Quotient = { n: new Map(), d: NONE };
    for (const { m, c } of n.values()) {
      let rest: Quotient = this.number(c);
      const keep: number[] = [];
      for (let i = 0; i < m.length; i += 2) {
        const g = this.generators[m[i]!]!, whole = Math.floor(m[i + 1]! / UNIT);
        if (!bad(m[i]!, m[i + 1]!)) keep.push(m[i]!, m[i + 1]!);
        else {
          const left = m[i + 1]! - whole * UNIT;
          if (left) keep.push(m[i]!, left);
          const of = g.kind === "prime" ? this.number(num(g.value)) : (g as { of: Quotient }).of;
          rest = this.product(rest, this.integer(of, whole));
        }
      }
      const lead = { n: poly.product(rest.n, poly.single(keep), this.budget), d: rest.d };
      out = this.sum(out, lead, num(1));
    }
    const all = new Map(out.d);
    for (const [key, f] of d) {
      all.set(key, { base: f.base, power: f.power + (all.get(key)?.power ?? 0) });
    }
    return this.cancelled(out.n, all);
  }

  /** Takes factors of the denominator off that divide the numerator. */
  cancelled(n: Polynomial, d: ReadonlyMap<string, Factor>): Quotient {
    const less = new Map(d);
    for (const [key, { base, power }] of d) {
      let left = power;
      for (let q; left > 0 && n.size > 1 && (q = divided(n, base, this.budget)); left--) n = q;
      if (left === 0) less.delete(key);
      else if (left < power) less.set(key, { base, power: left });
    }
    return { n, d: less };
  }

  /** n = unit * base, unit one term with positive coefficient, base without common factor. */
  primitive(n: Polynomial): { unit: Polynomial; base: Polynomial } {
    const c = poly.content(n), m = poly.common(n);
    const inverse = poly.single(poly.raise(m, -1), num(c.q, c.p));
    return { unit: poly.single(m, c), base: poly.product(n, inverse, this.budget) };
  }

  inverse(a: Quotient): Quotient {
    if (a.n.size === 0) throw new RangeError("a divisor vanishes identically");
    let n = poly.single([]);
    for (const f of a.d.values()) {
      for (let i = 0; i < f.power; i++) n = poly.product(n, f.base, this.budget);
    }
    const { unit, base } = this.primitive(a.n);
    const [t] = unit.values();
    const lead = poly.single(poly.raise(t!.m, -1), num(t!.c.q, t!.c.p));
    if (base.size === 1) { // the base of a single term is +1 or -1
      const [b] = base.values();
      return this.reduced(
        poly.product(poly.product(n, lead, this.budget), poly.single([], b!.c), this.budget),
        NONE,
      );
    }
    const d = new Map([[poly.keyOf(base), { base, power: 1 }]]);
    return this.product({ n: poly.product(n, lead, this.budget), d: NONE }, {
      n: poly.single([]),
      d,
    });
  }

  integer(a: Quotient, k: number): Quotient {
    if (k < 0) return this.integer(this.inverse(a), -k);
    let out = this.number(num(1));
    for (let i = 0; i < k; i++) out = this.product(out, a);
    return out;
  }

  /** Whether every term is positive as written. */
  manifest(a: Polynomial): boolean {
    return [...a.values()].every(({ m, c }) =>
      c.p > 0n && m.every((g, i) => {
        const x = this.generators[g];
        return i % 2 === 1 || (x!.kind !== "log" && !(x!.kind === "name" && !x!.positive));
      })
    );
  }
}
