/**
 * One record of a parameter table to one row input, or to everything that is wrong with it.
 *
 * @module
 */
import {
  MODEL_NAMES,
  type ModelName,
  type RowInput,
  STATE_NAMES,
  type StateName,
} from "../model/input.ts";
import {
  ALWAYS,
  BATH_STATES,
  DEFAULTS,
  EXCLUSIVE,
  FIELD_COLUMNS,
  LINEAR_DILATON,
  ONLY_STATE,
  PARAMETER_COLUMNS,
  type ParameterColumn,
} from "./columns.ts";
import { caseFault } from "./case_name.ts";
import { type Fault, quoted } from "./fault.ts";
import { nearest } from "./nearest.ts";
import { readNumber } from "./number.ts";

/** A valid row: its case, what the solver gets, and the bath as it was typed. */
export interface TableRow {
  /** Name of the case. */
  readonly case: string;
  /** Line of the file the row begins on. */
  readonly line: number;
  /** What the solver gets. */
  readonly input: RowInput;
  /** The bath ratio, if the table gave it and not its difference from one. */
  readonly bathRatio?: number;
}

/** Cells of one record by column name. */
export interface Cells {
  /** Line of the file. */
  readonly line: number;
  /** Text of a cell; empty where the column is absent or the cell is. */
  readonly text: (column: string) => string;
  /** Whether the header has the column. */
  readonly has: (column: string) => boolean;
}

const LARGEST_MASS = 1e70; // of anomaly4d, in Planck masses: beyond, powers leave the range of doubles

type Report = (column: string, text: string) => void;

function readCase(text: string, report: Report): string {
  const must = caseFault(text);
  if (text === "") report("case", "must be given: it names the row and its profile");
  else if (must) report("case", `${must}: current value is ${quoted(text)}`);
  return text;
}

function readName<T extends string>(
  column: string,
  text: string,
  names: readonly T[],
  report: Report,
): T | undefined {
  const found = names.find((n) => n === text);
  if (found !== undefined) return found;
  const must = `must be one of ${names.join(", ")}`;
  if (text === "") report(column, `${must}: current value is empty`);
  else {
    report(
      column,
      `${must} (nearest: ${nearest(text, names)}): current value is ${quoted(text)}`,
    );
  }
  return undefined;
}

function list(names: readonly string[]): string {
  return names.length < 2 ? names.join("") : `${names.slice(0, -1).join(", ")} or ${names.at(-1)}`;
}

function lacks(
  column: ParameterColumn,
  model: ModelName | undefined,
  state: StateName | undefined,
): string | undefined {
  if (model !== undefined && !column.models.includes(model)) {
    return `must be empty as model ${model} has no ${column.name}, only ${list(column.models)}`;
  }
  if (state !== undefined && !column.states.includes(state)) {
    return `must be empty as state ${state} has no ${column.name}, only ${list(column.states)}`;
  }
  return undefined;
}

/** What a model and a state ask of a row. */
interface Demands {
  /** Columns they lack, with what is to be said about them. */
  readonly lacked: ReadonlyMap<string, string>;
  /** Groups of columns of which one must be given. */
  readonly groups: readonly (readonly string[])[];
  /** Columns that must be given. */
  readonly always: readonly string[];
}

const DEMANDS = new Map<string, Demands>();

/** Demands of a model and a state, worked out once. */
function demandsOf(model: ModelName | undefined, state: StateName | undefined): Demands {
  const key = `${model} ${state}`, known = DEMANDS.get(key);
  if (known) return known;
  const lacked = new Map(PARAMETER_COLUMNS.flatMap((column) => {
    const text = lacks(column, model, state);
    return text === undefined ? [] : [[column.name, text] as const];
  }));
  const possible = (name: string) => !lacked.has(name);
  const groups = EXCLUSIVE.map((group) => group.filter(possible)).filter((g) => g.length > 0);
  const demands = { lacked, groups, always: ALWAYS.filter(possible) };
  DEMANDS.set(key, demands);
  return demands;
}

function readNumbers(
  cells: Cells,
  model: ModelName | undefined,
  state: StateName | undefined,
  report: Report,
): Map<string, number> {
  const values = new Map<string, number>(), { lacked } = demandsOf(model, state);
  for (const column of PARAMETER_COLUMNS) {
    const text = cells.text(column.name);
    if (text === "") continue;
    const missing = lacked.get(column.name);
    if (missing) {
      report(column.name, `${missing}: current value is ${quoted(text)}`);
      continue;
    }
    const value = readNumber(text);
    if (typeof value !== "number") {
      report(column.name, `${value.must}: current value is ${quoted(text)}`);
    } else if (!column.holds(value)) {
      report(column.name, `must be ${column.range}: current value is ${quoted(text)}`);
    } else values.set(column.name, value);
  }
  return values;
}

function checkGroups(
  cells: Cells,
  model: ModelName,
  state: StateName,
  report: Report,
): void {
  const { groups, always } = demandsOf(model, state);
  for (const names of groups) {
    const given = names.filter((n) => cells.text(n) !== "");
    if (given.length === 1) continue;
    const must = names.length === 1
      ? "must be given"
      : `exactly one of ${names.join(", ")} must be given`;
    report(
      given[1] ?? names[0]!,
      `${must} for model ${model} with state ${state}: current count is ${given.length}`,
    );
  }
  for (const name of always) {
    if (cells.text(name) !== "") continue;
    report(name, `must be given for model ${model} with state ${state}: current value is empty`);
  }
}

/** A cavity wall must enclose the hole (r > 2M with the Misner-Sharp mass; r > r_h). */
function checkCavity(values: ReadonlyMap<string, number>, cells: Cells, report: Report): void {
  const mass = values.get("mass"), wall = values.get("wall_radius");
  const horizon = values.get("horizon_dilaton");
  if (mass !== undefined && mass <= 0) {
    const text = quoted(cells.text("mass"));
    report("mass", `must be > 0 for model swave with a bath: current value is ${text}`);
  }
  if (horizon !== undefined && horizon <= 0) {
    const text = quoted(cells.text("horizon_dilaton"));
    report("horizon_dilaton", `must be > 0, a radius, for model swave: current value is ${text}`);
  }
  const text = quoted(cells.text("wall_radius"));
  if (wall !== undefined && mass !== undefined && wall <= 2 * mass) {
    report(
      "wall_radius",
      `must be > 2 * mass = ${2 * mass}, outside the hole: current value is ${text}`,
    );
  }
  if (wall !== undefined && horizon !== undefined && wall <= horizon) {
    report(
      "wall_radius",
      `must be > horizon_dilaton = ${horizon}, outside the hole: current value is ${text}`,
    );
  }
}

/** A sphere in place of a horizon needs a hole and a field. */
function checkFields(values: ReadonlyMap<string, number>, cells: Cells, report: Report): void {
  const mass = values.get("mass");
  if (mass !== undefined && !(mass > 0 && mass <= LARGEST_MASS)) {
    const text = quoted(cells.text("mass"));
    report(
      "mass",
      `must be > 0 and at most ${LARGEST_MASS} for model anomaly4d: current value is ${text}`,
    );
  }
  if (FIELD_COLUMNS.every((name) => (values.get(name) ?? 0) === 0)) {
    report(
      FIELD_COLUMNS[0],
      `must be > 0 for model anomaly4d where ${FIELD_COLUMNS.slice(1).join(" and ")} are 0: ` +
        `current value is ${quoted(cells.text(FIELD_COLUMNS[0]))}`,
    );
  }
}

function optional<K extends string>(key: K, value: number | undefined): { [P in K]?: number } {
  return (value === undefined ? {} : { [key]: value }) as { [P in K]?: number };
}

function rowInput(
  model: ModelName,
  state: StateName,
  values: ReadonlyMap<string, number>,
): RowInput {
  const bathRatio = values.get("bath_ratio");
  return {
    model,
    state,
    kappa: model === "anomaly4d" ? 0 : values.get("kappa") ?? values.get("n_scalars")! / 12,
    ...optional(
      "lambda",
      LINEAR_DILATON.includes(model) ? values.get("lambda") ?? DEFAULTS.lambda : undefined,
    ),
    ...optional("mass", values.get("mass")),
    ...optional("massAboveCritical", values.get("mass_above_critical")),
    ...optional("horizonDilaton", values.get("horizon_dilaton")),
    ...optional(
      "bathRatioMinusOne",
      bathRatio === undefined ? values.get("bath_ratio_minus_one") : bathRatio - 1,
    ),
    ...optional("a", values.get("a")),
    ...optional("wallRadius", values.get("wall_radius")),
    ...(model === "anomaly4d"
      ? {
        realScalars: values.get("real_scalars") ?? 0,
        diracSpinors: values.get("dirac_spinors") ?? 0,
        vectors: values.get("vectors") ?? 0,
      }
      : {}),
    ...optional("beta", values.get("beta")),
    tolerance: values.get("tolerance") ?? DEFAULTS.tolerance,
  };
}

/**
 * Reads one record.
 *
 * @param cells The record's cells.
 * @returns The row if it is without fault, the case as typed, and the faults.
 */
export function readRow(cells: Cells): {
  readonly row?: TableRow;
  readonly case: string;
  readonly faults: readonly Fault[];
} {
  const faults: Fault[] = [];
  const report: Report = (column, text) => faults.push({ line: cells.line, column, text });
  const name = cells.has("case") ? readCase(cells.text("case"), report) : "";
  const model = cells.has("model")
    ? readName("model", cells.text("model"), MODEL_NAMES, report)
    : undefined;
  const state = cells.has("state")
    ? readName("state", cells.text("state"), STATE_NAMES, report)
    : undefined;
  const values = readNumbers(cells, model, state, report);
  if (values.get("n_scalars")! / 12 === 0) {
    const text = quoted(cells.text("n_scalars"));
    report("n_scalars", `must be so large that kappa = N/12 is not 0: current value is ${text}`);
  }
  const only = model && ONLY_STATE[model];
  if (only !== undefined && state !== undefined && state !== only) {
    report("state", `must be ${only} for model ${model}: current value is ${quoted(state)}`);
  } else if (model !== undefined && state !== undefined) checkGroups(cells, model, state, report);
  if (model === "anomaly4d") checkFields(values, cells, report);
  if (model === "swave" && state !== undefined && BATH_STATES.includes(state)) {
    checkCavity(values, cells, report);
  }
  if (faults.length > 0 || model === undefined || state === undefined) {
    return { case: name, faults };
  }
  const row = {
    case: name,
    line: cells.line,
    input: rowInput(model, state, values),
    ...optional("bathRatio", values.get("bath_ratio")),
  };
  return { row, case: name, faults };
}
