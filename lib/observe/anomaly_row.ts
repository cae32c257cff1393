/**
 * Rows of the minimal sphere in four dimensions.
 *
 * @module
 */
import {
  type AnomalyCoefficients,
  anomalyOf,
  leadingCoefficient,
  rationalOf,
} from "../model/content.ts";
import type { RowInput } from "../model/input.ts";
import { inward, startOf } from "../solve/anomaly/inward.ts";
import type { Engine } from "../solve/engine.ts";
import { failed, refused, type Solution } from "./solution.ts";

/** Reason where the leading tensor vanishes or has the wrong sign; its coefficient follows. */
export const NO_LEADING_TERM =
  "no-leading-term: a + beta/2 must be positive for a minimal sphere of this kind, it is ";

/** Anomaly coefficients of a row; beta is the double that was given. */
function coefficients(input: RowInput): AnomalyCoefficients {
  const { realScalars = 0, diracSpinors = 0, vectors = 0, beta = 0 } = input;
  const content = { scalars: realScalars, weyl: 2 * diracSpinors, vectors };
  return { ...anomalyOf(content, "zeta"), beta: rationalOf(beta) };
}

/** The row in one arithmetic. */
export function anomalyRow<T>(engine: Engine<T>, input: RowInput): Solution<T> {
  const A = engine.arithmetic, M = A.from(input.mass!);
  const { p, q } = leadingCoefficient(coefficients(input)), value = A.ratio(p, q);
  if (p <= 0n) return refused(`${NO_LEADING_TERM}${A.toNumber(value)}`);
  const lng = A.log(A.div(value, A.mul(A.pi, A.mul(M, M))));
  const end = inward(engine.walker("closure", { lng }, {}, 0.5), startOf(A.toNumber(lng)));
  if (!end) return failed("step-limit: the minimal sphere was not reached");
  const radius = A.mul(M, A.exp(end.L));
  return {
    outcome: "solved",
    kind: "throat",
    numbers: {
      dilaton_locus: radius,
      lngtt: A.mul(A.from(2), end.psi),
      entropy_classical: A.mul(A.pi, A.mul(radius, radius)),
    },
    exact: { curvature_locus: 0 }, // of the (t, l) plane: d alpha/dl = -alpha^2 on the sphere
    evidence: { leading_coefficient: value, acceleration: A.div(A.exp(end.u), radius) },
  };
}
