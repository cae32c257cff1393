/**
 * Laurent polynomials with rational coefficients over numbered generators, exponents rational with a
 * denominator that divides {@linkcode UNIT}. The arithmetic below {@linkcode module:normal}.
 *
 * @module
 */
import { type Num, num } from "./tree.ts";

/** Exponents are stored as integers in units of 1/UNIT. */
export const UNIT = 720720; // 2^4 3^2 5 7 11 13: all denominators up to 16

/** Generators and stored exponents, alternating, by rising generator number. */
export type Monomial = readonly number[];

/** One term. */
export interface Term {
  readonly m: Monomial;
  readonly c: Num;
}

/** A polynomial: terms by the text of their monomial; no term has coefficient zero. */
export type Polynomial = ReadonlyMap<string, Term>;

/** Thrown when a counted budget of term operations is spent. */
export class BudgetSpent extends Error {
  override readonly name = "BudgetSpent";
}

/** A counted budget: term operations that may still be done. */
export interface Budget {
  left: number;
}

/** The sum of two exact rationals. */
export function plus(a: Num, b: Num): Num {
  return a.q === 1n && b.q === 1n
    ? { kind: "num", p: a.p + b.p, q: 1n }
    : num(a.p * b.q + b.p * a.q, a.q * b.q);
}

/** The product of two exact rationals. */
export function times(a: Num, b: Num): Num {
  return a.q === 1n && b.q === 1n
    ? { kind: "num", p: a.p * b.p, q: 1n }
    : num(a.p * b.p, a.q * b.q);
}

/** The polynomial of one term. */
export function single(m: Monomial, c: Num = num(1)): Polynomial {
  return c.p === 0n ? new Map() : new Map([[m.join(), { m, c }]]);
}

/** The product of two monomials. */
export function join(a: Monomial, b: Monomial): Monomial {
  if (a.length === 0) return b;
  if (b.length === 0) return a;
  const out: number[] = [];
  let i = 0, j = 0;
  while (i < a.length || j < b.length) {
    const x = a[i] ?? Infinity, y = b[j] ?? Infinity;
    const e = (x <= y ? a[i + 1]! : 0) + (y <= x ? b[j + 1]! : 0);
    if (e !== 0) out.push(Math.min(x, y), e);
    if (x <= y) i += 2;
    if (y <= x) j += 2;
  }
  return out;
}

/** a + k b. */
export function sum(a: Polynomial, b: Polynomial, budget: Budget, k: Num = num(1)): Polynomial {
  const out = new Map(a);
  for (const [key, t] of b) put(out, key, t.m, times(t.c, k), budget);
  return out;
}

/** a b. */
export function product(a: Polynomial, b: Polynomial, budget: Budget): Polynomial {
  const out = new Map<string, Term>();
  for (const x of a.values()) {
    for (const y of b.values()) {
      const m = join(x.m, y.m);
      put(out, m.join(), m, times(x.c, y.c), budget);
    }
  }
  return out;
}

function put(out: Map<string, Term>, key: string, m: Monomial, c: Num, budget: Budget): void {
  if (--budget.left < 0) throw new BudgetSpent("the budget of term operations is spent");
  const old = out.get(key);
  const total = old ? plus(old.c, c) : c;
  if (total.p === 0n) out.delete(key);
  else out.set(key, { m, c: total });
}

/** Positive content: the gcd of numerators over the lcm of denominators. */
export function content(a: Polynomial): Num {
  const gcd = (x: bigint, y: bigint): bigint => {
    while (y !== 0n) [x, y] = [y, x % y];
    return x < 0n ? -x : x;
  };
  let p = 0n, q = 1n;
  for (const { c } of a.values()) {
    p = gcd(p, c.p < 0n ? -c.p : c.p);
    q = q / gcd(q, c.q) * c.q;
  }
  return num(p || 1n, q);
}

/** The monomial of the lowest exponent of every generator that all terms share. */
export function common(a: Polynomial): Monomial {
  let low: Map<number, number> | undefined;
  for (const { m } of a.values()) {
    const here = new Map<number, number>();
    for (let i = 0; i < m.length; i += 2) here.set(m[i]!, m[i + 1]!);
    if (!low) low = here;
    else {
      for (const [g, e] of here) if (e < 0 && !low.has(g)) low.set(g, 0);
      for (const [g, e] of [...low]) low.set(g, Math.min(e, here.get(g) ?? 0));
    }
  }
  return [...low ?? []].filter(([, e]) => e !== 0).sort((x, y) => x[0] - y[0]).flat();
}

/** The monomial to the power k (k times the exponents). */
export function raise(m: Monomial, k: number): Monomial {
  return m.map((x, i) => i % 2 ? x * k : x);
}

/** Text that is the same for equal polynomials. */
export function keyOf(a: Polynomial): string {
  return [...a].map(([k, t]) => `${k}:${t.c.p}/${t.c.q}`).sort().join(";");
}
