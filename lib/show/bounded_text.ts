/**
 * A number with its bound as text.
 *
 * @module
 */
import type { Bounded } from "../observe/result.ts";

/**
 * Writes a number to the last digit that its bound leaves standing, with the bound.
 *
 * @param number value and absolute bound
 * @returns such as `0.1442 ± 0.0003`; no bound where the number is exact; `diverges` with its sign where it
 * is infinite
 * @example
 * ```ts
 * import { boundedText } from "@backstamp/backstamp";
 * if (boundedText({ value: 0.14416, error: 0.00031 }) !== "0.14416 ± 3.1e-4") throw new Error();
 * ```
 */
export function boundedText({ value, error = 0 }: Bounded): string {
  if (!Number.isFinite(value)) return value > 0 ? "diverges to +∞" : "diverges to -∞";
  if (error === 0) return String(value);
  const bound = error < 0.01 ? error.toExponential(1) : error.toPrecision(2);
  const digits = Math.floor(Math.log10(Math.abs(value) || error)) - Math.floor(Math.log10(error));
  // two digits of the bound; with 17 or more the shortest text that reads back to the double says it all
  const text = value === 0 || digits + 2 >= 17
    ? String(value)
    : value.toPrecision(Math.max(2, digits + 2));
  return `${text} ± ${bound}`;
}
