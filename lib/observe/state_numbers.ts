/**
 * Columns that the state alone fixes.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import { type DoubleDouble, doubleDouble as A } from "../solve/arithmetic/double_double.ts";
import type { Bounded, NumericColumn } from "./result.ts";

const rounded = (x: DoubleDouble): Bounded => ({
  value: x.hi,
  error: Math.abs(x.lo) + 2 ** -98 * Math.abs(x.hi),
});

/** Bath ratio and bath temperature of the states whose bath is an input; absent for Hartle-Hawking. */
export function stateNumbers(input: RowInput): Partial<Record<NumericColumn, Bounded>> {
  if (input.state === "hartle-hawking") return {};
  if (input.state === "boulware") {
    const zero = { value: 0, error: 0 };
    return {
      bath_ratio: zero,
      bath_ratio_minus_one: { value: -1, error: 0 },
      temperature_bath: zero,
    };
  }
  const excess = A.from(input.bathRatioMinusOne!), tau = A.add(A.from(1), excess);
  const given = { bath_ratio: rounded(tau), bath_ratio_minus_one: { value: excess.hi, error: 0 } };
  if (input.lambda === undefined) return given; // spherical: the wall's temperature comes with the solution
  const temperature = A.div(A.mul(A.from(input.lambda), tau), A.mul(A.from(2), A.pi)); // tau lambda/2pi
  return { ...given, temperature_bath: rounded(temperature) };
}
