/**
 * Results shown: solutions by hand, finished runs in notebooks, and the notebooks themselves.
 *
 * @module
 */
export { auditClaims, auditModel } from "./audit.ts";
export { boundedText } from "./bounded_text.ts";
export {
  type HierarchyOptions,
  type HierarchyRow,
  RedshiftHierarchy,
  redshiftHierarchy,
} from "./hierarchy.ts";
export { LedgerView } from "./ledger_view.ts";
export { mathMl } from "./math.ts";
export { compareRuns, type RunComparison } from "./compare_runs.ts";
export { DISPLAY, DISPLAY_LIMIT, type Displayable, displayable } from "./notebook/display.ts";
export * from "./notebook/document.ts";
export * from "./notebook/kernelspec.ts";
export { withProgress } from "./notebook/progress.ts";
export { reportStrayErrors } from "./notebook/stray_errors.ts";
export { numberOf, readRun, type Run } from "./run_reader.ts";
export * from "./run_tables.ts";
export * from "./solution.ts";
export { solve } from "./solve.ts";
export { type ChangedParameters, type ParameterOption, solveAgain } from "./solve_again.ts";
export {
  type AboveOption,
  type Absent,
  type AnomalyOptions,
  type BathOptions,
  type Either,
  type FamilyOptions,
  type HorizonOption,
  type LinearDilatonOptions,
  type MassOption,
  type MatterOptions,
  OptionsError,
  type ScaleOption,
  type SolveOptions,
  type StateOptions,
  type SWaveOptions,
  type ToleranceOption,
  type WallOption,
} from "./solve_options.ts";
export type { ResultCells } from "../batch/result_row.ts";
export type { ColumnChange } from "../batch/comparison/column_change.ts";
export type {
  ComparedTable,
  Comparison,
  ComparisonOptions,
} from "../batch/comparison/comparison.ts";
export { type Origin, STAMP_PARTS, type StampPart } from "../batch/comparison/origin.ts";
export { type Difference, ROW_CHANGES, type RowChange } from "../batch/comparison/row_change.ts";
export { ComparisonError } from "../batch/comparison/comparison_error.ts";
export type { ComparedSource, Inputs, RowsInMemory } from "../batch/comparison/source.ts";
export type { OnDifference } from "../batch/comparison/tally.ts";
export type { CoreIdentity } from "../batch/core.ts";
export type { RunIdentity } from "../batch/record.ts";
