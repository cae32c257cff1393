/**
 * Double precision as an {@linkcode Arithmetic}.
 *
 * @module
 */
import type { Arithmetic } from "./arithmetic.ts";

/** IEEE double precision; exp, expm1, log, log1p and sqrt are the correctly rounded ones of the runtime. */
export const double: Arithmetic<number> = {
  epsilon: 2 ** -53,
  from: (x) => x,
  ratio: (p, q) => Number(p) / Number(q),
  toNumber: (x) => x,
  add: (a, b) => a + b,
  sub: (a, b) => a - b,
  mul: (a, b) => a * b,
  div: (a, b) => a / b,
  neg: (a) => -a,
  sqrt: Math.sqrt,
  exp: Math.exp,
  expm1: Math.expm1,
  log: Math.log,
  log1p: Math.log1p,
  sqrt1pm1: (a) => a / (1 + Math.sqrt(1 + a)),
  pi: Math.PI,
};
