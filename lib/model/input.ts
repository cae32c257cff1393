/**
 * What one row of a parameter table asks for, after validation and with defaults filled in.
 *
 * @module
 */

/** Models of the catalogue. */
export const MODEL_NAMES = ["cghs", "rst", "bpp", "solvable", "swave", "anomaly4d"] as const;
/** One of {@linkcode MODEL_NAMES}. */
export type ModelName = (typeof MODEL_NAMES)[number];
/** Models of the catalogue: two dimensions, H, K and V. */
export type DilatonName = Exclude<ModelName, "anomaly4d">;
/** Models whose dilaton is an areal radius, in Planck units. */
export const RADIAL_MODELS: readonly ModelName[] = ["swave", "anomaly4d"];

/** Quantum states of the matter fields. */
export const STATE_NAMES = ["boulware", "thermal", "hartle-hawking"] as const;
/** One of {@linkcode STATE_NAMES}. */
export type StateName = (typeof STATE_NAMES)[number];

/**
 * One validated row: parsed doubles in units hbar = c = G = k_B = 1. A parameter that the row's model or
 * state does not have is absent. Exactly one of `mass`, `massAboveCritical`, `horizonDilaton` is present.
 */
export interface RowInput {
  /** Model name. */
  readonly model: ModelName;
  /** State name. */
  readonly state: StateName;
  /** Anomaly coefficient N/12, positive; 0 for anomaly4d, whose fields are counted below. */
  readonly kappa: number;
  /** Linear-dilaton scale, positive (inverse length); linear-dilaton models only. */
  readonly lambda?: number;
  /** Mass M (see the conventions page); any finite number. */
  readonly mass?: number;
  /** m minus its critical value, m = M/lambda; solvable family only. */
  readonly massAboveCritical?: number;
  /** Dilaton (swave: areal radius) at the horizon; Hartle-Hawking only. */
  readonly horizonDilaton?: number;
  /** Bath ratio minus one; thermal only, at least -1. */
  readonly bathRatioMinusOne?: number;
  /** Family parameter in [0, 2]; model `solvable` only. */
  readonly a?: number;
  /** Areal radius of the cavity wall; swave with a bath only. */
  readonly wallRadius?: number;
  /** Conformal real scalars; anomaly4d only. */
  readonly realScalars?: number;
  /** Dirac spinors, halves are Weyl or Majorana spinors; anomaly4d only. */
  readonly diracSpinors?: number;
  /** Massless vectors; anomaly4d only. */
  readonly vectors?: number;
  /** Coefficient of box R in 16 pi^2 <T>, exactly this double; anomaly4d only. */
  readonly beta?: number;
  /** Relative tolerance on every numeric locus column. */
  readonly tolerance: number;
}
