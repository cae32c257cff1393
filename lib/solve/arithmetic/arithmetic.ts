/**
 * What the start series, horizon data and closed formulas need of a number system, so that one text of
 * each serves every precision.
 *
 * @module
 */

/** A number system over values of type T. */
export interface Arithmetic<T> {
  /** Relative size of one rounding. */
  readonly epsilon: number;
  /** The exact double x. */
  from(x: number): T;
  /** The exact ratio p/q, rounded once. */
  ratio(p: bigint, q: bigint): T;
  /** The nearest double. */
  toNumber(x: T): number;
  add(a: T, b: T): T;
  sub(a: T, b: T): T;
  mul(a: T, b: T): T;
  div(a: T, b: T): T;
  neg(a: T): T;
  sqrt(a: T): T;
  exp(a: T): T;
  expm1(a: T): T;
  log(a: T): T;
  log1p(a: T): T;
  /** sqrt(1 + a) - 1 without cancellation. */
  sqrt1pm1(a: T): T;
  /** The circle constant. */
  readonly pi: T;
}
