/**
 * Joins the solutions of one row in two arithmetics to numbers with bounds.
 *
 * @module
 */
import { RADIAL_MODELS, type RowInput } from "../model/input.ts";
import { type DoubleDouble, doubleDouble as A } from "../solve/arithmetic/double_double.ts";
import { bounded, type Comparison } from "./bound.ts";
import type { Bounded, NumericColumn } from "./result.ts";
import type { Solution } from "./solution.ts";

type Solved<T> = Extract<Solution<T>, { outcome: "solved" }>;
type Numbers = Partial<Record<NumericColumn, Bounded>>;

const LN10 = A.log(A.from(10));

/** A number of either arithmetic minus a double-double one, as a double. */
export function difference(x: number | DoubleDouble, y: DoubleDouble): number {
  const wide = typeof x === "number" ? A.from(x) : x;
  return A.sub(wide, y).hi;
}

/** Natural size of a column: what its absolute accuracy is measured against. */
function sizeOf(name: string, value: number, input: RowInput): number {
  const size = Math.abs(value), floor = 2 ** -20; // logarithms: errors of their argument are absolute
  if (name === "mass") return Math.max(size, input.kappa * (input.lambda ?? 0));
  if (name === "lngtt") return Math.max(size, 1);
  if (name === "dilaton_locus" && !RADIAL_MODELS.includes(input.model)) {
    return Math.max(size, floor);
  }
  return size;
}

/** Columns of a solved row with their bounds. */
export function combine(
  wide: Solved<DoubleDouble>,
  other: Solved<number> | Solved<DoubleDouble>,
  input: RowInput,
  c: Comparison,
): { readonly numbers: Numbers; readonly evidence: Record<string, Bounded> } {
  const numbers: Numbers = {}, evidence: Record<string, Bounded> = {};
  for (const [name, value] of Object.entries(wide.exact)) {
    numbers[name as NumericColumn] = Number.isFinite(value) ? { value, error: 0 } : { value };
  }
  const second = other.numbers as Record<string, number | DoubleDouble | undefined>;
  for (const [name, value] of Object.entries(wide.numbers)) {
    const gap = second[name] === undefined ? Infinity : difference(second[name]!, value);
    if (name === "lngtt") {
      const ln = bounded(value, gap, sizeOf(name, value.hi, input), c);
      numbers.log10_minus_gtt_locus = logarithm(value, ln);
      numbers.minus_gtt_locus = exponential(value, ln);
    } else numbers[name as NumericColumn] = bounded(value, gap, sizeOf(name, value.hi, input), c);
  }
  const more = other.evidence as Record<string, number | DoubleDouble | undefined>;
  for (const [name, value] of Object.entries(wide.evidence)) {
    const gap = more[name] === undefined ? Infinity : difference(more[name]!, value);
    // the two runs may meet a locus after different steps: what they differ by is the bound
    const ratio = name === "throat_condition" ? 1 : c.ratio;
    evidence[name] = bounded(value, gap, evidenceSize(name, input), { ...c, ratio });
  }
  return { numbers, evidence };
}

/** Sizes whose 2^-70 part the sign of a deciding quantity cannot resolve. */
function evidenceSize(name: string, input: RowInput): number {
  if (name !== "mass_above_critical") return 0;
  return input.massAboveCritical !== undefined
    ? 0
    : 2 ** -28 * Math.max(Math.abs(input.mass ?? 0), input.kappa);
}

/** Error of the double-double value itself, without the rounding of its leading part. */
function own(value: DoubleDouble, b: Bounded): number {
  return Math.max(b.error! - Math.abs(value.lo), 0);
}

function logarithm(value: DoubleDouble, ln: Bounded): Bounded {
  const log = A.div(value, LN10);
  return {
    value: log.hi,
    error: (Math.abs(log.lo) + own(value, ln) / 2.3) * (1 + 2 ** -50) + 2 ** -98 * Math.abs(log.hi),
  };
}

function exponential(value: DoubleDouble, ln: Bounded): Bounded {
  const g = A.exp(value);
  if (g.hi === Infinity) return { value: Infinity };
  if (g.hi === 0) return { value: 0, error: Number.MIN_VALUE };
  const tiny = g.hi < 1e-290 ? Number.MIN_VALUE : 0; // the low part, too, may have lost bits
  const rounding = tiny ? g.hi * 2 ** -53 : Math.abs(g.lo);
  return {
    value: g.hi,
    error:
      (rounding + g.hi * (Math.expm1(Math.min(own(value, ln), 700)) + 2 ** -96)) * (1 + 2 ** -50) +
      tiny,
  };
}
