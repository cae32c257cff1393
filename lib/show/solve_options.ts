/**
 * Options of a single solution, typed so that a combination which no table may have does not compile, and
 * checked again when it runs.
 *
 * @module
 */
import { PARAMETER_COLUMNS } from "../batch/columns.ts";
import { type Fault, quoted } from "../batch/fault.ts";
import { nearest } from "../batch/nearest.ts";
import { readRow, type TableRow } from "../batch/row_reader.ts";

/** None of the options of a group. */
export type Absent<T> = { readonly [K in keyof T]?: never };
/** One of two groups of options and none of the other. */
export type Either<A, B> = (A & Absent<B>) | (B & Absent<A>);

/** kappa = N/12, or the number N of conformal scalars. */
export type MatterOptions = Either<{ readonly kappa: number }, { readonly nScalars: number }>;
/** Bath temperature over the natural one, or its difference from 1. */
export type BathOptions = Either<
  { readonly bathRatio: number },
  { readonly bathRatioMinusOne: number }
>;
/** Mass M, see the conventions page. */
export type MassOption = { readonly mass: number };
/** m minus its critical value, m = M/lambda. */
export type AboveOption = { readonly massAboveCritical: number };
/** Dilaton at the horizon; swave: horizon radius. */
export type HorizonOption = { readonly horizonDilaton: number };
/** Areal radius of the cavity wall. */
export type WallOption = { readonly wallRadius: number };
/** Scale of the linear dilaton. @default 1 */
export type ScaleOption = { readonly lambda?: number };
/** Relative tolerance on the locus columns. @default 1e-10 */
export type ToleranceOption = { readonly tolerance?: number };

/** State with what fixes the solution in it: `Regular` in the state with a regular horizon. */
export type StateOptions<Any, Regular> =
  | { readonly state: "boulware" } & Any
  | { readonly state: "thermal" } & Any & BathOptions
  | { readonly state: "hartle-hawking" } & Regular;
/** The states of the solvable family. */
export type FamilyOptions = StateOptions<
  Either<MassOption, AboveOption>,
  Either<Either<MassOption, AboveOption>, HorizonOption>
>;
/** Models with a linear-dilaton far region; `a` in [0, 2] is the family parameter. */
export type LinearDilatonOptions =
  & ScaleOption
  & (
    | { readonly model: "cghs" } & StateOptions<MassOption, Either<MassOption, HorizonOption>>
    | { readonly model: "rst" | "bpp" } & FamilyOptions
    | { readonly model: "solvable"; readonly a: number } & FamilyOptions
  );
/** Spherically reduced Einstein gravity, G = 1. */
export type SWaveOptions =
  & { readonly model: "swave" }
  & (
    | { readonly state: "boulware" } & MassOption
    | { readonly state: "thermal" } & MassOption & BathOptions & WallOption
    | { readonly state: "hartle-hawking" } & Either<MassOption, HorizonOption> & WallOption
  );

/** Fields of four dimensions: at least one number above 0; `beta` depends on the scheme. */
export type AnomalyOptions =
  & {
    readonly model: "anomaly4d";
    readonly state: "boulware";
    readonly realScalars?: number;
    readonly diracSpinors?: number;
    readonly vectors?: number;
    readonly beta: number;
  }
  & MassOption;

/** What a single solution is asked for: the columns of a parameter table in camel case. */
export type SolveOptions =
  & ToleranceOption
  & (
    | MatterOptions & (LinearDilatonOptions | SWaveOptions)
    | AnomalyOptions & Absent<{ kappa: 0; nScalars: 0 }>
  );

/** Name of a column as an option. */
export const camel = (column: string): string =>
  column.replace(/_([a-z])/g, (_, c) => c.toUpperCase());
const COLUMN_OF = new Map(
  ["model", "state", ...PARAMETER_COLUMNS.map((column) => column.name)].map((c) => [camel(c), c]),
);
/** Option names in a sentence that speaks of columns. */
const inOptions = (text: string): string =>
  text.replace(/[a-z]+(?:_[a-z]+)+/g, camel).replaceAll("must be empty", "must be absent");

/** Options that cannot be solved; nothing was run. */
export class OptionsError extends RangeError {
  /**
   * Makes the error.
   *
   * @param faults every fault, one line each
   */
  constructor(faults: readonly string[]) {
    const count = `${faults.length} fault${faults.length === 1 ? "" : "s"}`;
    super(`Cannot solve as the options have ${count}:\n${faults.join("\n")}`);
    this.name = "OptionsError";
  }
}

/**
 * Checks options as a row of a parameter table is checked.
 *
 * @param options options
 * @returns the row
 * @throws {OptionsError} with every fault; unknown names with the nearest right one
 */
export function rowOf(options: SolveOptions): TableRow {
  const cells = new Map<string, string>();
  const faults: string[] = [];
  for (const [name, value] of Object.entries(options as unknown as Record<string, unknown>)) {
    if (value === undefined) continue;
    const column = COLUMN_OF.get(name);
    if (column === undefined) {
      const names = [...COLUMN_OF.keys()];
      faults.push(`${name}: must be one of ${names.join(", ")} (nearest: ${nearest(name, names)})`);
    } else if (typeof value === "number" || column === "model" || column === "state") {
      cells.set(column, String(value));
    } else {
      faults.push(`${name}: must be a number: current value is ${quoted(String(value))}`);
    }
  }
  const told = (fault: Fault): string => `${camel(fault.column ?? "")}: ${inOptions(fault.text)}`;
  const { row, faults: found } = readRow({
    line: 1,
    text: (column) => column === "case" ? "solution" : cells.get(column) ?? "",
    has: () => true,
  });
  faults.push(...found.map(told));
  if (faults.length > 0 || row === undefined) throw new OptionsError(faults);
  return row;
}
