/**
 * Columns of the results table and of profiles: order, meaning, unit, and what an empty cell says. The
 * writers and the metadata read this list. Later columns are only appended.
 *
 * @module
 */
import { CASE_FORMAT } from "./case_name.ts";
import { MODEL_NAMES, STATE_NAMES } from "../model/input.ts";
import {
  INNER_ENDS,
  KINDS,
  NUMERIC_COLUMNS,
  type NumericColumn,
  PROFILE_COLUMNS,
  type ProfileColumn,
} from "../observe/result.ts";

/** One column of an output table. */
export interface OutputColumn {
  /** Name in the header. */
  readonly name: string;
  /** Short title for people. */
  readonly title: string;
  /** One or two sentences. */
  readonly description: string;
  /** Datatype: a double, or text with a regular expression it matches. */
  readonly datatype: "double" | { readonly format: string };
  /** Unit with hbar = c = G = k_B = 1, absent for text. */
  readonly unit?: string;
  /** What an empty cell means; absent where a cell is never empty. */
  readonly empty?: string;
}

const NO_LOCUS = "not applicable: refused, failed, or a kind without a locus";
const oneOf = (names: readonly string[]) => ({ format: names.join("|") });

type Numeric = Omit<OutputColumn, "name" | "datatype"> & { readonly unit: string };

const NUMERIC: Readonly<Record<NumericColumn, Numeric>> = {
  mass: {
    title: "Mass",
    description:
      "M = lambda m for linear-dilaton models; swave: the Misner-Sharp mass, at the wall where there is one.",
    unit: "mass",
    empty: "neither given nor found",
  },
  bath_ratio: {
    title: "Bath ratio",
    description: "Temperature of the bath over the natural temperature.",
    unit: "1",
    empty: "neither given nor found",
  },
  bath_ratio_minus_one: {
    title: "Bath ratio minus one",
    description: "Computed without cancellation.",
    unit: "1",
    empty: "neither given nor found",
  },
  dilaton_locus: {
    title: "Dilaton at the locus",
    description:
      "Dilaton phi (swave: areal radius) at the horizon, the throat or the singular end.",
    unit: "1; swave: length",
    empty: NO_LOCUS,
  },
  minus_gtt_locus: {
    title: "-g_tt at the locus",
    description:
      "1 at infinity (at the wall where there is one); 0 with error 5e-324 where it is below the smallest double.",
    unit: "1",
    empty: NO_LOCUS,
  },
  log10_minus_gtt_locus: {
    title: "log10 of -g_tt at the locus",
    description: "Decimal logarithm of -g_tt at the locus; -INF at a horizon.",
    unit: "1",
    empty: NO_LOCUS,
  },
  curvature_locus: {
    title: "Curvature at the locus",
    description: "Scalar curvature R of the two-dimensional metric.",
    unit: "1/length^2",
    empty: NO_LOCUS,
  },
  temperature_bath: {
    title: "Bath temperature",
    description: "Temperature of the bath at infinity, or at the wall where there is one.",
    unit: "temperature",
    empty: "not applicable",
  },
  temperature_horizon: {
    title: "Horizon temperature",
    description: "Hawking temperature, in the same time as the bath temperature.",
    unit: "temperature",
    empty: "not applicable: no horizon",
  },
  entropy_classical: {
    title: "Classical entropy",
    description: "2 H at kappa = 0, at horizons and throats.",
    unit: "1",
    empty: "not applicable: neither a horizon nor a throat",
  },
};

function numeric(name: NumericColumn): OutputColumn[] {
  const { title, unit, ...rest } = NUMERIC[name];
  return [
    { name, title, datatype: "double", unit, ...rest },
    {
      name: `${name}_err`,
      title: `${title}: error bound`,
      description: `Absolute bound that the error of ${name} does not exceed; 0 if given or exact.`,
      datatype: "double",
      unit,
      empty: `${name} is empty or infinite`,
    },
  ];
}

/** Columns of results.csv, in order. */
export const RESULT_COLUMNS: readonly OutputColumn[] = [
  {
    name: "case",
    title: "Case",
    description: "Name of the row, from the parameter table.",
    datatype: { format: CASE_FORMAT },
  },
  {
    name: "model",
    title: "Model",
    description: "Model of the dilaton gravity.",
    datatype: oneOf(MODEL_NAMES),
  },
  {
    name: "state",
    title: "State",
    description: "Quantum state of the matter fields.",
    datatype: oneOf(STATE_NAMES),
  },
  {
    name: "outcome",
    title: "Outcome",
    description: "solved; refused: the physics says no; failed: the solver gave up.",
    datatype: oneOf(["solved", "refused", "failed"]),
  },
  {
    name: "reason",
    title: "Reason",
    description: "A code, a colon and prose.",
    datatype: { format: "[a-z][a-z-]*: .*" },
    empty: "solved, nothing to say",
  },
  {
    name: "kind",
    title: "Kind",
    description: "Kind of static solution.",
    datatype: oneOf(KINDS),
    empty: "not solved",
  },
  {
    name: "kappa",
    title: "kappa",
    description: "Anomaly coefficient N/12, as given.",
    datatype: "double",
    unit: "1",
  },
  {
    name: "lambda",
    title: "lambda",
    description: "Scale of the linear dilaton, as given or 1.",
    datatype: "double",
    unit: "1/length",
    empty: "the model has none",
  },
  {
    name: "a",
    title: "a",
    description: "Parameter of the exactly solvable family, as given.",
    datatype: "double",
    unit: "1",
    empty: "the model has none",
  },
  {
    name: "wall_radius",
    title: "Wall radius",
    description: "Areal radius of the cavity wall, as given.",
    datatype: "double",
    unit: "length",
    empty: "the row has no wall",
  },
  ...NUMERIC_COLUMNS.flatMap(numeric),
  {
    name: "inner_end",
    title: "Inner end",
    description: "What ends the inner side.",
    datatype: oneOf(INNER_ENDS),
    empty: NO_LOCUS,
  },
  {
    name: "validity",
    title: "Validity",
    description: "inside, or codes of the limits of the semiclassical approximation passed.",
    datatype: { format: "[a-z][a-z-]*(;[a-z-]+)*" },
    empty: "not solved",
  },
  {
    name: "tolerance",
    title: "Tolerance",
    description: "Relative tolerance on every numeric locus column, as given or 1e-10.",
    datatype: "double",
    unit: "1",
  },
  {
    name: "stamp",
    title: "Stamp",
    description: "SHA-256 over the canonical JSON (RFC 8785) of all that can change the row.",
    datatype: { format: "[0-9a-f]{64}" },
  },
];

const PROFILE: Readonly<Record<ProfileColumn, readonly [string, string, string]>> = {
  sigma: ["sigma", "Conformal (tortoise) coordinate.", "length"],
  proper_distance: ["Proper distance", "0 at the locus, positive outside.", "length"],
  dilaton: ["Dilaton", "phi; swave: areal radius.", "1; swave: length"],
  rho: ["rho", "Half the logarithm of -g_tt.", "1"],
  minus_gtt: ["-g_tt", "exp(2 rho), 1 at infinity (at the wall where there is one).", "1"],
  curvature: ["Curvature", "Scalar curvature R of the two-dimensional metric.", "1/length^2"],
  energy_density: ["Energy density", "-T^t_t of the matter fields.", "energy/length"],
  pressure: ["Pressure", "T^x_x of the matter fields.", "energy/length"],
  residual_1: ["Residual 1", "Trace equation, relative to its largest term.", "1"],
  residual_2: ["Residual 2", "Dilaton equation, relative to its largest term.", "1"],
  residual_c: ["Residual C", "Constraint, relative to its largest term.", "1"],
};

/** Columns of a profile, in order; rows run from outside inwards. */
export const PROFILE_OUTPUT_COLUMNS: readonly OutputColumn[] = PROFILE_COLUMNS.map((name) => {
  const [title, description, unit] = PROFILE[name];
  return { name, title, description, datatype: "double", unit };
});
