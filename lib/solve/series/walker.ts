/**
 * A point that moves along a solution by Taylor steps. The driver that decides where to go sees only this
 * face, so the same decisions are taken in every arithmetic.
 *
 * @module
 */
import type { Arithmetic } from "../arithmetic/arithmetic.ts";

/** A moving point of one system, in one arithmetic. */
export interface Walker<T> {
  /** Its arithmetic. */
  readonly arithmetic: Arithmetic<T>;
  /** Present unit of the independent variable, a power of two. */
  readonly unit: number;
  /** Puts the point at t with unknowns x (in the program's order). */
  place(t: T, x: readonly T[]): void;
  /** Independent variable. */
  time(): T;
  /** Unknowns, in the program's order. */
  state(): readonly T[];
  /**
   * Expands all followed series at the point.
   *
   * @param followed Series that, besides the unknowns, must be accurate over the step.
   * @returns Largest safe step (positive; Infinity for a polynomial, NaN if the point is singular).
   */
  expand(followed: readonly string[]): number;
  /** Value of a followed series at distance h from the point, rounded to double. */
  series(name: string, h: number): number;
  /** Taylor coefficient of order k of a followed series at the point. */
  coefficient(name: string, k: number): T;
  /** First derivative of a followed series at the point, rounded to double. */
  slope(name: string): number;
  /** Moves the point by h (at most the safe step), exactly this double. */
  advance(h: number): void;
  /** Values of the program's outputs at the point. */
  outputs(): Readonly<Record<string, T>>;
}

/** Relative size that the first neglected term may have, and the floors below which an unknown counts as this large. */
export interface Accuracy {
  /** Order of the series. */
  readonly order: number;
  /** Relative size of the last term kept. */
  readonly tolerance: number;
}

/** Twice the distance at which the tangent of a falling series reaches zero. */
export function reach<T>(walker: Walker<T>, name: string, now: number): number {
  const slope = walker.slope(name);
  return slope > 0 ? Math.min(2 * now / slope, 1e300) : 1e300;
}
