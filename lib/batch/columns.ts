/**
 * Columns of a parameter table: meaning, unit, range, and which models and states have them. Data only:
 * the reader, the grid writer and the metadata all read this list.
 *
 * @module
 */
import { MODEL_NAMES, type ModelName, STATE_NAMES, type StateName } from "../model/input.ts";

/** Models with a linear-dilaton far region. */
export const LINEAR_DILATON: readonly ModelName[] = ["cghs", "rst", "bpp", "solvable"];
/** Models of the exactly solvable family. */
export const SOLVABLE_FAMILY: readonly ModelName[] = ["rst", "bpp", "solvable"];
/** Models in two dimensions, whose matter is measured by kappa. */
export const DILATON_MODELS: readonly ModelName[] = [...LINEAR_DILATON, "swave"];
/** Models that exist in one state only. */
export const ONLY_STATE: Readonly<Partial<Record<ModelName, StateName>>> = {
  anomaly4d: "boulware",
};
/** Columns that count the fields of anomaly4d; 0 where empty. */
export const FIELD_COLUMNS = ["real_scalars", "dirac_spinors", "vectors"] as const;
/** States with radiation at infinity or at the wall. */
export const BATH_STATES: readonly StateName[] = ["thermal", "hartle-hawking"];

/** One numeric parameter of a row. */
export interface ParameterColumn {
  /** Name in the header. */
  readonly name: string;
  /** One sentence. */
  readonly meaning: string;
  /** Unit with hbar = c = G = k_B = 1. */
  readonly unit: string;
  /** Models that have it. */
  readonly models: readonly ModelName[];
  /** States that have it. */
  readonly states: readonly StateName[];
  /** The range in words, after "must be". */
  readonly range: string;
  /** Whether a finite number lies in the range. */
  readonly holds: (value: number) => boolean;
}

const everywhere = { models: MODEL_NAMES, states: STATE_NAMES } as const;
const finite = { range: "a finite number", holds: () => true } as const;
const positive = { range: "> 0", holds: (v: number) => v > 0 } as const;

const fields = { models: ["anomaly4d"], states: STATE_NAMES } as const;
const count = (parts: 1 | 2) =>
  ({
    range: `a ${parts === 1 ? "whole" : "whole or half"} number from 0 to 500000`,
    holds: (v: number) => v >= 0 && v <= 500_000 && Number.isInteger(parts * v),
  }) as const;

/** Numeric parameter columns; beside them a table has `case`, `model` and `state`. */
export const PARAMETER_COLUMNS: readonly ParameterColumn[] = [
  {
    name: "kappa",
    meaning: "Anomaly coefficient N/12",
    unit: "1",
    models: DILATON_MODELS,
    states: STATE_NAMES,
    ...positive,
  },
  {
    name: "n_scalars",
    meaning: "Number N of conformal scalars, kappa = N/12; need not be whole",
    unit: "1",
    models: DILATON_MODELS,
    states: STATE_NAMES,
    ...positive,
  },
  {
    name: "lambda",
    meaning: "Scale of the linear dilaton; 1 where empty",
    unit: "1/length",
    models: LINEAR_DILATON,
    states: STATE_NAMES,
    ...positive,
  },
  {
    name: "mass",
    meaning:
      "Mass M = lambda m; swave: Misner-Sharp mass, at the wall where there is one; anomaly4d: at infinity",
    unit: "mass",
    ...everywhere,
    ...finite,
  },
  {
    name: "mass_above_critical",
    meaning: "m minus its critical value, m = M/lambda",
    unit: "1",
    models: SOLVABLE_FAMILY,
    states: STATE_NAMES,
    ...finite,
  },
  {
    name: "horizon_dilaton",
    meaning: "Dilaton at the horizon; swave: horizon radius",
    unit: "1; swave: length",
    models: MODEL_NAMES,
    states: ["hartle-hawking"],
    ...finite,
  },
  {
    name: "bath_ratio",
    meaning: "Bath temperature over the natural one",
    unit: "1",
    models: MODEL_NAMES,
    states: ["thermal"],
    range: ">= 0",
    holds: (v) => v >= 0,
  },
  {
    name: "bath_ratio_minus_one",
    meaning: "Bath ratio minus one, for baths so near 1 that bath_ratio has lost the difference",
    unit: "1",
    models: MODEL_NAMES,
    states: ["thermal"],
    range: ">= -1",
    holds: (v) => v >= -1,
  },
  {
    name: "a",
    meaning: "Parameter of the exactly solvable family",
    unit: "1",
    models: ["solvable"],
    states: STATE_NAMES,
    range: "in [0, 2]",
    holds: (v) => v >= 0 && v <= 2,
  },
  {
    name: "wall_radius",
    meaning: "Areal radius of the cavity wall",
    unit: "length",
    models: ["swave"],
    states: BATH_STATES,
    ...positive,
  },
  {
    name: "real_scalars",
    meaning: "Number of conformal real scalars; 0 where empty",
    unit: "1",
    ...fields,
    ...count(1),
  },
  {
    name: "dirac_spinors",
    meaning:
      "Number of massless Dirac spinors, a half for a Weyl or Majorana spinor; 0 where empty",
    unit: "1",
    ...fields,
    ...count(2),
  },
  {
    name: "vectors",
    meaning: "Number of massless vectors; 0 where empty",
    unit: "1",
    ...fields,
    ...count(1),
  },
  {
    name: "beta",
    meaning:
      "Coefficient of box R in 16 pi^2 <T>; depends on the scheme: (N0 + 6 N_D - 18 N1)/180 by the zeta function, " +
      "+ 12 N1 in dimensional regularisation",
    unit: "1",
    ...fields,
    range: "at most 1e6 in size",
    holds: (v) => Math.abs(v) <= 1e6,
  },
  {
    name: "tolerance",
    meaning: "Relative tolerance on every numeric locus column; 1e-10 where empty",
    unit: "1",
    ...everywhere,
    range: "> 0 and < 1",
    holds: (v) => v > 0 && v < 1,
  },
];

/** Every column a parameter table may have. */
export const TABLE_COLUMNS: readonly string[] = [
  "case",
  "model",
  "state",
  ...PARAMETER_COLUMNS.map((c) => c.name),
];

/** Columns of which a row gives exactly one (of those its model and state have). */
export const EXCLUSIVE: readonly (readonly string[])[] = [
  ["kappa", "n_scalars"],
  ["mass", "mass_above_critical", "horizon_dilaton"],
  ["bath_ratio", "bath_ratio_minus_one"],
];

/** Columns that a row always gives if its model and state have them. */
export const ALWAYS: readonly string[] = ["a", "wall_radius", "beta"];

/** Defaults of columns that may stay empty. */
export const DEFAULTS: Readonly<Record<"lambda" | "tolerance", number>> = {
  lambda: 1,
  tolerance: 1e-10,
};
