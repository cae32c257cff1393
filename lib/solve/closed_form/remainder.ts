/**
 * Remainders of ln and exp without cancellation, with bounds on their round-off.
 *
 * @module
 */

import { U } from "./ball.ts";

/** Series: at most 5 roundings in the leading factor; the tail enters with weight below 0.1. */
const SERIES = 8 * U;

/**
 * z - ln(1 + z) for z > -0.4, from ln(1+z) = 2 artanh s, s = z/(2+z):
 * z - ln(1+z) = s z - 2 s^3 (1/3 + s^2/5 + ...).
 */
export function logRemainder(z: number): number {
  if (z > 0.5) return z - Math.log1p(z);
  const s = z / (2 + z);
  const q = s * s; // at most 1/16: 12 terms leave 1e-16 of a tail that is small itself
  let tail = 0;
  for (let k = 27; k >= 3; k -= 2) tail = tail * q + 1 / k;
  return s * z - 2 * s * q * tail;
}

/** e^v - 1 - v for v >= 0. */
export function expRemainder(v: number): number {
  if (v > 0.5) return Math.expm1(v) - v;
  let sum = 1;
  for (let k = 14; k >= 3; k--) sum = 1 + (v / k) * sum; // 0.5^13/14! < U
  return 0.5 * v * v * sum;
}

/** Bound on the round-off of {@linkcode logRemainder}; beyond 1/2 ln(1+z) has 2 U, the difference 1 U. */
export function logRemainderError(z: number, value: number): number {
  return z > 0.5 ? 1.1 * U * (value + 2 * (z - value)) : SERIES * value;
}

/** Bound on the round-off of {@linkcode expRemainder}; beyond 1/2 e^v - 1 has 2 U, the difference 1 U. */
export function expRemainderError(v: number, value: number): number {
  return v > 0.5 ? 1.1 * U * (value + 2 * (v + value)) : SERIES * value;
}
