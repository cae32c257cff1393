/**
 * Exact static solutions of the solvable family (RST: a = 1/2, BPP: a = 0) in double precision.
 *
 * With E = e^(-2 phi), u = 2 lambda sigma and m = M/lambda the solution is (own derivation; for RST it
 * is the published static solution)
 *
 *     E - E_c ln E = e^u - P u + m,   -g_tt = e^u/E,   E_c = a kappa/2,   P = kappa (1 - tau^2)/4 .
 *
 * An independent route beside the integrator, which never calls it. Every number carries an absolute
 * error bound from running error analysis.
 *
 * @module
 */

import {
  add,
  type Ball,
  div,
  exact,
  exp,
  expm1,
  mayVanish,
  mul,
  scale,
  sub,
} from "./closed_form/ball.ts";
import { type Constants, constants, criticalMass, TWO_PI } from "./closed_form/critical_mass.ts";
import {
  type ClosedFormColumn,
  type ClosedFormNumber,
  nakedLocus,
  number,
  type Numbers,
  regularLocus,
  semiInfiniteLocus,
  singularHorizonLocus,
} from "./closed_form/locus.ts";
import { throatRoot } from "./closed_form/root.ts";

export type { ClosedFormColumn, ClosedFormNumber };

/** A member of the family in a state; exactly one of `mass`, `massAboveCritical`, `horizonDilaton`. */
export interface ClosedFormInput {
  /** Family parameter, in [0, 2]. */
  readonly a: number;
  /** Anomaly coefficient, positive. */
  readonly kappa: number;
  /** Linear-dilaton scale, positive. */
  readonly lambda: number;
  /** tau - 1: -1 for Boulware, 0 for Hartle-Hawking. */
  readonly bathRatioMinusOne: number;
  /** Whether a solution without regular horizon is refused. */
  readonly hartleHawking?: boolean;
  /** M = lambda m. */
  readonly mass?: number;
  /** m - m_c, see {@linkcode closedForm}. */
  readonly massAboveCritical?: number;
  /** phi at the horizon; Hartle-Hawking only. */
  readonly horizonDilaton?: number;
}

/** Kinds of static solution that occur in the family. */
export type ClosedFormKind =
  | "horizon"
  | "throat"
  | "semi-infinite-throat"
  | "naked-singularity"
  | "marginal"
  | "vacuum"
  | "singular-horizon"
  | "undecided";

/** The exact solution of one case. */
export interface ClosedFormResult {
  /** Kind; `undefined` if Hartle-Hawking below the critical mass or dilaton: there is no horizon. */
  readonly kind: ClosedFormKind | undefined;
  /** Numbers that apply. */
  readonly numbers: Readonly<Partial<Record<ClosedFormColumn, ClosedFormNumber>>>;
  /** m - m_c (E - E_c if `horizonDilaton` was given), whose sign decides the kind. */
  readonly decisive: ClosedFormNumber;
}

/**
 * Kind and locus of the exact solution.
 *
 * The critical mass m_c is E_c (1 - ln E_c) - P + P ln P for tau < 1 and E_c (1 - ln E_c) for tau >= 1
 * (E_c ln E_c is 0 for a = 0). A case whose m - m_c may be zero within its bound, without being exactly
 * zero, is `undecided` and has no locus.
 *
 * @param input case; lengths in units of 1/lambda's, hbar = c = k_B = 1
 * @returns kind, numbers with bounds, and m - m_c; curvature is R of the two-dimensional metric
 * @throws RangeError if a parameter is out of range, or not exactly one of the three masses is given
 * @example RST in the Boulware state has a throat instead of a horizon
 * ```ts
 * import { closedForm } from "@backstamp/backstamp";
 *
 * const { kind, numbers } = closedForm({
 *   a: 0.5, kappa: 1, lambda: 1, bathRatioMinusOne: -1, mass: 1,
 * });
 * if (kind !== "throat" || Math.abs(numbers.minus_gtt_locus!.value - 0.144157704688610) > 1e-15) {
 *   throw new Error("unexpected");
 * }
 * ```
 */
export function closedForm(input: ClosedFormInput): ClosedFormResult {
  const { a, kappa, lambda, bathRatioMinusOne: eps } = input;
  requireRange(input);
  const c = constants(a, kappa, eps);
  const scaleMass = exact(lambda);
  let m: Ball;
  let d: Ball;
  let z: Ball | undefined;
  if (input.horizonDilaton !== undefined) {
    const phi = exact(input.horizonDilaton);
    const E = exp(scale(phi, -2));
    m = add(E, scale(mul(c.ec, phi), 2));
    if (a === 0) d = E;
    else {
      // m - m_c = E_c (z - ln(1+z)) is positive on either side of E_c: z = E/E_c - 1 decides
      z = expm1(sub(scale(phi, -2), c.logEc));
      d = mul(c.ec, z);
    }
  } else if (input.massAboveCritical !== undefined) {
    d = exact(input.massAboveCritical);
    m = add(criticalMass(c), d);
  } else {
    m = div(exact(input.mass!), scaleMass);
    // exactly the linear dilaton, whatever m_c rounds to
    const vacuum = input.mass === 0 && c.offVacuum.v === 0 && c.offVacuum.e === 0;
    d = vacuum ? exact(0) : sub(m, criticalMass(c));
  }
  const tau = add(exact(1), exact(eps));
  const bath = div(mul(scaleMass, tau), TWO_PI);
  const numbers: Numbers = {
    mass: input.mass === undefined ? number(mul(m, scaleMass)) : { value: input.mass, error: 0 },
    bath_ratio: number(tau),
    bath_ratio_minus_one: { value: eps, error: 0 },
    temperature_bath: number(bath),
  };
  const kind = kindOf(c, d, input.hartleHawking === true);
  const result = (kind: ClosedFormKind | undefined, locus: Numbers): ClosedFormResult => ({
    kind,
    numbers: { ...numbers, ...locus },
    decisive: number(d),
  });
  const lambda2 = mul(scaleMass, scaleMass);
  switch (kind) {
    case "horizon":
    case "throat": {
      if (a > 0) z ??= throatRoot(div(d, c.ec));
      if (z && mayVanish(z)) return result("undecided", {});
      const horizon = kind === "horizon" ? { temperature_horizon: number(bath) } : {};
      return result(kind, { ...regularLocus(c, d, z, lambda2), ...horizon });
    }
    case "naked-singularity":
      return result(kind, nakedLocus(c, d));
    case "singular-horizon":
      return result(kind, { ...singularHorizonLocus(c), temperature_horizon: number(bath) });
    case "semi-infinite-throat":
      return result(kind, semiInfiniteLocus(lambda2));
    default:
      return result(kind, {});
  }
}

function kindOf(c: Constants, d: Ball, hartleHawking: boolean): ClosedFormKind | undefined {
  if (c.p.v < 0) return "naked-singularity";
  if (d.v === 0 && d.e === 0) {
    if (c.offVacuum.v === 0 && c.offVacuum.e === 0) return "vacuum";
    if (c.p.v === 0) return "singular-horizon";
    return c.a === 0 ? "semi-infinite-throat" : "marginal";
  }
  if (mayVanish(d)) return "undecided";
  if (d.v < 0) return hartleHawking ? undefined : "naked-singularity";
  return c.p.v === 0 ? "horizon" : "throat";
}

function requireRange(input: ClosedFormInput): void {
  const { a, kappa, lambda, bathRatioMinusOne: eps, mass, massAboveCritical, horizonDilaton } =
    input;
  const refuse = (what: string, value: unknown) => {
    throw new RangeError(`Cannot evaluate the closed form as ${what}: current value is ${value}`);
  };
  if (!(a >= 0 && a <= 2)) refuse("a must lie in [0, 2]", a);
  if (!(kappa > 0 && kappa < Infinity)) refuse("kappa must be positive and finite", kappa);
  if (!(lambda > 0 && lambda < Infinity)) refuse("lambda must be positive and finite", lambda);
  if (!(eps >= -1 && eps < Infinity)) refuse("the bath ratio must not be negative", 1 + eps);
  const given = Number(mass !== undefined) + Number(massAboveCritical !== undefined) +
    Number(horizonDilaton !== undefined);
  const amount = mass ?? massAboveCritical ?? horizonDilaton;
  if (given !== 1) {
    refuse("exactly one of mass, massAboveCritical and horizonDilaton must be given", given);
  }
  if (!Number.isFinite(amount)) refuse("the mass or horizon dilaton must be finite", amount);
  if (horizonDilaton !== undefined && eps !== 0) {
    refuse("the bath ratio must be 1 where horizonDilaton is given", 1 + eps);
  }
}
