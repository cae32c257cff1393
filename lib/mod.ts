/**
 * Back-reaction of quantum matter on static black holes: solve a row, audit an expression, read a run.
 *
 * @example A Boulware state opens a throat
 * ```ts
 * import { solve } from "@backstamp/backstamp";
 * const hole = await solve({ model: "rst", state: "boulware", kappa: 1, mass: 10 });
 * if (hole.kind !== "throat") throw new Error(hole.kind);
 * ```
 *
 * @module
 */
export * from "./expr/tree.ts";
export * from "./expr/parse.ts";
export type { Operation as AlgebraOperation } from "./expr/nerdamer.ts";
export { print } from "./expr/print.ts";
export { tex, texName } from "./expr/tex.ts";
export { lower, type SystemText } from "./expr/lower.ts";
export { type AlgebraOptions, differentiate, type Discarded, simplify } from "./expr/algebra.ts";
export { factor } from "./expr/factor.ts";
export { integrate } from "./expr/integrate.ts";
export type { Witness, WitnessOptions } from "./expr/verify.ts";
export type { Range, Ranges } from "./expr/points.ts";
export type { Family } from "./model/model.ts";
export { decideZero, type ZeroDecision } from "./expr/zero.ts";
export type { Operation, Program } from "./expr/program.ts";
export { type CompiledModel, compileModel } from "./model/compile.ts";
export {
  MODEL_NAMES,
  type ModelName,
  type RowInput,
  STATE_NAMES,
  type StateName,
} from "./model/input.ts";
export {
  type Bounded,
  INNER_ENDS,
  type InnerEnd,
  type Kind,
  KINDS,
  NUMERIC_COLUMNS,
  type NumericColumn,
  type Profile,
  PROFILE_COLUMNS,
  type ProfileColumn,
  type RowResult,
} from "./observe/result.ts";
export { computeRow, type RowOptions } from "./observe/row.ts";
export { THRESHOLDS, VALIDITY_CODES } from "./observe/validity.ts";
export {
  type AnomalyCoefficients,
  anomalyOf,
  BETA_SCHEMES,
  type BetaScheme,
  type FieldContent,
  SUPER_YANG_MILLS,
} from "./model/content.ts";
export {
  type BackReaction,
  backReaction,
  type Correction,
  type RadialSource,
} from "./stress/back_reaction.ts";
export {
  type ConformalFields,
  type ConformalStress,
  conformalStress,
  type StressAt,
} from "./stress/conformal_stress.ts";
export { type MinimalSphere, minimalSphere } from "./stress/minimal_sphere.ts";
export { solutionStress, type StressPlace } from "./stress/solution_stress.ts";
export type { StaticGeometry } from "./stress/geometry.ts";
export {
  closedForm,
  type ClosedFormColumn,
  type ClosedFormInput,
  type ClosedFormKind,
  type ClosedFormNumber,
  type ClosedFormResult,
} from "./solve/closed_form.ts";
export { ClaimsError, type ClaimsFile, type FileClaim } from "./audit/claims_file.ts";
export {
  type Convention,
  conventionOf,
  CONVENTIONS,
  conversion,
  QUANTITIES,
  type Quantity,
} from "./audit/conventions.ts";
export { type JudgeOptions, type VerdictName, VERDICTS } from "./audit/judge.ts";
export type { DerivedEquation, Ledger, LedgerPart, LedgerStep } from "./audit/ledger.ts";
export { SETTINGS } from "./solve/settings.ts";
export * from "./show/mod.ts";
export { derive } from "./expr/derive.ts";
export { elementary } from "./expr/elementary.ts";
export { normalIsZero, type NormalOptions } from "./expr/normal.ts";
export { points, uniform } from "./expr/points.ts";
export { compare } from "./expr/verify.ts";
export { type Axis, axisLabel } from "./show/axis.ts";
export { chosenCases, writeFigures } from "./show/figures.ts";
export type { ResultRow } from "./show/result_rows.ts";
