/**
 * What ends the inner side of a solution.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { DenseStep, Engine } from "../solve/engine.ts";
import type { Walker } from "../solve/series/walker.ts";
import { SETTINGS } from "../solve/settings.ts";
import { properDistance } from "./dense.ts";
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

/** Where a step behind a throat ended. */
interface Mark {
  readonly rho: number;
  /** ln|R|. */
  readonly lnR: number;
}

/** Goes on inwards and marks every step; undefined if it cannot. */
export function followBehind(
  engine: Engine<number>,
  walker: Walker<number>,
  form: string,
): readonly Mark[] | undefined {
  // |R| begins to grow only where -g_tt is below its square at the throat
  const start = walker.outputs()["lngtt"]!, stop = start - SETTINGS.behind - Math.abs(start);
  const marks: Mark[] = [];
  for (let steps = 0; steps < SETTINGS.steps; steps++) {
    const o = walker.outputs(), lngtt = o["lngtt"]!;
    if (!Number.isFinite(lngtt)) return undefined;
    marks.push({ rho: lngtt / 2, lnR: Math.log(Math.abs(o["curvature"]!)) });
    if (lngtt <= stop) return marks;
    const safe = walker.expand(["lngtt", form === "inner" ? "X" : "g"]);
    if (!(safe > 0)) return undefined;
    const left = 1.01 * (lngtt - stop) / walker.slope("lngtt");
    const h = -(left > 0 ? Math.min(safe, left) : safe);
    engine.taken(form, walker, h);
    walker.advance(h);
  }
  return undefined;
}

/**
 * Identifies the end behind a throat: -g_tt falls exponentially in sigma (the end is null), proper distance
 * converges, and |R| grows like a power of 1/(-g_tt): a null singularity. If |R| tends to a constant while
 * the distance grows, another asymptotic region.
 */
export function classifyBehind(steps: readonly DenseStep[], marks: readonly Mark[]): InnerEnd {
  if (steps.length < 3) return "undecided";
  const lengths = steps.map((s) => properDistance(s, 0, s.h)),
    total = lengths.reduce((a, b) => a + b, 0);
  const last = marks[marks.length - 1]!;
  let i = marks.length - 1;
  while (i > 0 && marks[i]!.rho < last.rho + SETTINGS.behind / 6) i--;
  const tail = lengths.slice(i).reduce((a, b) => a + b, 0);
  const slope = (last.lnR - marks[i]!.lnR) / (last.rho - marks[i]!.rho); // d ln|R| / d rho
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
      const marks = followBehind(engine, walker, form);
      if (marks) end = classifyBehind(record.slice(locusStep), marks);
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
