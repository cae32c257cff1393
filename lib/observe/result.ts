/**
 * The record of one solved, refused or failed row. Failure of the physics is a value here, never an
 * exception.
 *
 * @module
 */

/** Kinds of static solution, a closed list. */
export const KINDS = [
  "horizon",
  "extremal-horizon",
  "throat",
  "semi-infinite-throat",
  "naked-singularity",
  "marginal",
  "vacuum",
  "constant-dilaton",
  "singular-horizon",
  "undecided",
] as const;
/** One of {@linkcode KINDS}. */
export type Kind = (typeof KINDS)[number];

/** What ends the inner side, a closed list. */
export const INNER_ENDS = [
  "null-singularity",
  "timelike-singularity",
  "spacelike-singularity",
  "asymptotic-region",
  "not-followed",
  "undecided",
] as const;
/** One of {@linkcode INNER_ENDS}. */
export type InnerEnd = (typeof INNER_ENDS)[number];

/** Numeric columns of a result, each with an error column `<name>_err`. */
export const NUMERIC_COLUMNS = [
  "mass",
  "bath_ratio",
  "bath_ratio_minus_one",
  "dilaton_locus",
  "minus_gtt_locus",
  "log10_minus_gtt_locus",
  "curvature_locus",
  "temperature_bath",
  "temperature_horizon",
  "entropy_classical",
] as const;
/** One of {@linkcode NUMERIC_COLUMNS}. */
export type NumericColumn = (typeof NUMERIC_COLUMNS)[number];

/** A number with an absolute error bound; `value` may be infinite (then `error` is absent), never NaN. */
export interface Bounded {
  /** The number. */
  readonly value: number;
  /** Absolute bound that the true error does not exceed; 0 for inputs and exact numbers. */
  readonly error?: number;
}

/** Result of one row. */
export interface RowResult {
  /** solved; refused (the physics says no); failed (the solver gave up). */
  readonly outcome: "solved" | "refused" | "failed";
  /** `code: prose`, empty for a plain solved row. */
  readonly reason: string;
  /** Kind of solution; absent unless solved. */
  readonly kind?: Kind;
  /** Numeric columns that apply to this row. */
  readonly numbers: Readonly<Partial<Record<NumericColumn, Bounded>>>;
  /** What ends the inner side; absent unless solved with a locus. */
  readonly innerEnd?: InnerEnd;
  /** `inside`, or codes joined by `;`; absent unless solved. */
  readonly validity?: string;
  /** Event values that decided the kind, with bounds (kept in run.json). */
  readonly evidence: Readonly<Record<string, Bounded>>;
}

/** Columns of a profile file, in order. */
export const PROFILE_COLUMNS = [
  "sigma",
  "proper_distance",
  "dilaton",
  "rho",
  "minus_gtt",
  "curvature",
  "energy_density",
  "pressure",
  "residual_1",
  "residual_2",
  "residual_c",
] as const;
/** One of {@linkcode PROFILE_COLUMNS}. */
export type ProfileColumn = (typeof PROFILE_COLUMNS)[number];

/** A profile: equally long columns, from outside inwards. */
export type Profile = Readonly<Record<ProfileColumn, Float64Array>>;
