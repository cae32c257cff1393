/**
 * One row in one arithmetic: picks the way by family and state.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Engine } from "../solve/engine.ts";
import type { HorizonRoot } from "../solve/horizon_root.ts";
import { anomalyRow } from "./anomaly_row.ts";
import { linearHartleHawking, linearHorizonGuess } from "./linear_hartle_hawking.ts";
import { linearRow } from "./linear_row.ts";
import type { Solution } from "./solution.ts";
import { sphericalHartleHawking, sphericalHorizonGuess, sphericalRow } from "./spherical_row.ts";

/** Solves a row in one arithmetic. */
export function solveIn<T>(engine: Engine<T>, input: RowInput, guess?: HorizonRoot): Solution<T> {
  if (engine.model.family === "anomaly4d") return anomalyRow(engine, input);
  const linear = engine.model.family === "linear-dilaton";
  if (input.state === "hartle-hawking") {
    return linear
      ? linearHartleHawking(engine, input, guess)
      : sphericalHartleHawking(engine, input, guess);
  }
  return linear ? linearRow(engine, input) : sphericalRow(engine, input);
}

/** First guess of the horizon where it is to be found from the mass. */
export function horizonGuess(engine: Engine<number>, input: RowInput): HorizonRoot | undefined {
  if (input.state !== "hartle-hawking") return undefined;
  return engine.model.family === "linear-dilaton"
    ? linearHorizonGuess(engine, input)
    : sphericalHorizonGuess(engine, input);
}
