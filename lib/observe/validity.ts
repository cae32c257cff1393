/**
 * Where a row leaves the domain in which semiclassical results can be trusted.
 *
 * Thresholds (own choice, stated in DEVELOPERS.md): the locus within a tenth of the critical one; curvature
 * above a tenth of the Planck value (spherical; anomaly4d: the acceleration squared) or ten times that of every classical linear-dilaton
 * horizon, 4 lambda^2; fewer than 24 scalars, where the ghosts' -24 is no longer small.
 *
 * @module
 */
import { RADIAL_MODELS, type RowInput } from "../model/input.ts";

/** Codes that `validity` can hold. */
export const VALIDITY_CODES = ["near-critical", "high-curvature", "few-fields"] as const;

/** Thresholds of the codes. */
export const THRESHOLDS = {
  /** relative distance of e^{-2 phi} (r^2) from its critical value */
  separation: 0.1,
  /** |R| of spherical models, in Planck units */
  planckCurvature: 0.1,
  /** |R| of linear-dilaton models, in units of 4 lambda^2 */
  dilatonCurvature: 10,
  /** number of scalars N = 12 kappa */
  fields: 24,
} as const;

/** How many fields take part. */
function fieldsOf(
  { model, kappa, realScalars = 0, diracSpinors = 0, vectors = 0 }: RowInput,
): number {
  return model === "anomaly4d" ? realScalars + 2 * diracSpinors + vectors : 12 * kappa;
}

/** `inside`, or the codes that apply joined by `;`. */
export function validity(
  input: RowInput,
  curvature: number | undefined,
  separation: number | undefined,
): string {
  const codes: string[] = [];
  if (separation !== undefined && separation < THRESHOLDS.separation) codes.push("near-critical");
  const cutoff = RADIAL_MODELS.includes(input.model)
    ? THRESHOLDS.planckCurvature
    : THRESHOLDS.dilatonCurvature * 4 * input.lambda! * input.lambda!;
  if (curvature !== undefined && Math.abs(curvature) > cutoff) codes.push("high-curvature");
  if (fieldsOf(input) < THRESHOLDS.fields) codes.push("few-fields");
  return codes.join(";") || "inside";
}
