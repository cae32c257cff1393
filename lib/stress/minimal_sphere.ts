/**
 * The sphere of least area that conformal fields in the empty (Boulware) state leave in place of the horizon of a hole,
 * and -g_tt there.
 *
 * Assumptions: the leading tensor near the would-be horizon is the whole source, and its equations are reduced in order
 * (see `lib/model/form/minimal_sphere.ts`). Semiclassical gravity must hold at the sphere: R above the Planck length
 * times a power of the number of fields.
 *
 * @module
 */
import { lower } from "../expr/lower.ts";
import { type AnomalyCoefficients, leadingCoefficient } from "../model/content.ts";
import { MINIMAL_SPHERE } from "../model/form/minimal_sphere.ts";
import { NO_LEADING_TERM } from "../observe/anomaly_row.ts";
import { AGAINST_DOUBLE, bounded } from "../observe/bound.ts";
import type { Bounded } from "../observe/result.ts";
import { inward, startOf } from "../solve/anomaly/inward.ts";
import { type DoubleDouble, doubleDouble } from "../solve/arithmetic/double_double.ts";
import { doubleDoubleCode, DoubleDoubleWalker } from "../solve/series/double_double_walker.ts";
import { doubleCode, DoubleWalker } from "../solve/series/double_walker.ts";
import { SETTINGS } from "../solve/settings.ts";

/** A minimal sphere, or why there is none. */
export type MinimalSphere =
  | {
    readonly outcome: "solved";
    /** Areal radius. */
    readonly radius: Bounded;
    /** -g_tt there; 1 at infinity. */
    readonly minusGtt: Bounded;
    /** Acceleration of resting observers there. */
    readonly acceleration: Bounded;
    /** The limit for large mass, sqrt((a + beta/2)/pi)/(8 M) = (1/4) sqrt((a + beta/2)/S). */
    readonly law: number;
  }
  | { readonly outcome: "refused"; readonly reason: string };

const program = lower(MINIMAL_SPHERE, {});
const narrow = doubleCode(program, SETTINGS.double);
const fine = doubleDoubleCode(program, SETTINGS.doubleDouble);

const LARGEST = 1e70; // mass; alpha^4 leaves the range of doubles beyond

/**
 * The minimal sphere of a hole of mass M, G = 1.
 *
 * @param coefficients Anomaly coefficients, see `anomalyOf`.
 * @param mass Misner-Sharp mass at infinity, in Planck masses.
 * @returns Radius, -g_tt and acceleration with bounds of the stated equations' solution; or a refusal where the leading
 * term vanishes or has the wrong sign.
 * @throws {RangeError} if the mass is out of range.
 * @example No horizon, but nearly
 * ```ts
 * import { anomalyOf, minimalSphere } from "@backstamp/backstamp";
 * const scalar = anomalyOf({ scalars: 1, weyl: 0, vectors: 0 }, "zeta");
 * const sphere = minimalSphere(scalar, 1000);
 * if (sphere.outcome !== "solved") throw new Error(sphere.reason);
 * if (Math.abs(sphere.minusGtt.value / sphere.law - 1) > 1e-3) throw new Error("far from the law");
 * ```
 */
export function minimalSphere(coefficients: AnomalyCoefficients, mass: number): MinimalSphere {
  if (!(mass > 0 && mass <= LARGEST)) {
    throw new RangeError(
      `Cannot find the minimal sphere as the mass must lie in (0, ${LARGEST}]: current value is ${mass}`,
    );
  }
  const A = doubleDouble, two = A.from(2);
  const { p, q } = leadingCoefficient(coefficients), leading = A.ratio(p, q);
  if (p <= 0n) return { outcome: "refused", reason: `${NO_LEADING_TERM}${leading.hi}` };
  const M = A.from(mass), lng = A.log(A.div(leading, A.mul(A.pi, A.mul(M, M))));
  const u = startOf(lng.hi);
  const quick = inward(new DoubleWalker(narrow, { lng: lng.hi }, {}, 0.5), u);
  const wide = inward(new DoubleDoubleWalker(fine, { lng }, {}, 0.5), u);
  if (!quick || !wide) {
    return { outcome: "refused", reason: "step-limit: the minimal sphere was not reached" };
  }
  const radius = A.mul(M, A.exp(wide.L)), redshift = A.exp(A.mul(two, wide.psi));
  const acceleration = A.div(A.exp(wide.u), radius);
  const one = (value: DoubleDouble, other: number) =>
    bounded(value, A.sub(value, A.from(other)).hi, Math.abs(value.hi), AGAINST_DOUBLE);
  const quickRadius = mass * Math.exp(quick.L);
  return {
    outcome: "solved",
    radius: one(radius, quickRadius),
    minusGtt: one(redshift, Math.exp(2 * quick.psi)),
    acceleration: one(acceleration, Math.exp(quick.u) / quickRadius),
    law: Math.sqrt(leading.hi / Math.PI) / (8 * mass),
  };
}
