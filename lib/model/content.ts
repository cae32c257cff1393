/**
 * Field content in four dimensions, and the trace anomaly of its conformal fields,
 * <T> = (c F - a E + beta box R)/16 pi^2.
 *
 * @module
 */
import { type Num, num } from "../expr/tree.ts";

/** Numbers of conformal fields; a Weyl or Majorana spinor is half a Dirac spinor. */
export interface FieldContent {
  /** Conformally coupled real scalars. */
  readonly scalars: number;
  /** Weyl spinors; a Majorana spinor counts the same, a Dirac spinor is two. */
  readonly weyl: number;
  /** Massless vectors. */
  readonly vectors: number;
}

/** Schemes that fix the vectors' part of beta, which regularisation leaves open. */
export const BETA_SCHEMES = ["zeta", "dimensional"] as const;
/** One of {@linkcode BETA_SCHEMES}: -18/180 a vector (zeta function, heat kernel) or 12/180 (dimensional). */
export type BetaScheme = (typeof BETA_SCHEMES)[number];

/** Coefficients of the anomaly, exact. */
export interface AnomalyCoefficients {
  /** Of the Weyl tensor squared. */
  readonly c: Num;
  /** Of minus the Euler density. */
  readonly a: Num;
  /** Of box R. */
  readonly beta: Num;
}

/** Numbers of fields: whole, not negative, at most this. */
const MOST = 1_000_000;

/** What is wrong with a content, one line each. */
function faultsOf(content: FieldContent): string[] {
  const faults = Object.entries(content)
    .filter(([, n]) => !(Number.isInteger(n) && n >= 0 && n <= MOST))
    .map(([name, n]) =>
      `Cannot use the field content as ${name} must be a whole number from 0 to ${MOST}: current value is ${n}`
    );
  if (faults.length === 0 && Object.values(content).every((n) => n === 0)) {
    faults.push("Cannot use the field content as there must be a field: current number is 0");
  }
  return faults;
}

/**
 * The anomaly of a field content.
 *
 * c = (N0 + 3 N_W + 12 N1)/120, a = (2 N0 + 11 N_W + 124 N1)/720, beta = (N0 + 3 N_W + v N1)/180, v = -18 or 12
 * (M. J. Duff, Class. Quantum Grav. 11 (1994) 1387; N. D. Birrell & P. C. W. Davies, Quantum Fields in Curved Space
 * (1982), section 6.3; from memory).
 *
 * @param content Numbers of fields.
 * @param scheme What fixes the vectors' part of beta.
 * @throws {RangeError} if a number is not whole or negative, or there is no field.
 * @example Four supersymmetries: a = c
 * ```ts
 * import { anomalyOf } from "@backstamp/backstamp";
 * const { a, c } = anomalyOf({ scalars: 6, weyl: 4, vectors: 1 }, "zeta");
 * if (a.p * c.q !== c.p * a.q) throw new Error("a differs from c");
 * ```
 */
export function anomalyOf(content: FieldContent, scheme: BetaScheme): AnomalyCoefficients {
  const faults = faultsOf(content);
  if (faults.length > 0) throw new RangeError(faults.join("\n"));
  const { scalars: s, weyl: w, vectors: v } = content;
  return {
    c: num(s + 3 * w + 12 * v, 120),
    a: num(2 * s + 11 * w + 124 * v, 720),
    beta: num(s + 3 * w + (scheme === "zeta" ? -18 : 12) * v, 180),
  };
}

/** The exact rational that a double is. */
export function rationalOf(x: number): Num {
  let q = 1n;
  for (; !Number.isInteger(x); x *= 2) q *= 2n;
  return num(BigInt(x), q);
}

/** a + beta/2, which measures the leading tensor at a would-be horizon. */
export function leadingCoefficient({ a, beta }: AnomalyCoefficients): Num {
  return num(2n * a.p * beta.q + beta.p * a.q, 2n * a.q * beta.q);
}

/** The content of N = 4 super Yang-Mills theory for one generator of the gauge group; times N^2 for large N. */
export const SUPER_YANG_MILLS: FieldContent = { scalars: 6, weyl: 4, vectors: 1 };
