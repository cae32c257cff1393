/**
 * Numbers at the locus of an exact solution of the family.
 *
 * @module
 */

import { add, type Ball, div, exact, exp, log, log1p, mul, neg, scale, sub, TINY } from "./ball.ts";
import { type Constants, LN10 } from "./critical_mass.ts";
import { coolRoot, hotRoot, nakedRoot } from "./root.ts";

/** Number with absolute error bound; infinite numbers have no bound. */
export interface ClosedFormNumber {
  /** The number, possibly infinite. */
  readonly value: number;
  /** Absolute error bound, absent if `value` is infinite. */
  readonly error?: number;
}

/** Names of the numbers, those of the results table. */
export type ClosedFormColumn =
  | "mass"
  | "bath_ratio"
  | "bath_ratio_minus_one"
  | "dilaton_locus"
  | "minus_gtt_locus"
  | "log10_minus_gtt_locus"
  | "curvature_locus"
  | "temperature_bath"
  | "temperature_horizon"
  | "entropy_classical";

/** Numbers that apply to a case. */
export type Numbers = Partial<Record<ClosedFormColumn, ClosedFormNumber>>;

/** A ball as a number of the table. */
export function number(b: Ball): ClosedFormNumber {
  return Number.isFinite(b.v) ? { value: b.v, error: b.e } : { value: b.v };
}

const DIVERGENT: ClosedFormNumber = { value: Infinity };
const MINUS_DIVERGENT: ClosedFormNumber = { value: -Infinity };
const EXACT_ZERO: ClosedFormNumber = { value: 0, error: 0 };

/** Throat or horizon: E = E_c (1+z), or d for a = 0; R = 4 lambda^2 E/(E - E_c). */
export function regularLocus(c: Constants, d: Ball, z: Ball | undefined, lambda2: Ball): Numbers {
  const growth = z && add(exact(1), z);
  const E = growth ? mul(c.ec, growth) : d;
  const logE = z ? add(c.logEc, log1p(z)) : log(d);
  const ratio = z ? add(exact(1), div(exact(1), z)) : exact(1);
  const common = {
    dilaton_locus: number(scale(logE, -0.5)),
    curvature_locus: number(mul(scale(lambda2, 4), ratio)),
    entropy_classical: number(scale(E, 2)),
  };
  if (c.p.v === 0) {
    return { ...common, minus_gtt_locus: EXACT_ZERO, log10_minus_gtt_locus: MINUS_DIVERGENT };
  }
  // -g_tt = P/E; P/E_c = 2 p/a needs no kappa
  const g = growth ? div(div(scale(c.p, 2), exact(c.a)), growth) : div(mul(c.kappa, c.p), E);
  const direct = g.v > 1e-290 && g.v < 1e290;
  const lnG = direct
    ? log(g)
    : z
    ? sub(sub(log(scale(c.p, 2)), log(exact(c.a))), log1p(z))
    : sub(add(log(c.kappa), log(c.p)), logE);
  return {
    ...common,
    minus_gtt_locus: direct ? number(g) : minusGtt(lnG),
    log10_minus_gtt_locus: number(div(lnG, LN10)),
  };
}

/** Singular end where E reaches E_c (a > 0) or 0 (a = 0). */
export function nakedLocus(c: Constants, d: Ball): Numbers {
  if (c.a === 0) {
    return {
      dilaton_locus: DIVERGENT,
      minus_gtt_locus: DIVERGENT,
      log10_minus_gtt_locus: DIVERGENT,
      curvature_locus: MINUS_DIVERGENT,
    };
  }
  const lnG = sub(nakedExponent(c, d), c.logHalfA);
  return {
    dilaton_locus: number(scale(c.logEc, -0.5)),
    minus_gtt_locus: minusGtt(lnG),
    log10_minus_gtt_locus: number(div(lnG, LN10)),
    curvature_locus: MINUS_DIVERGENT,
  };
}

/** y = u - ln kappa at the singular end: e^y - p y + (m - h(E_c) - P ln kappa)/kappa = 0, outer root. */
function nakedExponent(c: Constants, d: Ball): Ball {
  const { p, kappa } = c;
  if (p.v === 0) return log(div(neg(d), kappa));
  if (p.v < 0) {
    const q = neg(p);
    const D = add(div(d, kappa), mul(q, log(kappa))); // m - h(E_c) = d for tau > 1
    return hotRoot(q, D);
  }
  const delta = div(div(neg(d), kappa), p);
  if (delta.v < 1e6) return add(nakedRoot(delta), log(p));
  // m - h(E_c) - P ln kappa = d - P + P ln p
  return coolRoot(p, add(div(d, kappa), mul(p, sub(log(p), exact(1)))));
}

/** e^lnG as a number of the table: 0 +- 5e-324 below the smallest double, infinite above the largest. */
function minusGtt(lnG: Ball): ClosedFormNumber {
  if (lnG.v + lnG.e < -745.2) return { value: 0, error: TINY };
  return number(exp(lnG));
}

/** Horizon on the critical locus: R ~ e^(-u/2) diverges where -g_tt vanishes. */
export function singularHorizonLocus(c: Constants): Numbers {
  return {
    dilaton_locus: number(scale(c.logEc, -0.5)),
    minus_gtt_locus: EXACT_ZERO,
    log10_minus_gtt_locus: MINUS_DIVERGENT,
    curvature_locus: DIVERGENT,
    entropy_classical: number(scale(c.ec, 2)),
  };
}

/** End of the semi-infinite throat of a = 0: -g_tt = 2/(u - ln P)^2 at infinite proper distance. */
export function semiInfiniteLocus(lambda2: Ball): Numbers {
  return {
    dilaton_locus: DIVERGENT,
    minus_gtt_locus: DIVERGENT,
    log10_minus_gtt_locus: DIVERGENT,
    curvature_locus: number(scale(lambda2, -4)),
  };
}
