/**
 * Data at a cavity wall of areal radius r_w around a hole of Misner-Sharp mass m there, in a bath.
 *
 * With time normalised so that e^{2 rho} = 1 - 2m/r_w at the wall, r' = e^{2 rho} there and the constraint
 * (C) is a quadratic for q = rho': b q^2 + 2 r g q = g (1 - g) + b c^2/4 (derived here).
 *
 * @module
 */
import type { Arithmetic } from "../arithmetic/arithmetic.ts";
import type { SphericalPoint } from "./far_series.ts";

/** Constants of a cavity, in any unit of length. */
export interface Cavity<T> {
  readonly b: T;
  readonly m: T;
  /** Bath ratio minus one. */
  readonly eta: T;
  readonly rw: T;
}

/** The split unknowns of the bath form at the wall. */
export function wallData<T>(A: Arithmetic<T>, p: Cavity<T>): SphericalPoint<T> {
  const two = A.from(2), four = A.from(4), ratio = A.div(A.mul(two, p.m), p.rw);
  const g = A.sub(A.from(1), ratio), half = A.div(A.add(A.from(1), p.eta), A.mul(four, p.m)); // c/2
  const rg = A.mul(p.rw, g), half2 = A.mul(half, half);
  const a = A.add(A.mul(g, ratio), A.mul(p.b, half2));
  const q = A.div(a, A.add(rg, A.sqrt(A.add(A.mul(rg, rg), A.mul(p.b, a)))));
  const x = A.div(A.sub(half2, A.mul(q, q)), A.mul(two, rg)); // (q - m/r^2)/b
  return {
    rho: A.div(A.log1p(A.neg(ratio)), two),
    mu: A.add(A.sub(A.mul(A.mul(p.rw, p.rw), x), q), A.div(A.from(1), A.mul(four, p.m))),
    om: A.from(0),
  };
}
