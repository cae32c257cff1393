/**
 * Seeded random points for numeric witnesses: the same seed gives the same points on every machine.
 *
 * @module
 */

/** Open interval of admissible values. */
export type Range = readonly [low: number, high: number];

/** Ranges by name; names without one are drawn from (0.3, 2.3). */
export type Ranges = Readonly<Record<string, Range>>;

/** The name that is a constant and never drawn. */
export const PI = "pi";

const DEFAULT: Range = [0.3, 2.3]; // positive, of order one, away from 0 where quotients blow up

/**
 * A seeded stream of uniform doubles in (0, 1).
 *
 * @param seed Any 32-bit integer. Generator: mulberry32 (public domain, T. Ettinger).
 * @example The same seed, the same numbers
 * ```ts
 * import { uniform } from "@backstamp/backstamp";
 * if (uniform(7)() !== uniform(7)()) throw new Error("not reproducible");
 * ```
 */
export function uniform(seed: number): () => number {
  let a = seed >>> 0;
  const next = () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = Math.imul(a ^ (a >>> 15), a | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return (t ^ (t >>> 14)) >>> 0;
  };
  return () => (next() + 0.5) / 4294967296;
}

/**
 * A stream of random points.
 *
 * @param list Names, in the order in which values are drawn; `pi` is none of them.
 * @param seed Seed of the stream.
 * @param ranges Ranges of names; names without one are drawn from (0.3, 2.3).
 * @returns A function giving the next point, values as decimal texts.
 */
export function points(
  list: readonly string[],
  seed: number,
  ranges: Ranges = {},
): () => Record<string, string> {
  const draw = uniform(seed);
  return () =>
    Object.fromEntries(
      list.filter((n) => n !== PI).map((n) => {
        const [low, high] = ranges[n] ?? DEFAULT;
        return [n, String(low + (high - low) * draw())];
      }),
    );
}
