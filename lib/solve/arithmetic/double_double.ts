/**
 * Double-double arithmetic (about 32 digits): a number is the unevaluated sum hi + lo.
 *
 * Sums and products: T. J. Dekker, Numer. Math. 18 (1971) 224; D. E. Knuth, TAOCP vol. 2, 4.2.2, theorem B;
 * error bounds: M. Joldes, J.-M. Muller, V. Popescu, ACM TOMS 44 (2017) 15.
 *
 * @module
 */
import type { Arithmetic } from "./arithmetic.ts";

/** hi + lo with |lo| at most half a unit in the last place of hi. */
export interface DoubleDouble {
  /** Leading part: the number rounded to double. */
  readonly hi: number;
  /** What the leading part leaves. */
  readonly lo: number;
}

const SPLITTER = 134217729; // 2^27 + 1, Dekker's splitting constant

function quick(a: number, b: number): DoubleDouble {
  const hi = a + b;
  return Number.isFinite(hi) ? { hi, lo: b - (hi - a) } : { hi, lo: 0 };
}

/** Rounding error of the product p = a b. */
function productError(a: number, b: number, p: number): number {
  const s = SPLITTER * a, t = SPLITTER * b;
  const ah = s - (s - a), bh = t - (t - b), al = a - ah, bl = b - bh;
  return ((ah * bh - p) + ah * bl + al * bh) + al * bl;
}

function add(a: DoubleDouble, b: DoubleDouble): DoubleDouble {
  const s = a.hi + b.hi, z = s - a.hi, e = (a.hi - (s - z)) + (b.hi - z);
  const t = a.lo + b.lo, y = t - a.lo, f = (a.lo - (t - y)) + (b.lo - y);
  const u = quick(s, e + t);
  return quick(u.hi, u.lo + f);
}

function neg(a: DoubleDouble): DoubleDouble {
  return { hi: -a.hi, lo: -a.lo };
}

function sub(a: DoubleDouble, b: DoubleDouble): DoubleDouble {
  return add(a, neg(b));
}

function mul(a: DoubleDouble, b: DoubleDouble): DoubleDouble {
  const p = a.hi * b.hi;
  return quick(p, productError(a.hi, b.hi, p) + (a.hi * b.lo + a.lo * b.hi));
}

function div(a: DoubleDouble, b: DoubleDouble): DoubleDouble {
  const q = a.hi / b.hi, r = sub(a, mul({ hi: q, lo: 0 }, b)), q2 = r.hi / b.hi;
  const r2 = sub(r, mul({ hi: q2, lo: 0 }, b));
  const first = quick(q, q2);
  return quick(first.hi, first.lo + r2.hi / b.hi);
}

function from(x: number): DoubleDouble {
  return { hi: x, lo: 0 };
}

/** 2^k, exactly, for normal results. */
function powerOfTwo(k: number): number {
  let out = 1, base = k < 0 ? 0.5 : 2;
  for (let n = Math.abs(k); n > 0; n = Math.floor(n / 2), base *= base) if (n % 2) out *= base;
  return out;
}

function scale(a: DoubleDouble, k: number): DoubleDouble {
  const h = Math.trunc(k / 2), f = powerOfTwo(h), g = powerOfTwo(k - h);
  return { hi: a.hi * f * g, lo: a.lo * f * g };
}

function ratio(p: bigint, q: bigint): DoubleDouble {
  const hi = Number(p) / Number(q);
  if (hi === 0 || !Number.isFinite(hi)) return { hi, lo: 0 };
  // hi = n 2^-k exactly; the rest p/q - hi is formed in integers
  let k = 0, n = hi;
  while (!Number.isInteger(n)) n *= 2, k++;
  const rest = (p << BigInt(k)) - BigInt(n) * q, bottom = q << BigInt(k);
  return quick(hi, Number((rest << 400n) / bottom) * powerOfTwo(-400));
}

const ONE = from(1);
const LN2: DoubleDouble = { hi: 0.6931471805599453, lo: 2.3190468138462996e-17 }; // ln 2, OEIS A002162
const PI: DoubleDouble = { hi: 3.141592653589793, lo: 1.2246467991473532e-16 }; // pi, OEIS A000796

const INVERSE_FACTORIAL: readonly DoubleDouble[] = (() => {
  const out: DoubleDouble[] = [];
  let f = 1n;
  for (let n = 1n; n <= 20n; n++) out.push(ratio(1n, f *= n));
  return out;
})();

/** exp(x) - 1 for |x| <= 0.35: halved 5 times, series, doubled back by expm1(2y) = p (2 + p). */
function expm1Small(x: DoubleDouble): DoubleDouble {
  const y = scale(x, -5);
  let p = INVERSE_FACTORIAL[15]!; // |y| < 0.011: the next term is below 2^-150
  for (let n = 14; n >= 0; n--) p = add(mul(p, y), INVERSE_FACTORIAL[n]!);
  p = mul(p, y);
  for (let i = 0; i < 5; i++) p = mul(p, add(from(2), p));
  return p;
}

function exp(x: DoubleDouble): DoubleDouble {
  if (x.hi > 709.7) return from(Math.exp(x.hi));
  if (x.hi < -745.2) return from(0);
  const k = Math.round(x.hi / LN2.hi);
  const y = sub(x, mul(from(k), LN2));
  return scale(add(ONE, expm1Small(y)), k);
}

function expm1(x: DoubleDouble): DoubleDouble {
  return Math.abs(x.hi) < 0.35 ? expm1Small(x) : sub(exp(x), ONE);
}

/** y0 + log(1 + d) for tiny d, to third order (d^4 < 2^-200). */
function corrected(y0: number, d: DoubleDouble): DoubleDouble {
  const d2 = d.hi * d.hi;
  return add(from(y0), add(d, from(-d2 / 2 + d2 * d.hi / 3)));
}

function log(x: DoubleDouble): DoubleDouble {
  if (!(x.hi > 0) || x.hi === Infinity) return from(Math.log(x.hi));
  if (x.hi < 1e-290 || x.hi > 1e290) { // keep exp(-y0) normal
    const k = x.hi < 1 ? 512 : -512;
    return sub(log(scale(x, k)), mul(from(k), LN2));
  }
  const near = sub(x, ONE);
  if (Math.abs(near.hi) < 0.25) return log1p(near);
  const y0 = Math.log(x.hi);
  return corrected(y0, sub(mul(x, exp(from(-y0))), ONE));
}

function log1p(x: DoubleDouble): DoubleDouble {
  if (!(Math.abs(x.hi) < 0.3)) return log(add(ONE, x));
  if (x.hi === 0) return x;
  const y0 = Math.log1p(x.hi), g = expm1(from(-y0));
  return corrected(y0, add(add(g, x), mul(x, g))); // (1 + x) exp(-y0) - 1
}

function sqrt(a: DoubleDouble): DoubleDouble {
  if (a.hi <= 0) return from(Math.sqrt(a.hi));
  const r = Math.sqrt(a.hi), p = r * r;
  const rest = sub(a, quick(p, productError(r, r, p)));
  const first = quick(r, rest.hi / (2 * r));
  const second = sub(a, mul(first, first));
  return quick(first.hi, first.lo + second.hi / (2 * r));
}

/** Double-double arithmetic; relative error of each operation below 2^-102 (functions: 2^-98). */
export const doubleDouble: Arithmetic<DoubleDouble> = {
  epsilon: 2 ** -104,
  from,
  ratio,
  toNumber: (x) => x.hi,
  add,
  sub,
  mul,
  div,
  neg,
  sqrt,
  exp,
  expm1,
  log,
  log1p,
  sqrt1pm1: (a) => div(a, add(ONE, sqrt(add(ONE, a)))),
  pi: PI,
};
