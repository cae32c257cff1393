/**
 * An engine walks the forms of one compiled model in one arithmetic. Code is generated once per form and
 * kept.
 *
 * @module
 */
import type { CompiledModel } from "../model/compile.ts";
import type { Arithmetic } from "./arithmetic/arithmetic.ts";
import { double } from "./arithmetic/double.ts";
import { type DoubleDouble, doubleDouble } from "./arithmetic/double_double.ts";
import { doubleDoubleCode, DoubleDoubleWalker } from "./series/double_double_walker.ts";
import { type DoubleCode, doubleCode, DoubleWalker } from "./series/double_walker.ts";
import type { Accuracy, Walker } from "./series/walker.ts";
import { SETTINGS } from "./settings.ts";

/** Values of a form's parameters. */
export type Parameters<T> = Readonly<Record<string, T>>;

/** One recorded step of a dense run: a copy of the coefficients and how far they were used. */
export interface DenseStep {
  readonly form: string;
  readonly code: DoubleCode;
  readonly table: Float64Array;
  readonly unit: number;
  /** Independent variable at the start of the step. */
  readonly t: number;
  /** Step taken. */
  readonly h: number;
}

/** Makes walkers of one model in one arithmetic. */
export interface Engine<T> {
  readonly model: CompiledModel;
  readonly arithmetic: Arithmetic<T>;
  /** Whether steps are recorded for dense output. */
  readonly dense: boolean;
  /** Terms of the start series. */
  readonly startTerms: number;
  /** Walker over a form; floors are sizes below which an unknown needs no relative accuracy. */
  walker(
    form: string,
    p: Parameters<T>,
    floors: Readonly<Record<string, number>>,
    unit: number,
  ): Walker<T>;
  /** Called with every step taken, before the walker moves. */
  taken(form: string, walker: Walker<T>, h: number): void;
  /** Forgets the steps recorded since `count` were (an attempt that led nowhere). */
  forget(count: number): void;
  /** Number of steps recorded. */
  recorded(): number;
}

function kept<K, V>(make: (key: K) => V): (key: K) => V {
  const store = new Map<K, V>();
  return (key) => {
    const known = store.get(key);
    if (known !== undefined) return known;
    const made = make(key);
    store.set(key, made);
    return made;
  };
}

/** Dense outputs, where a form has them. */
const DENSE = ["phi", "rho", "sigma", "erho", "flux", "curvature"];

/** Double-precision engine factory of a model; `record` receives dense steps. */
export function doubleEngine(model: CompiledModel): (record?: DenseStep[]) => Engine<number> {
  const light = kept((form: string) => doubleCode(model.programs[form]!, SETTINGS.double));
  const dense = kept((form: string) => {
    const program = model.programs[form]!;
    return doubleCode(program, SETTINGS.double, DENSE.filter((n) => n in program.outputs));
  });
  return (record) => ({
    model,
    arithmetic: double,
    dense: record !== undefined,
    startTerms: SETTINGS.double.start,
    walker: (form, p, floors, unit) =>
      new DoubleWalker((record ? dense : light)(form), p, floors, unit),
    taken: (form, walker, h) => {
      if (!record) return;
      const w = walker as DoubleWalker;
      record.push({ form, code: w.code, table: w.table.slice(), unit: w.unit, t: w.time(), h });
    },
    forget: (count) => {
      if (record) record.length = count;
    },
    recorded: () => record?.length ?? 0,
  });
}

/** Double-double engine of a model. */
export function doubleDoubleEngine(
  model: CompiledModel,
  settings: Accuracy & { readonly start: number },
): Engine<DoubleDouble> {
  const code = kept((form: string) => doubleDoubleCode(model.programs[form]!, settings));
  return {
    model,
    arithmetic: doubleDouble,
    dense: false,
    startTerms: settings.start,
    walker: (form, p, floors, unit) => new DoubleDoubleWalker(code(form), p, floors, unit),
    taken: () => {},
    forget: () => {},
    recorded: () => 0,
  };
}
