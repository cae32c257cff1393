/**
 * Exact division of polynomials in several generators, by leading terms in lexicographic order.
 *
 * @module
 */
import {
  type Budget,
  BudgetSpent,
  common,
  join,
  type Monomial,
  plus,
  type Polynomial,
  raise,
  type Term,
  times,
} from "./polynomial.ts";
import { num } from "./tree.ts";

/** Lexicographic order of monomials with exponents of at least 0. */
function order(a: Monomial, b: Monomial): number {
  for (let i = 0; i < a.length && i < b.length; i += 2) {
    if (a[i] !== b[i]) return a[i]! < b[i]! ? 1 : -1;
    if (a[i + 1] !== b[i + 1]) return a[i + 1]! - b[i + 1]!;
  }
  return a.length - b.length;
}

/** The terms over the lowest exponents, so that no exponent is negative, highest first. */
function sorted(a: Polynomial): { low: Monomial; terms: Term[] } {
  const low = common(a), shift = raise(low, -1);
  const terms = [...a.values()].map(({ m, c }) => ({ m: join(m, shift), c }));
  return { low, terms: terms.sort((x, y) => order(y.m, x.m)) };
}

const whole = (m: Monomial) => m.every((e, i) => i % 2 === 0 || e >= 0);

/**
 * The quotient a / b if b divides a.
 *
 * @param a Any polynomial but 0.
 * @param b A polynomial of two terms or more.
 * @param budget Counted; every product of two terms is one operation.
 * @returns The quotient, or undefined if b does not divide a.
 */
export function divided(a: Polynomial, b: Polynomial, budget: Budget): Polynomial | undefined {
  if (b.size > a.size * 64) return undefined;
  const over = sorted(b), under = sorted(a);
  const [lead, ...rest] = over.terms as [Term, ...Term[]];
  const back = raise(lead.m, -1), inverse = num(lead.c.q, lead.c.p);
  const last = under.terms.at(-1)!, lowest = over.terms.at(-1)!;
  if (!whole(join(last.m, raise(lowest.m, -1)))) return undefined;
  const left = under.terms, out = new Map<string, Term>();
  const unshift = join(under.low, raise(over.low, -1));
  for (let i = 0; i < left.length; i++) {
    const { m, c } = left[i]!;
    if (c.p === 0n) continue;
    const q = join(m, back);
    if (!whole(q)) return undefined;
    const k = times(c, inverse), real = join(q, unshift);
    out.set(real.join(), { m: real, c: k });
    if ((budget.left -= rest.length) < 0) {
      throw new BudgetSpent("the budget of term operations is spent");
    }
    for (const t of rest) subtract(left, i + 1, join(q, t.m), times(k, t.c));
  }
  return out;
}

/** Takes c times the monomial m off a list in falling order, from place `from` on. */
function subtract(list: Term[], from: number, m: Monomial, c: Term["c"]): void {
  let low = from, high = list.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (order(list[middle]!.m, m) > 0) low = middle + 1;
    else high = middle;
  }
  const minus = { kind: "num", p: -c.p, q: c.q } as const;
  const at = list[low];
  if (at && order(at.m, m) === 0) list[low] = { m, c: plus(at.c, minus) };
  else list.splice(low, 0, { m, c: minus });
}
