/**
 * What ends the inner side of a solution.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { DenseStep, Engine } from "../solve/engine.ts";
import type { Walker } from "../solve/series/walker.ts";
import { SETTINGS } from "../solve/settings.ts";
import { pointAt, properDistance } from "./dense.ts";
import { linearRow } from "./linear_row.ts";
import type { InnerEnd, Kind } from "./result.ts";
import { sphericalRow } from "./spherical_row.ts";

/** Runs a row in double precision, recording every step, and goes on behind a throat. */
export function denseRun(
  engine: Engine<number>,
  input: RowInput,
  behind: (walker: Walker<number>, form: string) => void,
): void {
  if (engine.model.family === "linear-dilaton") {
    linearRow(engine, input, (end) => end.end === "throat" && behind(end.walker, "inner"));
  } else sphericalRow(engine, input, (end) => end.end === "throat" && behind(end.walker, end.form));
}

/** Goes on inwards until -g_tt has fallen by SETTINGS.behind e-folds; false if it cannot. */
export function followBehind(
  engine: Engine<number>,
  walker: Walker<number>,
  form: string,
): boolean {
  const stop = walker.outputs()["lngtt"]! - SETTINGS.behind;
  for (let steps = 0; steps < SETTINGS.steps; steps++) {
    const lngtt = walker.outputs()["lngtt"]!;
    if (!Number.isFinite(lngtt)) return false;
    if (lngtt <= stop) return true;
    const safe = walker.expand(["lngtt"]);
    if (!(safe > 0)) return false;
    const left = 1.01 * (lngtt - stop) / walker.slope("lngtt");
    const h = -(left > 0 ? Math.min(safe, left) : safe);
    engine.taken(form, walker, h);
    walker.advance(h);
  }
  return false;
}

/** ln|R| + constant and rho at the inner edge of a step. */
function edge(
  step: DenseStep,
): { readonly rho: number; readonly lnR: number; readonly sign: number } {
  const { rho, ddrho } = pointAt(step, step.h);
  return { rho, lnR: Math.log(Math.abs(2 * ddrho)) - 2 * rho, sign: -Math.sign(ddrho) };
}

/**
 * Identifies the end behind a throat from the recorded steps: -g_tt falls exponentially in sigma (the end is
 * null), proper distance converges, and |R| grows like a power of 1/(-g_tt): a null singularity. If |R|
 * tends to a constant while the distance grows, another asymptotic region.
 */
export function classifyBehind(steps: readonly DenseStep[]): InnerEnd {
  if (steps.length < 3) return "undecided";
  const lengths = steps.map((s) => properDistance(s, 0, s.h)),
    total = lengths.reduce((a, b) => a + b, 0);
  const last = edge(steps[steps.length - 1]!);
  let i = steps.length - 1;
  while (i > 0 && edge(steps[i]!).rho < last.rho + SETTINGS.behind / 6) i--;
  const before = edge(steps[i]!), tail = lengths.slice(i + 1).reduce((a, b) => a + b, 0);
  const slope = (last.lnR - before.lnR) / (last.rho - before.rho); // d ln|R| / d rho
  if (tail < 1e-3 * total && slope < -1) return "null-singularity";
  if (tail > 0.1 * total && Math.abs(slope) < 0.1) return "asymptotic-region";
  return "undecided";
}

/**
 * The inner end of a row.
 *
 * @param engine Dense engine if the row is to be followed.
 * @param kind Its kind.
 * @param record The steps that `engine` records.
 */
export function innerEnd(
  engine: Engine<number>,
  record: DenseStep[],
  input: RowInput,
  kind: Kind,
): { readonly end?: InnerEnd; readonly locusStep: number } {
  let locusStep = record.length, end: InnerEnd = "undecided";
  if (
    kind === "throat" || kind === "naked-singularity" ||
    (kind === "horizon" && input.state !== "hartle-hawking")
  ) {
    denseRun(engine, input, (walker, form) => {
      locusStep = record.length;
      if (followBehind(engine, walker, form)) end = classifyBehind(record.slice(locusStep));
    });
    if (kind !== "throat") locusStep = record.length;
  }
  return kind === "throat" ? { end, locusStep } : { ...endOf(kind), locusStep };
}

/** Ends that follow from the kind: a naked end lies at finite sigma, the others where -g_tt vanishes or not. */
export function endOf(kind: Kind): { readonly end?: InnerEnd } {
  switch (kind) {
    case "naked-singularity":
      return { end: "timelike-singularity" };
    case "singular-horizon":
      return { end: "null-singularity" };
    case "semi-infinite-throat":
      return { end: "asymptotic-region" };
    case "horizon":
      return { end: "not-followed" };
    default:
      return {};
  }
}
