/**
 * The nearest right name for a mistyped one, by edit distance.
 *
 * @module
 */
import { closest } from "fastest-levenshtein";

/**
 * Finds the name with the least edit distance (Levenshtein 1966), ignoring case.
 *
 * @param word What was typed.
 * @param names The right names, at least one; the first of equally near ones wins.
 * @returns The nearest of `names`.
 * @throws {RangeError} if there are no names.
 */
export function nearest(word: string, names: readonly string[]): string {
  if (names.length === 0) {
    throw new RangeError("Cannot find the nearest name as there must be one: current count is 0");
  }
  const lower = names.map((n) => n.toLowerCase());
  return names[lower.indexOf(closest(word.toLowerCase(), lower))]!;
}
