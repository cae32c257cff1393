/**
 * One row from its parameters to its record: solved in double precision and in double-double, the two
 * compared, the kind decided with evidence.
 *
 * @module
 */
import type { CompiledModel } from "../model/compile.ts";
import type { RowInput } from "../model/input.ts";
import type { DoubleDouble } from "../solve/arithmetic/double_double.ts";
import type { DenseStep } from "../solve/engine.ts";
import { AGAINST_DOUBLE, AGAINST_WIDE, type Comparison } from "./bound.ts";
import { combine } from "./combine.ts";
import { enginesOf } from "./engines.ts";
import { type Frame, inwardFrame, outwardFrame } from "./frame.ts";
import { endOf, innerEnd } from "./inner_end.ts";
import { profileOf } from "./profile.ts";
import type { Bounded, NumericColumn, Profile, RowResult } from "./result.ts";
import { conversionSlack } from "./slack.ts";
import type { Solution } from "./solution.ts";
import { horizonGuess, solveIn } from "./solve_in.ts";
import { stateNumbers } from "./state_numbers.ts";
import { unmet } from "./tolerance.ts";
import { validity } from "./validity.ts";

/** What to compute besides the record. */
export interface RowOptions {
  /** Whether the profile is wanted. */
  readonly profile?: boolean;
}

type Solved<T> = Extract<Solution<T>, { outcome: "solved" }>;

const NOTHING = { numbers: {}, evidence: {} } as const;
const BOUNDARY = "boundary: the bound of the deciding quantity straddles a boundary between kinds";

/**
 * Computes one row.
 *
 * @param input A validated row.
 * @param model Its compiled model.
 * @param options Whether the profile is wanted.
 * @returns The record, and the profile of a solved row that has one.
 */
export function computeRow(
  input: RowInput,
  model: CompiledModel,
  options: RowOptions = {},
): { readonly result: RowResult; readonly profile?: Profile } {
  const engines = enginesOf(model), record: DenseStep[] = [];
  const guess = horizonGuess(engines.double(), input);
  const wide = solveIn(engines.wide, input, guess);
  if (wide.outcome !== "solved") return { result: { ...NOTHING, ...wide } };
  const first = solveIn(engines.double(), input, guess);
  let joined = join(wide, first, input, AGAINST_DOUBLE);
  if (!joined) joined = join(wide, solveIn(engines.check, input, guess), input, AGAINST_WIDE);
  if (!joined || undecided(input, wide, joined.evidence)) {
    return {
      result: {
        ...NOTHING,
        ...(joined ? { evidence: joined.evidence } : {}),
        outcome: "solved",
        kind: "undecided",
        reason: BOUNDARY,
        validity: validity(input, undefined, undefined),
      },
    };
  }
  const numbers = { ...joined.numbers, ...stateNumbers(input) };
  for (const [name, slack] of conversionSlack(engines.double(), input, first)) {
    const b = numbers[name];
    if (b?.error !== undefined && b.error !== 0) {
      numbers[name] = { value: b.value, error: b.error + slack };
    }
  }
  const fault = unmet(input, numbers);
  if (fault) {
    return { result: { ...NOTHING, outcome: "failed", reason: fault, evidence: joined.evidence } };
  }
  const { kind } = wide, alpha = joined.evidence["acceleration"]?.value;
  const curvature = alpha === undefined ? numbers.curvature_locus?.value : alpha * alpha;
  const two = model.family !== "anomaly4d"; // the sphere's inner side and profile are not followed
  const followed = two && (options.profile || kind === "throat");
  const inner = followed
    ? innerEnd(engines.double(record), record, input, kind)
    : { ...(two ? endOf(kind) : { end: "not-followed" as const }), locusStep: 0 };
  const result: RowResult = {
    outcome: "solved",
    reason: "",
    kind,
    numbers,
    ...(inner.end === undefined ? {} : { innerEnd: inner.end }),
    validity: validity(input, curvature, wide.separation?.hi),
    evidence: joined.evidence,
  };
  if (!options.profile || numbers.dilaton_locus === undefined || !two) return { result };
  let frame: Frame | undefined, locusStep = 0;
  if (input.state === "hartle-hawking") {
    if (kind !== "horizon") return { result };
    const at = numbers.dilaton_locus.value,
      horizon = model.family === "linear-dilaton" ? Math.exp(-2 * at) : at;
    frame = outwardFrame(engines.double(record), input, horizon);
  } else {
    frame = inwardFrame(engines.double(), input);
    locusStep = inner.locusStep;
  }
  if (!frame || record.length === 0) return { result };
  return { result, profile: profileOf(record, locusStep, frame, input, model) };
}

function join(
  wide: Solved<DoubleDouble>,
  other: Solution<number> | Solution<DoubleDouble>,
  input: RowInput,
  c: Comparison,
):
  | { numbers: Partial<Record<NumericColumn, Bounded>>; evidence: Record<string, Bounded> }
  | undefined {
  if (other.outcome !== "solved" || other.kind !== wide.kind) return undefined;
  return combine(wide, other, input, c);
}

/** Whether the sign of a deciding quantity is not certain, or contradicts the kind that was found. */
function undecided(
  input: RowInput,
  wide: Solved<DoubleDouble>,
  evidence: Record<string, Bounded>,
): boolean {
  const regular = wide.kind === "throat" || wide.kind === "horizon";
  const above = evidence["mass_above_critical"], condition = evidence["throat_condition"];
  const certain = (b: Bounded) => Math.abs(b.value) > (b.error ?? Infinity);
  const tau = input.state === "thermal" ? input.bathRatioMinusOne! : -1;
  if (above && input.state !== "hartle-hawking" && tau <= 0) {
    if (!certain(above) || (above.value > 0) !== regular) return true;
  }
  if (wide.kind === "throat" && condition && !(condition.value > 0 && certain(condition))) {
    return true;
  }
  return false;
}
