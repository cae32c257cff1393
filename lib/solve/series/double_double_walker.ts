/**
 * The walker in double-double arithmetic.
 *
 * @module
 */
import type { Program } from "../../expr/program.ts";
import { type DoubleDouble, doubleDouble as A } from "../arithmetic/double_double.ts";
import { emitExpandDoubleDouble } from "./emit_double_double.ts";
import { needed } from "./schedule.ts";
import { adapted, powerOfTwoBelow, stepOf } from "./step_size.ts";
import { valueOf } from "./value.ts";
import type { Accuracy, Walker } from "./walker.ts";

/** Compiled double-double code of a program. */
export interface DoubleDoubleCode {
  readonly program: Program;
  readonly accuracy: Accuracy;
  readonly compiled: ReturnType<typeof emitExpandDoubleDouble>;
  /** Row of each followed series, by name (unknowns too). */
  readonly row: Readonly<Record<string, number>>;
  /** Operations that the outputs need. */
  readonly outputList: readonly number[];
}

/** Compiles a program. */
export function doubleDoubleCode(program: Program, accuracy: Accuracy): DoubleDoubleCode {
  const compiled = emitExpandDoubleDouble(program, accuracy.order + 1),
    row: Record<string, number> = {};
  for (const [n, i] of Object.entries(program.series)) {
    const r = compiled.rows.get(i);
    if (r !== undefined) row[n] = r;
  }
  program.unknowns.forEach((n, i) => row[n] = i);
  return {
    program,
    accuracy,
    compiled,
    row,
    outputList: needed(program, Object.values(program.outputs)),
  };
}

/** Walker in double-double arithmetic, see {@linkcode Walker}. */
export class DoubleDoubleWalker implements Walker<DoubleDouble> {
  readonly arithmetic = A;
  /** Present unit of the independent variable, a power of two. */
  unit: number;
  readonly #C: Float64Array;
  readonly #L: Float64Array;
  readonly #S: Float64Array;
  readonly #sh: Float64Array;
  readonly #sl: Float64Array;
  readonly #eh: Float64Array;
  readonly #el: Float64Array;
  readonly #fixed: readonly DoubleDouble[];
  #x: DoubleDouble[] = [];
  #t: DoubleDouble = A.from(0);

  /** As for the double walker, with parameters in double-double. */
  constructor(
    readonly code: DoubleDoubleCode,
    parameters: Readonly<Record<string, DoubleDouble>>,
    readonly floors: Readonly<Record<string, number>>,
    unit: number,
  ) {
    const { program, compiled, accuracy } = code, size = compiled.rowCount * (accuracy.order + 1);
    [this.#C, this.#L, this.#S] = [
      new Float64Array(size),
      new Float64Array(size),
      new Float64Array(size),
    ];
    this.#sh = new Float64Array(program.operations.length);
    this.#sl = new Float64Array(program.operations.length);
    this.#eh = new Float64Array(program.operations.length);
    this.#el = new Float64Array(program.operations.length);
    const fixed: DoubleDouble[] = [],
      point = { x: [], t: A.from(0), parameter: (n: string) => parameters[n]! };
    program.operations.forEach((o, i) => {
      if (!program.varies[i]) fixed[i] = valueOf(A, o, fixed, point);
    });
    this.#fixed = fixed;
    this.unit = powerOfTwoBelow(unit);
  }

  place(t: DoubleDouble, x: readonly DoubleDouble[]): void {
    this.#t = t;
    this.#x = [...x];
  }

  time(): DoubleDouble {
    return this.#t;
  }

  state(): readonly DoubleDouble[] {
    return this.#x;
  }

  #values(list: readonly number[]): DoubleDouble[] {
    const v = [...this.#fixed], { operations } = this.code.program;
    const point = { x: this.#x, t: this.#t, parameter: () => A.from(NaN) };
    for (const i of list) v[i] ??= valueOf(A, operations[i]!, v, point);
    return v;
  }

  expand(followed: readonly string[]): number {
    const { program, accuracy, compiled, row } = this.code, N = accuracy.order, W = N + 1;
    const values = this.#values(compiled.list);
    for (const i of compiled.list) {
      const o = program.operations[i]!;
      if (o.op === "expm1") {
        const e = A.exp(values[o.a]!);
        [this.#eh[i], this.#el[i]] = [e.hi, e.lo];
      }
      const { hi, lo } = values[i]!, r = compiled.rows.get(i);
      this.#sh[i] = hi;
      this.#sl[i] = lo;
      if (r === undefined) continue;
      const s = 134217729 * hi; // Dekker's splitting constant 2^27 + 1
      [this.#C[r * W], this.#L[r * W], this.#S[r * W]] = [hi, lo, s - (s - hi)];
    }
    const watched = [...program.unknowns, ...followed];
    const { unit, step } = adapted(this.unit, (H) => {
      compiled.expand(this.#sh, this.#sl, H, N, this.#C, this.#L, this.#S, this.#eh, this.#el);
      let s = Infinity;
      for (const name of watched) {
        const r = row[name]! * W;
        const size = Math.max(
          Math.abs(this.#C[r]!),
          Math.abs(this.#C[r + 1]!),
          this.floors[name] ?? 0,
        );
        const one = stepOf(this.#C, r, N, accuracy.tolerance * size);
        if (Number.isNaN(one)) return NaN;
        if (one < s) s = one;
      }
      return s;
    });
    this.unit = unit;
    return step;
  }

  series(name: string, h: number): number {
    return this.#sum(this.code.row[name]!, h).hi;
  }

  #sum(row: number, h: number): DoubleDouble {
    const W = this.code.accuracy.order + 1, s = A.from(h / this.unit); // exact: the unit is a power of two
    let y = A.from(0);
    for (let k = W - 1; k >= 0; k--) {
      y = A.add(A.mul(y, s), { hi: this.#C[row * W + k]!, lo: this.#L[row * W + k]! });
    }
    return y;
  }

  coefficient(name: string, k: number): DoubleDouble {
    const at = this.code.row[name]! * (this.code.accuracy.order + 1) + k;
    let hi = this.#C[at]!, lo = this.#L[at]!;
    for (let i = 0; i < k; i++) [hi, lo] = [hi / this.unit, lo / this.unit]; // a power of two: exact
    return { hi, lo };
  }

  slope(name: string): number {
    return this.#C[this.code.row[name]! * (this.code.accuracy.order + 1) + 1]! / this.unit;
  }

  advance(h: number): void {
    this.#x = this.#x.map((_, i) => this.#sum(i, h));
    this.#t = A.add(this.#t, A.from(h));
  }

  outputs(): Readonly<Record<string, DoubleDouble>> {
    const v = this.#values(this.code.outputList);
    return Object.fromEntries(
      Object.entries(this.code.program.outputs).map(([n, i]) => [n, v[i]!]),
    );
  }
}
