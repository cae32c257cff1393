/**
 * Engines of a compiled model, built once.
 *
 * @module
 */
import type { CompiledModel } from "../model/compile.ts";
import { type DenseStep, doubleDoubleEngine, doubleEngine, type Engine } from "../solve/engine.ts";
import type { DoubleDouble } from "../solve/arithmetic/double_double.ts";
import { SETTINGS } from "../solve/settings.ts";

/** All engines of one model. */
export interface Engines {
  /** Double precision; dense steps go to `record` if given. */
  readonly double: (record?: DenseStep[]) => Engine<number>;
  /** Double-double. */
  readonly wide: Engine<DoubleDouble>;
  /** Double-double with another order and tolerance, the check where double fails. */
  readonly check: Engine<DoubleDouble>;
}

const built = new WeakMap<CompiledModel, Engines>();

/** The engines of a model. */
export function enginesOf(model: CompiledModel): Engines {
  let engines = built.get(model);
  if (!engines) {
    engines = {
      double: doubleEngine(model),
      wide: doubleDoubleEngine(model, SETTINGS.doubleDouble),
      check: doubleDoubleEngine(model, SETTINGS.check),
    };
    built.set(model, engines);
  }
  return engines;
}
