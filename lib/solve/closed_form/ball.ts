/**
 * Ball arithmetic in double precision: a value with an absolute error bound, by running error analysis
 * (first-order terms and their products are kept; U = 2^-53 is the unit round-off of IEEE 754 doubles).
 *
 * @module
 */

/** A double `v` and a bound `e` on its distance from the exact number. */
export interface Ball {
  /** Computed value. */
  readonly v: number;
  /** Absolute error bound. */
  readonly e: number;
}

/** Unit round-off of doubles. */
export const U = 1.1102230246251565e-16;
/** Smallest positive double: error of a result that underflows. */
export const TINY = 5e-324;
/** Covers the rounding of the bound itself: a bound takes less than 16 roundings. */
const UP = 1 + 16 * U;
// exp, log, expm1, log1p of the runtime err by less than one unit in the last place, 2 U relative
const ELEMENTARY = 2 * U;
const SPLIT = 134217729; // 2^27 + 1, Veltkamp's splitting

/** The exact number x. */
export function exact(x: number): Ball {
  return { v: x, e: 0 };
}

/** The number x rounded once from an exact one. */
export function rounded(x: number): Ball {
  return { v: x, e: Math.abs(x) * U };
}

/** Bound on the rounding error of the product v of x and y; zero if it is exact (Dekker 1971). */
function productError(x: number, y: number, v: number): number {
  const size = Math.abs(v);
  if (!(size > 1e-250 && size < 1e290 && Math.abs(x) < 1e290 && Math.abs(y) < 1e290)) {
    return x === 0 || y === 0 ? 0 : size * U + TINY;
  }
  const cx = SPLIT * x;
  const x1 = cx - (cx - x);
  const x2 = x - x1;
  const cy = SPLIT * y;
  const y1 = cy - (cy - y);
  const y2 = y - y1;
  return Math.abs(x2 * y2 - (((v - x1 * y1) - x2 * y1) - x1 * y2));
}

/** a + b; an exact sum of exact numbers stays exact (Knuth's two-sum). */
export function add(a: Ball, b: Ball): Ball {
  const v = a.v + b.v;
  const t = v - a.v;
  const lost = Math.abs((a.v - (v - t)) + (b.v - t));
  return { v, e: (a.e + b.e + lost) * UP };
}

/** -a. */
export function neg(a: Ball): Ball {
  return { v: -a.v, e: a.e };
}

/** a - b. */
export function sub(a: Ball, b: Ball): Ball {
  return add(a, neg(b));
}

/** a b. */
export function mul(a: Ball, b: Ball): Ball {
  const v = a.v * b.v;
  const inherited = Math.abs(a.v) * b.e + Math.abs(b.v) * a.e + a.e * b.e;
  return { v, e: (inherited + productError(a.v, b.v, v)) * UP };
}

/** a times a power of two (exact but for underflow). */
export function scale(a: Ball, power: number): Ball {
  return { v: a.v * power, e: a.e * Math.abs(power) };
}

/** a/b; the bound is infinite if b may vanish. */
export function div(a: Ball, b: Ball): Ball {
  const v = a.v / b.v;
  const least = Math.abs(b.v) - b.e;
  if (!(least > 0)) return { v, e: Infinity };
  const whole = v * b.v === a.v && productError(v, b.v, a.v) === 0;
  const lost = whole ? 0 : Math.abs(v) * U + TINY;
  return { v, e: ((a.e + Math.abs(v) * b.e) / least + lost) * UP };
}

/** ln a; the bound is infinite if a may be nonpositive. */
export function log(a: Ball): Ball {
  const v = Math.log(a.v);
  const least = a.v - a.e;
  if (!(least > 0)) return { v, e: Infinity };
  return { v, e: (a.e / least + Math.abs(v) * ELEMENTARY) * UP };
}

/** ln(1 + a); the bound is infinite if 1 + a may be nonpositive. */
export function log1p(a: Ball): Ball {
  const v = Math.log1p(a.v);
  const least = 1 + a.v - a.e;
  if (!(least > 0)) return { v, e: Infinity };
  return { v, e: (a.e / least + Math.abs(v) * ELEMENTARY) * UP };
}

/** e^a. */
export function exp(a: Ball): Ball {
  const v = Math.exp(a.v);
  if (v === 0) return { v, e: Math.exp(a.v + a.e) + TINY };
  return { v, e: (v * Math.expm1(a.e) + (a.v === 0 ? 0 : v * ELEMENTARY + TINY)) * UP };
}

/** e^a - 1. */
export function expm1(a: Ball): Ball {
  const v = Math.expm1(a.v);
  return { v, e: ((v + 1) * Math.expm1(a.e) + Math.abs(v) * ELEMENTARY) * UP };
}

/** Whether zero lies in the ball. */
export function mayVanish(a: Ball): boolean {
  return !(Math.abs(a.v) > a.e);
}
