/**
 * Closed forms of the exactly solvable family in many decimal digits: the reference for the integrator
 * and for the closed-form route in double precision.
 *
 * Own derivation (lambda = 1, E = e^(-2 phi), u = 2 sigma). In the family H = E + kappa (a-1) phi,
 * K = 4 E + kappa (1-2a), V = 4 E, rho = phi + sigma turns (1) into (E + a kappa phi)'' = 4 e^u, makes (2)
 * equivalent to it, and (C) fixes the linear term (all three are tested off the locus):
 *
 *     h(E) = E - E_c ln E = f(u) = e^u - P u + m,   E_c = a kappa/2,   P = kappa (1 - tau^2)/4
 *
 * with -g_tt = e^(2 rho) = e^u/E. h has its minimum at E_c (critical locus), f at e^u = P for tau < 1.
 * With d = m - m_c, m_c = h(E_c) - P + P ln P (tau < 1), h(E_c) (tau >= 1; h(E_c) = 0 for a = 0):
 *
 * - throat (tau < 1, d > 0): h(E) - h(E_c) = d, so E = E_c (1+z), z - ln(1+z) = d/E_c; E = d for a = 0.
 *   There E_u = 0, E_uu = P E/(E-E_c), R = -8 rho_uu E/e^u = 4 E/(E - E_c).
 * - horizon (tau = 1, d > 0): the same E; rho_uu -> -e^u/(2 (E-E_c)), R = 4 E/(E - E_c).
 * - naked (d < 0 or tau > 1): E reaches E_c while f' = e^u - P > 0; E - E_c ~ (u-u_c)^(1/2), so
 *   E_uu -> -INF, rho_uu -> +INF and R -> -INF. For a = 0, E = f -> 0 linearly, rho_uu = E_u^2/(2 E^2),
 *   -g_tt -> INF, R -> -INF.
 * - d = 0: tau < 1, a > 0 passes E_c smoothly (marginal; the vacuum if P = E_c, then E = e^u). For a = 0
 *   E ~ P v^2/2 in v = u - ln P: -g_tt = 2/v^2 -> INF and R = -8 v^-2 (P v^2/2)/P = -4 at infinite proper
 *   distance. tau = 1, a > 0: E - E_c = sqrt(2 E_c) e^(u/2) and R ~ e^(-u/2) -> +INF: singular horizon.
 *
 * lambda enters by R -> lambda^2 R, T -> lambda T, M = lambda m.
 *
 * @module
 */

import { all, type BigNumber, create } from "mathjs";

/** Working digits: 60 asked for, plus those that d = m - m_c may lose. */
const DIGITS = 110;
const math = create(all!, { number: "BigNumber", precision: DIGITS });
/** Arbitrary-precision decimal of mathjs. */
export type Big = ReturnType<BigNumber["add"]>;
const decimal = (x: number | string): Big => math.bignumber(x) as BigNumber;
/** Exact decimal value of a double (its binary expansion ends within 1075 digits). */
export function big(x: number): Big {
  // Read in full: the constructor takes the shortest decimal of the double, which is another number.
  if (!Number.isFinite(x)) return decimal(x);
  let n = x;
  let shift = 0;
  while (!Number.isInteger(n)) {
    n *= 2;
    shift++;
  }
  const integer = decimal(BigInt(n).toString());
  return shift === 0 ? integer : integer.div(decimal(2).pow(shift));
}

const ZERO = decimal(0);
const ONE = decimal(1);
const INF = decimal(Infinity);

/** One row of the solvable family; exactly one of `mass`, `massAboveCritical`, `horizonDilaton`. */
export interface FamilyRow {
  readonly a: number;
  readonly kappa: number;
  readonly lambda: number;
  readonly state: "boulware" | "thermal" | "hartle-hawking";
  readonly mass?: number;
  readonly massAboveCritical?: number;
  readonly horizonDilaton?: number;
  readonly bathRatioMinusOne?: number;
}

/** Exact values of a row; `undefined` where not applicable. */
export interface FamilyValues {
  readonly kind: string;
  readonly mass: Big;
  readonly massAboveCritical: Big;
  readonly eps: Big;
  readonly dilaton?: Big;
  readonly minusGtt?: Big;
  readonly lnMinusGtt?: Big;
  readonly log10MinusGtt?: Big;
  readonly curvature?: Big;
  readonly temperatureBath: Big;
  readonly temperatureHorizon?: Big;
  readonly entropyClassical?: Big;
}

/** z - ln(1+z) to full relative precision. */
export function zMinusLog1p(z: Big): Big {
  if (z.abs().gt(0.05)) return z.sub(z.add(1).ln());
  let term = z.mul(z);
  let sum = term.div(2);
  for (let n = 3; n < 400; n++) {
    term = term.mul(z).neg();
    const next = term.div(n);
    sum = sum.add(next);
    if (next.abs().lt(sum.abs().mul(`1e-${DIGITS}`))) return sum;
  }
  return sum;
}

/** e^v - 1 - v to full relative precision. */
export function expMinusLinear(v: Big): Big {
  if (v.abs().gt(0.05)) return v.exp().sub(1).sub(v);
  let term = v;
  let sum = ZERO;
  for (let n = 2; n < 400; n++) {
    term = term.mul(v).div(n);
    sum = sum.add(term);
    if (term.abs().lt(sum.abs().mul(`1e-${DIGITS}`))) return sum;
  }
  return sum;
}

function newton(start: Big, step: (x: Big) => Big): Big {
  let x = start;
  for (let n = 0; n < 300; n++) {
    const dx = step(x);
    x = x.sub(dx);
    // the quadratic remainder of a step this small lies below the working precision
    if (dx.abs().lte(x.abs().mul(`1e-${Math.floor(DIGITS / 2) + 4}`))) return x;
  }
  throw new Error("Cannot solve the closed form as Newton's method must converge");
}

/** Positive root z of z - ln(1+z) = delta. */
export function throatRoot(delta: Big): Big {
  const s = delta.mul(2).sqrt();
  const start = delta.lt(1) ? s.add(delta.mul(2).div(3)) : delta.add(delta.add(2).ln()).add(1);
  return newton(start, (z) => zMinusLog1p(z).sub(delta).mul(z.add(1)).div(z));
}

/** Positive root v of e^v - 1 - v = delta. */
export function nakedRoot(delta: Big): Big {
  const start = delta.lt(1) ? delta.mul(2).sqrt() : delta.add(2).ln().add(1);
  return newton(start, (v) => {
    const rest = expMinusLinear(v);
    return rest.sub(delta).div(rest.add(v)); // e^v - 1 would vanish for v below the working precision
  });
}

/** Root x of e^x + x = l. */
export function omegaRoot(l: Big): Big {
  const start = l.gt(1) ? l.ln() : l.sub(1);
  return newton(start, (x) => x.exp().add(x).sub(l).div(x.exp().add(1)));
}

/** Real branch -1 or 0 of Lambert's W by Newton on w + ln(w/x) = 0. */
export function lambertW(branch: -1 | 0, x: Big): Big {
  if (branch === -1) {
    const l = x.neg().ln();
    // w = l - ln(-l) + ... far from the branch point, -1 - sqrt(2 (1 + e x)) near it
    const near = x.mul(ONE.exp()).add(1).mul(2).sqrt();
    const start = near.lt(1) ? near.neg().sub(1) : l.sub(l.neg().ln());
    return newton(start, (w) => w.sub(l).add(w.neg().ln()).mul(w).div(w.add(1)));
  }
  const l = x.ln();
  const start = x.lt(2) ? x.div(x.add(1)) : l.sub(l.gt(1) ? l.ln() : ZERO);
  return newton(start, (w) => w.sub(l).add(w.ln()).mul(w).div(w.add(1)));
}

const xLogX = (x: Big): Big => x.isZero() ? ZERO : x.mul(x.ln());
const LN10 = decimal(10).ln();
const PI = decimal(-1).acos();

/** Exact locus values of a row, or `undefined` if it is refused (no horizon below the critical mass). */
export function familyValues(row: FamilyRow): FamilyValues | undefined {
  const kappa = big(row.kappa);
  const lambda = big(row.lambda);
  const ec = big(row.a).mul(kappa).div(2);
  const eps = row.state === "boulware"
    ? ONE.neg()
    : row.state === "hartle-hawking"
    ? ZERO
    : big(row.bathRatioMinusOne!);
  const p = kappa.mul(eps).mul(eps.add(2)).div(-4);
  const hc = ec.sub(xLogX(ec));
  const mc = p.gt(0) ? hc.sub(p).add(xLogX(p)) : hc;
  let d: Big;
  let z: Big | undefined;
  if (row.horizonDilaton !== undefined) {
    const phi = big(row.horizonDilaton);
    const e = phi.mul(-2).exp();
    d = e.add(ec.mul(2).mul(phi)).sub(mc);
    if (!ec.isZero()) {
      z = e.div(ec).sub(1);
      if (z.lt(0)) return undefined;
    }
  } else if (row.massAboveCritical !== undefined) d = big(row.massAboveCritical);
  else d = big(row.mass!).div(lambda).sub(mc);
  const m = mc.add(d);
  // equality that survives 80 digits is taken as exact (m_c is rational in special cases only)
  const computed = row.massAboveCritical === undefined;
  if (computed && d.abs().lt(mc.abs().add(ec).add(kappa).mul("1e-80"))) d = ZERO;
  if (row.state === "hartle-hawking" && d.lt(0)) return undefined;
  const base = {
    mass: row.mass === undefined ? m.mul(lambda) : big(row.mass),
    massAboveCritical: d,
    eps,
    temperatureBath: lambda.mul(eps.add(1)).div(PI.mul(2)),
  };
  const gtt = (ln: Big) => ({
    lnMinusGtt: ln,
    log10MinusGtt: ln.div(LN10),
    // decimal exponents of mathjs end near 9e15
    minusGtt: ln.lt(-1e10) ? ZERO : ln.exp(),
  });
  const wall = { dilaton: ec.isZero() ? INF : ec.ln().div(-2) };
  if (d.isZero() && !p.lt(0)) {
    if (p.eq(ec)) return { kind: "vacuum", ...base };
    if (p.isZero()) {
      return {
        kind: "singular-horizon",
        ...base,
        ...wall,
        minusGtt: ZERO,
        lnMinusGtt: INF.neg(),
        log10MinusGtt: INF.neg(),
        curvature: INF,
        temperatureHorizon: base.temperatureBath,
        entropyClassical: ec.mul(2),
      };
    }
    if (!ec.isZero()) return { kind: "marginal", ...base };
    return {
      kind: "semi-infinite-throat",
      ...base,
      dilaton: INF,
      minusGtt: INF,
      lnMinusGtt: INF,
      log10MinusGtt: INF,
      curvature: lambda.mul(lambda).mul(-4),
    };
  }
  if (p.lt(0) || d.lt(0)) {
    const naked = { kind: "naked-singularity", ...base, ...wall, curvature: INF.neg() };
    if (ec.isZero()) return { ...naked, minusGtt: INF, lnMinusGtt: INF, log10MinusGtt: INF };
    if (p.isZero()) return { ...naked, ...gtt(d.neg().div(ec).ln()) };
    if (p.gt(0)) return { ...naked, ...gtt(nakedRoot(d.div(p).neg()).add(p.div(ec).ln())) };
    const q = p.neg();
    // e^u + q u + d = 0: x = u - ln q solves e^x + x = -d/q - ln q
    return { ...naked, ...gtt(omegaRoot(d.div(p).sub(q.ln())).add(q.div(ec).ln())) };
  }
  z ??= ec.isZero() ? ZERO : throatRoot(d.div(ec));
  const e = ec.isZero() ? d : ec.mul(z.add(1));
  const locus = {
    ...base,
    dilaton: e.ln().div(-2),
    curvature: lambda.mul(lambda).mul(4).mul(ec.isZero() ? ONE : z.add(1).div(z)),
    entropyClassical: e.mul(2),
  };
  if (p.isZero()) {
    return {
      kind: "horizon",
      ...locus,
      minusGtt: ZERO,
      lnMinusGtt: INF.neg(),
      log10MinusGtt: INF.neg(),
      temperatureHorizon: base.temperatureBath,
    };
  }
  const ln = p.div(e).ln();
  return {
    kind: "throat",
    ...locus,
    lnMinusGtt: ln,
    log10MinusGtt: ln.div(LN10),
    minusGtt: p.div(e),
  };
}

/** E at u by Newton on h(E) = f(u), outer branch E > E_c; for checks off the locus. */
export function dilatonFunction(a: number, kappa: number, m: number, eps: number, u: Big): Big {
  const ec = big(a).mul(big(kappa)).div(2);
  const p = big(kappa).mul(big(eps)).mul(big(eps).add(2)).div(-4);
  const f = u.exp().sub(p.mul(u)).add(big(m));
  if (ec.isZero()) return f;
  const hc = ec.sub(ec.mul(ec.ln()));
  return ec.mul(throatRoot(f.sub(hc).div(ec)).add(1));
}
