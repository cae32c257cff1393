/**
 * Roots of the three equations of the family, each by Newton on the form that does not cancel and with
 * a bound from the residual: |x - x*| <= (|F(x)| + error of F)/min F'.
 *
 * @module
 */

import { type Ball, U } from "./ball.ts";
import { expRemainder, expRemainderError, logRemainder, logRemainderError } from "./remainder.ts";

/** Newton's method: after a step below 1e-9 (relative, or `floor`) one more reaches round-off. */
function newton(start: number, step: (x: number) => number, floor: number = 0): number {
  let x = start;
  for (let n = 0; n < 60; n++) {
    const dx = step(x);
    x -= dx;
    if (Math.abs(dx) <= 1e-9 * Math.abs(x) + floor) return x - step(x);
  }
  return x;
}

/**
 * Ball of the positive root x of F(x) = delta, F' = z/(1+z) or e^v - 1. Over [x - e, x] F' falls by less
 * than 1.6 if e <= x/4 and (F' <= 1 or e <= 1/4): z/(1+z) by 4/3, e^v - 1 by at most 1.54 (at v = 1).
 */
function convexRoot(
  delta: Ball,
  solve: (d: number) => number,
  F: (x: number) => number,
  roundOff: (x: number, value: number) => number,
  slope: (x: number) => number,
): Ball {
  const x = solve(delta.v);
  const value = F(x);
  const difference = Math.abs(value - delta.v);
  const residual = difference * (1 + 2 * U) + delta.e + roundOff(x, value);
  const e = 1.6 * residual / slope(x);
  if (e <= 0.25 * x && (slope(x) <= 1 || e <= 0.25)) return { v: x, e };
  // wide ball (next to a boundary between kinds): enclose by the roots of the ends
  const low = delta.v - residual;
  const high = solve(delta.v + residual);
  const below = low > 0 ? x - solve(low) : x;
  return { v: x, e: Math.max(high - x, below) + 1e-12 * high }; // the ends are roots to 1e-14
}

function solveLogRemainder(delta: number): number {
  const s = Math.sqrt(2 * delta);
  // expansion in s, or one round of z = delta + ln(1+z)
  const start = delta < 1
    ? s * (1 + s * (1 / 3 + s / 36))
    : delta + Math.log1p(delta + Math.log1p(delta));
  return newton(start, (z) => (logRemainder(z) - delta) * (1 + z) / z);
}

/** z > 0 with z - ln(1+z) = delta > 0: E = E_c (1+z) at a throat or horizon. */
export function throatRoot(delta: Ball): Ball {
  return convexRoot(delta, solveLogRemainder, logRemainder, logRemainderError, (z) => z / (1 + z));
}

function solveExpRemainder(delta: number): number {
  const s = Math.sqrt(2 * delta);
  const start = delta < 1
    ? s * (1 + s * (-1 / 6 + s / 36))
    : Math.log1p(delta + Math.log1p(delta + 1));
  return newton(start, (v) => (expRemainder(v) - delta) / Math.expm1(v));
}

/** v > 0 with e^v - 1 - v = delta > 0: u = v + ln P at a naked end with tau < 1. */
export function nakedRoot(delta: Ball): Ball {
  return convexRoot(delta, solveExpRemainder, expRemainder, expRemainderError, Math.expm1);
}

/** y with e^y + q y + D = 0, q >= 0: u at a naked end with tau > 1. */
export function hotRoot(q: Ball, D: Ball): Ball {
  // in x = y - ln q: e^x + x = l, started to the right of the root
  const l = -D.v / q.v - Math.log(q.v);
  const x = l > 1 ? Math.log(l) : l;
  const start = x < Infinity ? x + Math.log(q.v) : Math.log(-D.v);
  const F = (y: number) => Math.exp(y) + q.v * y + D.v;
  const y = newton(start, (t) => F(t) / (Math.exp(t) + q.v), 1e-12);
  const w = Math.exp(y);
  const residual = Math.abs(F(y)) + D.e + Math.abs(y) * q.e +
    4 * U * (w + Math.abs(q.v * y) + Math.abs(D.v));
  // F' >= q everywhere, and F' >= e^(-1/4) F'(y) within 1/4
  const near = 1.3 * residual / (w + q.v);
  return { v: y, e: near <= 0.25 ? near : residual / (q.v - q.e) };
}

/** y with e^y - p y + D = 0 and e^y much larger than p >= 0: a naked end with tau just below 1. */
export function coolRoot(p: Ball, D: Ball): Ball {
  const F = (y: number) => Math.exp(y) - p.v * y + D.v;
  const y = newton(Math.log(-D.v), (t) => F(t) / (Math.exp(t) - p.v), 1e-12);
  const w = Math.exp(y);
  const residual = Math.abs(F(y)) + D.e + Math.abs(y) * p.e +
    4 * U * (w + Math.abs(p.v * y) + Math.abs(D.v));
  const e = 1.4 * residual / (w - p.v);
  return { v: y, e: e <= 0.25 ? e : Infinity };
}
