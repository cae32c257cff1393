/**
 * Numbers as text: the decimal grammar of tables, read to the nearest double and written in the shortest
 * form that reads back to the same double.
 *
 * @module
 */

const DECIMAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const ZERO = /^[+-]?[0.]+(?:[eE][+-]?\d+)?$/;

/**
 * Reads a decimal number.
 *
 * @param text Digits with an optional sign, point and decimal exponent; no spaces, no words.
 * @returns The nearest double, or what must hold instead of what was found.
 */
export function readNumber(text: string): number | { readonly must: string } {
  if (!DECIMAL.test(text)) {
    if (text !== text.trim()) return { must: "must be a number without spaces around it" };
    if (/^[+-]?(nan|inf|infinity)$/i.test(text)) return { must: "must be a finite number" };
    return { must: "must be a decimal number such as 10, -0.5 or 1e-12" };
  }
  const value = Number(text);
  if (!Number.isFinite(value)) {
    return { must: `must be at most ${Number.MAX_VALUE} in magnitude` };
  }
  if (value === 0) {
    if (ZERO.test(text)) return 0; // one zero only: -0 would make a second stamp for the same row
    return { must: `must be 0 or at least ${Number.MIN_VALUE} in magnitude` };
  }
  return value;
}

/**
 * Writes a number for a results table.
 *
 * @param value A number; an infinity stands for a divergent quantity.
 * @returns The shortest decimal form that reads back to the same double, `INF` or `-INF`.
 * @throws {RangeError} if the value is NaN: it is never written.
 */
export function writeNumber(value: number): string {
  if (value === Infinity) return "INF";
  if (value === -Infinity) return "-INF";
  if (Number.isNaN(value)) {
    throw new RangeError("Cannot write a number as it must not be NaN: current value is NaN");
  }
  return String(value === 0 ? 0 : value);
}

/**
 * Reads a number of a results table back.
 *
 * @param text What {@linkcode writeNumber} wrote.
 * @returns The number, or undefined for an empty cell.
 */
export function readResultNumber(text: string): number | undefined {
  if (text === "") return undefined;
  if (text === "INF") return Infinity;
  if (text === "-INF") return -Infinity;
  return Number(text);
}
