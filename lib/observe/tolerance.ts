/**
 * Whether a row meets the tolerance it asks for.
 *
 * @module
 */
import { RADIAL_MODELS, type RowInput } from "../model/input.ts";
import type { Bounded, NumericColumn } from "./result.ts";

/**
 * The reason of failure, or an empty string: relative on every locus number; the dilaton of linear-dilaton
 * models absolute; what is not a number was too large or too small on the way; the mass relative to max(|m|, kappa); -g_tt that underflows is judged by its logarithm.
 */
export function unmet(input: RowInput, numbers: Partial<Record<NumericColumn, Bounded>>): string {
  const spherical = RADIAL_MODELS.includes(input.model);
  for (const [name, b] of Object.entries(numbers)) {
    if (Number.isNaN(b.value)) {
      return `out-of-range: ${name} or a step to it leaves the range of double-double numbers`;
    }
    if (b.error === undefined || b.error === 0 || !Number.isFinite(b.value)) continue;
    if (name === "minus_gtt_locus" && b.value < 1e-300) continue;
    const size = name === "dilaton_locus" && !spherical
      ? 1
      : name === "mass"
      ? Math.max(Math.abs(b.value), input.kappa * (input.lambda ?? 0))
      : Math.abs(b.value);
    if (!(b.error <= input.tolerance * size)) {
      const bound = Number.isNaN(b.error) ? "unknown" : b.error.toExponential(1);
      return `tolerance: the bound of ${name} is ${bound}, the tolerance asks for ${
        (input.tolerance * size).toExponential(1)
      }`;
    }
  }
  return "";
}
