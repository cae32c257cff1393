/**
 * From a number in two arithmetics to a double with an absolute error bound.
 *
 * The published number is the double-double one rounded to double: its leading part hi. Its error has three
 * sources, added up:
 *
 * - rounding to double: |lo|, known;
 * - the double-double run's own truncation, start and round-off, all below 2^-98 of each intermediate
 *   (settings, double_double.ts). What the problem makes of errors of that size is what it makes of
 *   double round-off (2^-53), which the double run shows: |double - hi| is that amplification times
 *   2^-53. So 2^-40 |double - hi| leaves a margin of 2^5 over the ratio 2^-45;
 * - a floor of 2^-70 of the quantity's natural size, for the case that the double run was exact by luck.
 *
 * @module
 */
import type { DoubleDouble } from "../solve/arithmetic/double_double.ts";
import type { Bounded } from "./result.ts";

/** How two runs are compared. */
export interface Comparison {
  /** Ratio of the wide run's error to the difference of the runs, with its margin. */
  readonly ratio: number;
  /** Floor, in units of the natural size. */
  readonly floor: number;
}

/** A double run beside a double-double one. */
export const AGAINST_DOUBLE: Comparison = { ratio: 2 ** -40, floor: 2 ** -70 };

/** Two double-double runs of different order and tolerance: their difference itself, with a margin. */
export const AGAINST_WIDE: Comparison = { ratio: 64, floor: 2 ** -70 };

/**
 * The rounded number and its bound.
 *
 * @param wide Double-double result.
 * @param other Result of the other run, as a difference from `wide`.
 * @param size Natural size of the quantity.
 * @param c How they are compared.
 */
export function bounded(
  wide: DoubleDouble,
  difference: number,
  size: number,
  c: Comparison,
): Bounded {
  if (!Number.isFinite(wide.hi)) return { value: wide.hi };
  const error = Math.abs(wide.lo) + c.ratio * Math.abs(difference) + c.floor * size;
  return { value: wide.hi, error: error * (1 + 2 ** -50) };
}
