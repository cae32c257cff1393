/**
 * What a results row repeats of its inputs: given numbers are exact, and the bath ratio and its difference
 * from one follow from each other up to one rounding.
 *
 * @module
 */
import type { Bounded, NumericColumn } from "../observe/result.ts";
import type { TableRow } from "./row_reader.ts";

/**
 * A sum of two doubles with its rounding error, which is itself a double (Knuth, The Art of Computer
 * Programming 2, section 4.2.2, Theorem B).
 *
 * @param x First summand.
 * @param y Second summand.
 * @returns The rounded sum and the absolute rounding error.
 */
export function boundedSum(x: number, y: number): Bounded {
  const value = x + y, y1 = value - x;
  return { value, error: Math.abs((x - (value - y1)) + (y - y1)) };
}

/**
 * Numeric columns that the row's inputs fix.
 *
 * @param row A row of the parameter table.
 * @returns Mass and bath columns that were given, with bounds; others are absent.
 */
export function echoedNumbers(row: TableRow): Partial<Record<NumericColumn, Bounded>> {
  const { mass, bathRatioMinusOne } = row.input;
  const numbers: Partial<Record<NumericColumn, Bounded>> = {};
  if (mass !== undefined) numbers.mass = { value: mass, error: 0 };
  if (row.bathRatio !== undefined) {
    numbers.bath_ratio = { value: row.bathRatio, error: 0 };
    numbers.bath_ratio_minus_one = boundedSum(row.bathRatio, -1);
  } else if (bathRatioMinusOne !== undefined) {
    numbers.bath_ratio = boundedSum(bathRatioMinusOne, 1);
    numbers.bath_ratio_minus_one = { value: bathRatioMinusOne, error: 0 };
  }
  return numbers;
}
