/**
 * How far two bounded numbers lie apart, in units of the sum of their bounds.
 *
 * @module
 */
import type { Bounded } from "../../observe/result.ts";

/** A sum as the nearest double and what rounding left (Knuth 2, section 4.2.2, Theorem B). */
function exactSum(x: number, y: number): readonly [sum: number, rest: number] {
  const sum = x + y, y1 = sum - x;
  return [sum, (x - (sum - y1)) + (y - y1)];
}

/**
 * The distance of two numbers over the sum of their absolute bounds. It is above 1 exactly if the two
 * intervals have no point in common: no true value can then lie in both. Zeros of either sign are one zero.
 *
 * @param a A number; infinite where the quantity diverges. A bound that is absent counts as 0.
 * @param b Another.
 * @returns 0 for equal numbers, infinity where they differ and are exact, or only one diverges.
 */
export function excess(a: Bounded, b: Bounded): number {
  if (a.value === b.value) return 0;
  if (!Number.isFinite(a.value) || !Number.isFinite(b.value)) return Infinity;
  const low = Math.min(a.value, b.value), high = Math.max(a.value, b.value);
  return ratio([high, -low], [a.error ?? 0, b.error ?? 0]);
}

type Pair = readonly [number, number];

/** The quotient of two sums of nonnegative size, rounded so that it stays on its side of 1. */
function ratio(distance: Pair, bounds: Pair): number {
  const [d, dRest] = exactSum(...distance), [s, sRest] = exactSum(...bounds);
  if (d === Infinity || s === Infinity) { // beyond the largest double: half of each is not
    const half = ([x, y]: Pair): Pair => [x / 2, y / 2];
    return ratio(half(distance), half(bounds));
  }
  const beyond = d > s || (d === s && dRest > sRest);
  return beyond ? Math.max(d / s, 1 + Number.EPSILON) : d / s;
}
