/**
 * A bath ratio below 1/2 is carried as its difference from one, which rounds it by up to 2^-54; what that
 * does to the locus belongs to the bounds.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Engine } from "../solve/engine.ts";
import type { NumericColumn } from "./result.ts";
import { solveIn } from "./solve_in.ts";
import type { Solution } from "./solution.ts";

const PROBE = 2 ** -20; // large against round-off, small against the scale on which locus values vary

/** Additions to bounds, by column: twice the secant slope in the bath ratio times 2^-54. */
export function conversionSlack(
  engine: Engine<number>,
  input: RowInput,
  at: Solution<number>,
): readonly (readonly [NumericColumn, number])[] {
  const excess = input.bathRatioMinusOne;
  if (
    input.state !== "thermal" || excess === undefined || excess >= -0.5 || at.outcome !== "solved"
  ) return [];
  const moved = solveIn(engine, { ...input, bathRatioMinusOne: excess + PROBE });
  if (moved.outcome !== "solved" || moved.kind !== at.kind) return [];
  const out: [NumericColumn, number][] = [];
  const x = at.numbers as Record<string, number>, y = moved.numbers as Record<string, number>;
  for (const name of Object.keys(x)) {
    const slack = Math.abs(y[name]! - x[name]!) / PROBE * 2 ** -53;
    if (!Number.isFinite(slack)) continue;
    if (name === "lngtt") {
      out.push(["log10_minus_gtt_locus", slack / 2], [
        "minus_gtt_locus",
        slack * 2 * Math.exp(Math.min(x[name]!, 700)),
      ]);
    } else out.push([name as NumericColumn, slack]);
  }
  return out;
}
