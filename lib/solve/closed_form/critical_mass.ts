/**
 * Critical mass of the solvable family: the mass at which f(u) = e^u - P u + m touches the minimum of
 * h(E) = E - E_c ln E (E_c = a kappa/2, P = kappa (1 - tau^2)/4; own derivation).
 *
 * @module
 */

import { add, type Ball, div, exact, log, mul, neg, rounded, scale, sub } from "./ball.ts";
import { logRemainder, logRemainderError } from "./remainder.ts";

/** Dimensionless constants of a family member in a state, all without cancellation near tau = 1. */
export interface Constants {
  /** a. */
  readonly a: number;
  /** kappa. */
  readonly kappa: Ball;
  /** p = P/kappa = (1 - tau^2)/4, its sign is that of 1 - tau. */
  readonly p: Ball;
  /** E_c. */
  readonly ec: Ball;
  /** ln(a/2); meaningless for a = 0. */
  readonly logHalfA: Ball;
  /** ln E_c; meaningless for a = 0. */
  readonly logEc: Ball;
  /** 1 - tau^2 - 2 a, zero if the vacuum belongs to the family member and state. */
  readonly offVacuum: Ball;
}

/** Constants from the inputs, eps = tau - 1. */
export function constants(a: number, kappa: number, eps: number): Constants {
  const tau = add(exact(1), exact(eps));
  const oneMinusTau2 = neg(mul(exact(eps), add(exact(2), exact(eps))));
  const ec = scale(mul(exact(a), exact(kappa)), 0.5);
  // two routes to the same number; near eps = 0 the first, near tau = 0 the second loses nothing
  const first = sub(oneMinusTau2, exact(2 * a));
  const second = sub(sub(exact(1), exact(2 * a)), mul(tau, tau));
  const logHalfA = log(exact(a / 2));
  return {
    a,
    kappa: exact(kappa),
    p: scale(oneMinusTau2, 0.25),
    ec,
    logHalfA,
    // a kappa/2 may be subnormal, its logarithm need not suffer
    logEc: ec.v > 1e-290 ? log(ec) : add(logHalfA, log(exact(kappa))),
    offVacuum: first.e <= second.e ? first : second,
  };
}

/** h(E_c) = E_c (1 - ln E_c); zero for a = 0. */
function criticalValue(c: Constants): Ball {
  return c.a === 0 ? exact(0) : mul(c.ec, sub(exact(1), c.logEc));
}

/**
 * m_c = h(E_c) - P + P ln P for tau < 1 and h(E_c) for tau >= 1.
 *
 * Near the vacuum, P = E_c (1 + s), it is E_c [(1+s) ln(1+s) - s] + (P - E_c) ln E_c, where the bracket
 * is s^2 - (1+s) (s - ln(1+s)).
 */
export function criticalMass(c: Constants): Ball {
  if (!(c.p.v > 0)) return criticalValue(c);
  const s = c.a === 0 ? exact(Infinity) : div(c.offVacuum, exact(2 * c.a));
  if (Math.abs(s.v) < 0.4) {
    const value = logRemainder(s.v);
    // d/ds (s - ln(1+s)) = s/(1+s), at most 1/0.6
    const rest = { v: value, e: logRemainderError(s.v, value) + s.e * (Math.abs(s.v) + s.e) * 2 };
    const bracket = sub(mul(s, s), mul(add(exact(1), s), rest));
    const gap = mul(c.kappa, scale(c.offVacuum, 0.25));
    return add(mul(c.ec, bracket), mul(gap, c.logEc));
  }
  const P = mul(c.kappa, c.p);
  const logP = P.v > 1e-290 ? log(P) : add(log(c.kappa), log(c.p));
  return add(criticalValue(c), mul(P, sub(logP, exact(1))));
}

/** 2 pi, rounded once. */
export const TWO_PI: Ball = rounded(2 * Math.PI);
/** ln 10, rounded once. */
export const LN10: Ball = rounded(Math.LN10);
