/**
 * Brings a walker onto the zero of a followed series.
 *
 * @module
 */
import type { Walker } from "./series/walker.ts";

/** Zero of a continuous f between 0 and h, f(0) and f(h) of opposite sign: bisection guarded secant. */
export function zeroBetween(f: (h: number) => number, h: number): number {
  let [a, fa, b] = [0, f(0), h], fb = f(h);
  for (let i = 0; i < 200; i++) {
    const secant = a - fa * (b - a) / (fb - fa), middle = a + (b - a) / 2;
    const x = i % 3 < 2 && secant > Math.min(a, b) && secant < Math.max(a, b) ? secant : middle;
    if (x === a || x === b || Math.abs(b - a) <= 4e-16 * Math.abs(x)) return x;
    const fx = f(x);
    if (fx === 0) return x;
    if (fx > 0 === fa > 0) [a, fa] = [x, fx];
    else [b, fb] = [x, fx];
  }
  return a;
}

/**
 * Moves an expanded walker to the zero of `name` that lies within the step h, then re-expands there and
 * corrects by Newton steps until the correction no longer counts in the walker's arithmetic.
 *
 * @param walker An expanded walker.
 * @param name Followed series that changes sign between here and h.
 * @param h Step, at most the safe one.
 * @param followed Series that must be accurate.
 * @param taken Called with each step before it is taken.
 */
export function land<T>(
  walker: Walker<T>,
  name: string,
  h: number,
  followed: readonly string[],
  taken: (h: number) => void,
): void {
  const first = zeroBetween((x) => walker.series(name, x), h);
  taken(first);
  walker.advance(first);
  const size = Math.abs(walker.arithmetic.toNumber(walker.time())) + Math.abs(h);
  for (let i = 0; i < 6; i++) {
    const step = walker.expand(followed);
    const correction = -walker.series(name, 0) / walker.slope(name);
    if (!(Math.abs(correction) < step) || Math.abs(correction) < walker.arithmetic.epsilon * size) {
      return;
    }
    walker.advance(correction);
    if (Math.abs(correction) < 1e-3 * walker.arithmetic.epsilon * size) return;
  }
}
