/**
 * The walker in double precision.
 *
 * @module
 */
import type { Program } from "../../expr/program.ts";
import { double } from "../arithmetic/double.ts";
import { emitEvaluateDouble, emitExpandDouble } from "./emit_double.ts";
import { adapted, powerOfTwoBelow, stepOf } from "./step_size.ts";
import type { Accuracy, Walker } from "./walker.ts";

/** Compiled double-precision code of a program; build once, walk often. */
export interface DoubleCode {
  readonly program: Program;
  readonly accuracy: Accuracy;
  readonly expand: ReturnType<typeof emitExpandDouble>["expand"];
  readonly evaluate: ReturnType<typeof emitEvaluateDouble>;
  /** Row of each followed series, by name (unknowns too). */
  readonly row: Readonly<Record<string, number>>;
  readonly rowCount: number;
}

/** Compiles a program; series of `extra` outputs can be followed too (for dense output). */
export function doubleCode(
  program: Program,
  accuracy: Accuracy,
  extra: readonly string[] = [],
): DoubleCode {
  const { expand, rows, rowCount } = emitExpandDouble(
    program,
    accuracy.order + 1,
    extra.map((n) => program.outputs[n]!),
  );
  const named = [
    ...Object.entries(program.series),
    ...extra.map((n) => [n, program.outputs[n]!] as const),
  ];
  const row: Record<string, number> = Object.fromEntries(
    named.flatMap(([n, i]) => rows.has(i) ? [[n, rows.get(i)!]] : []),
  );
  program.unknowns.forEach((n, i) => row[n] = i);
  return { program, accuracy, expand, evaluate: emitEvaluateDouble(program), row, rowCount };
}

/** Walker in double precision, see {@linkcode Walker}. */
export class DoubleWalker implements Walker<number> {
  readonly arithmetic = double;
  /** Coefficients of the present expansion, rows of length order + 1, in powers of (t - t0)/unit. */
  readonly table: Float64Array;
  /** Present unit of the independent variable, a power of two. */
  unit: number;
  readonly #x: Float64Array;
  readonly #p: Float64Array;
  readonly #out: Float64Array;
  #t = 0;

  /**
   * @param code Compiled program.
   * @param parameters Values of its parameters.
   * @param floors Sizes below which unknowns need no relative accuracy, by name.
   * @param unit First guess of the step.
   */
  constructor(
    readonly code: DoubleCode,
    parameters: Readonly<Record<string, number>>,
    readonly floors: Readonly<Record<string, number>>,
    unit: number,
  ) {
    const { program } = code;
    this.table = new Float64Array(code.rowCount * (code.accuracy.order + 1));
    this.#x = new Float64Array(program.unknowns.length);
    this.#p = Float64Array.from(program.parameters, (n) => parameters[n]!);
    this.#out = new Float64Array(Object.keys(program.outputs).length);
    this.unit = powerOfTwoBelow(unit);
  }

  place(t: number, x: readonly number[]): void {
    this.#t = t;
    this.#x.set(x);
  }

  time(): number {
    return this.#t;
  }

  state(): readonly number[] {
    return [...this.#x];
  }

  expand(followed: readonly string[]): number {
    const { expand, accuracy, program, row } = this.code,
      N = accuracy.order,
      W = N + 1,
      C = this.table;
    const watched = [...program.unknowns, ...followed];
    const { unit, step } = adapted(this.unit, (H) => {
      expand(this.#x, this.#t, this.#p, H, N, C);
      let s = Infinity;
      for (const name of watched) {
        const r = row[name]! * W;
        const size = Math.max(Math.abs(C[r]!), Math.abs(C[r + 1]!), this.floors[name] ?? 0);
        const one = stepOf(C, r, N, accuracy.tolerance * size);
        if (Number.isNaN(one)) return NaN;
        if (one < s) s = one;
      }
      return s;
    });
    this.unit = unit;
    return step;
  }

  series(name: string, h: number): number {
    const W = this.code.accuracy.order + 1, from = this.code.row[name]! * W, s = h / this.unit;
    let y = 0;
    for (let k = W - 1; k >= 0; k--) y = y * s + this.table[from + k]!;
    return y;
  }

  coefficient(name: string, k: number): number {
    let c = this.table[this.code.row[name]! * (this.code.accuracy.order + 1) + k]!;
    for (let i = 0; i < k; i++) c /= this.unit; // a power of two: exact
    return c;
  }

  slope(name: string): number {
    return this.table[this.code.row[name]! * (this.code.accuracy.order + 1) + 1]! / this.unit;
  }

  advance(h: number): void {
    for (let i = 0; i < this.#x.length; i++) {
      this.#x[i] = this.series(this.code.program.unknowns[i]!, h);
    }
    this.#t += h;
  }

  outputs(): Readonly<Record<string, number>> {
    this.code.evaluate(this.#x, this.#t, this.#p, this.#out);
    return Object.fromEntries(
      Object.keys(this.code.program.outputs).map((n, i) => [n, this.#out[i]!]),
    );
  }
}
