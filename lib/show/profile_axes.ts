/**
 * Axes of a profile's panels and the choice of abscissa. Linear-dilaton models are shown in units of lambda
 * (pure numbers), the s-wave model in Planck units.
 *
 * @module
 */
import type { ProfileColumn } from "../observe/result.ts";
import { type Axis, evenScale, type Scale, symmetricLogScale } from "./axis.ts";
import type { ProfileRows } from "./result_rows.ts";

/** Columns that can be drawn. */
export type DrawnColumn =
  | "sigma"
  | "proper_distance"
  | "minus_gtt"
  | "dilaton"
  | "curvature"
  | "energy_density"
  | "pressure";

/** An axis for a column and the power of lambda (a length to the minus one) its values carry. */
export interface ColumnAxis extends Axis {
  /** Values are divided by lambda to this power. */
  readonly power: number;
}

const pure = "dimensionless";
const inverseSquare = "Planck lengths^{\u22122}";

/** Axes in linear-dilaton models. */
export const LINEAR_DILATON_AXES: Readonly<Record<DrawnColumn, ColumnAxis>> = {
  sigma: { quantity: "tortoise coordinate", symbol: "\u03bb\u03c3", unit: pure, power: -1 },
  proper_distance: { quantity: "proper distance", symbol: "\u03bbd", unit: pure, power: -1 },
  minus_gtt: { quantity: "metric component", symbol: "\u2212g_{tt}", unit: pure, power: 0 },
  dilaton: { quantity: "dilaton", symbol: "\u03c6", unit: pure, power: 0 },
  curvature: { quantity: "curvature", symbol: "R/\u03bb^{2}", unit: pure, power: 2 },
  energy_density: { quantity: "energy density", symbol: "\u03b5/\u03bb^{2}", unit: pure, power: 2 },
  pressure: { quantity: "pressure", symbol: "p/\u03bb^{2}", unit: pure, power: 2 },
};

/** Axes in the s-wave model. */
export const SWAVE_AXES: Readonly<Record<DrawnColumn, ColumnAxis>> = {
  sigma: { quantity: "tortoise coordinate", symbol: "\u03c3", unit: "Planck lengths", power: 0 },
  proper_distance: { quantity: "proper distance", symbol: "d", unit: "Planck lengths", power: 0 },
  minus_gtt: { quantity: "metric component", symbol: "\u2212g_{tt}", unit: pure, power: 0 },
  dilaton: { quantity: "areal radius", symbol: "r", unit: "Planck lengths", power: 0 },
  curvature: { quantity: "curvature", symbol: "R", unit: inverseSquare, power: 0 },
  energy_density: { quantity: "energy density", symbol: "\u03b5", unit: inverseSquare, power: 0 },
  pressure: { quantity: "pressure", symbol: "p", unit: inverseSquare, power: 0 },
};

/** Decimal logarithm of -g_tt, from rho: it goes on where -g_tt itself is below the smallest double. */
export function log10MinusGtt(profile: ProfileRows): number[] {
  return profile.rho.map((rho) => 2 * rho / Math.LN10);
}

/**
 * Chooses the abscissa on which the profile reads better: the one that gives more room to the middle 80 % of
 * the change of log(-g_tt). Without a locus there is no origin of the proper distance, so it is sigma.
 *
 * @param profile Rows to be drawn.
 * @param hasLocus Whether the kind has one.
 */
export function abscissa(profile: ProfileRows, hasLocus: boolean): "sigma" | "proper_distance" {
  if (!hasLocus) return "sigma";
  const room = (column: ProfileColumn): number => {
    const x = profile[column];
    const log = log10MinusGtt(profile);
    const use = [...x.keys()].filter((i) => Number.isFinite(x[i]) && Number.isFinite(log[i]));
    if (use.length < 2) return 0;
    const change = [0];
    for (let i = 1; i < use.length; i++) {
      change.push(change[i - 1] + Math.abs(log[use[i]] - log[use[i - 1]]));
    }
    const total = change[change.length - 1];
    const at = (part: number) => x[use[change.findIndex((c) => c >= part * total)]];
    const span = Math.abs(x[use[use.length - 1]] - x[use[0]]);
    return span > 0 ? Math.abs(at(0.9) - at(0.1)) / span : 0;
  };
  // Proper distance has a meaning of its own, so it stands unless the figure is much better without it.
  return 3 * room("proper_distance") >= room("sigma") ? "proper_distance" : "sigma";
}

/**
 * Scale for a quantity of either sign: even unless it grows far above its typical size, else symmetric
 * logarithmic from a tenth of that size.
 *
 * @param values Numbers to be shown.
 * @param options Size at the locus where that is known and finite; length of the axis in points.
 */
export function signedScale(
  values: readonly number[],
  options: { readonly reference: number; readonly length: number },
): Scale {
  const sizes = values.filter((v) => Number.isFinite(v) && v !== 0).map(Math.abs);
  if (sizes.length === 0) return evenScale(values);
  sizes.sort((a, b) => a - b);
  const reference = Math.abs(options.reference);
  const known = Number.isFinite(reference) && reference > 0;
  const typical = known ? reference : sizes[Math.floor(sizes.length / 2)];
  if (sizes[sizes.length - 1] <= 50 * typical) return evenScale(values);
  const threshold = Number(`1e${Math.floor(Math.log10(typical)) - 1}`);
  return symmetricLogScale(values, { threshold, length: options.length, gap: 12 });
}
