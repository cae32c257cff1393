/**
 * Everything that can change a number, besides the code itself; part of every stamp.
 *
 * @module
 */

/** Settings of the solver. */
export const SETTINGS = {
  /** Double precision: order of the series, relative size of the last term kept. */
  double: { order: 24, tolerance: 1e-18, start: 8 },
  /** Double-double precision. */
  doubleDouble: { order: 40, tolerance: 1e-33, start: 17 },
  /** Double-double with other truncation, the check of rows where double precision fails. */
  check: { order: 34, tolerance: 1e-30, start: 14 },
  /** Far start: e^u (or r) in units of the largest scale of the problem. */
  far: { linearDilaton: 128, spherical: 32 },
  /** Steps after which a row is given up. */
  steps: 6000,
  /** Outward runs and match rounds of a Hartle-Hawking search. */
  rounds: 60,
  /** e-folds of -g_tt followed behind a throat. */
  behind: 60,
} as const;
