/**
 * First-order back-reaction of a stress tensor on the Schwarzschild metric:
 *
 *     ds^2 = -e^{2 psi} (1 - 2 (M + m)/r) dt^2 + dr^2/(1 - 2 (M + m)/r) + r^2 dOmega,
 *     m' = 4 pi r^2 epsilon,   psi' = 4 pi r (epsilon + p)/(1 - 2M/r),
 *
 * G = 1 (Einstein's equations to first order; J. W. York, Phys. Rev. D 31 (1985) 775, with w = 2M/r). Quadrature is by
 * power series in w, in double and in double-double arithmetic.
 *
 * @module
 */
import { lower } from "../expr/lower.ts";
import type { Program } from "../expr/program.ts";
import { normalForm } from "../expr/normal.ts";
import { parse } from "../expr/parse.ts";
import { type Expr, names, substitute } from "../expr/tree.ts";
import { AGAINST_DOUBLE, bounded } from "../observe/bound.ts";
import type { Bounded } from "../observe/result.ts";
import { double } from "../solve/arithmetic/double.ts";
import { type DoubleDouble, doubleDouble } from "../solve/arithmetic/double_double.ts";
import { doubleDoubleCode, DoubleDoubleWalker } from "../solve/series/double_double_walker.ts";
import { doubleCode, DoubleWalker } from "../solve/series/double_walker.ts";
import type { Walker } from "../solve/series/walker.ts";
import { SETTINGS } from "../solve/settings.ts";

/** Energy density -T^t_t and radial pressure T^r_r over r and M, in the grammar of expressions. */
export interface RadialSource {
  /** -T^t_t. */
  readonly energy: string;
  /** T^r_r. */
  readonly pressure: string;
}

/** The first-order metric at one radius. */
export interface Correction {
  /** Added mass. */
  readonly m: Bounded;
  /** Redshift function. */
  readonly psi: Bounded;
  /** Relative change of -g_tt: 2 psi - 2 m/(r - 2M). */
  readonly relative: Bounded;
}

/** First-order back-reaction on a hole. */
export interface BackReaction {
  /** The correction at radius r. */
  at(r: number): Correction;
  /**
   * Relative first-order change of the horizon's temperature for clocks at radius r, against the vacuum hole of the same
   * horizon radius.
   *
   * @throws {RangeError} unless the start is the horizon.
   */
  temperatureShift(r: number): Bounded;
  /**
   * Where the relative change of -g_tt first reaches `fraction` in size on the way from the start, as r/2M - 1 in
   * double precision (relative error below 1e-6); undefined if it does not do so outside r/2M - 1 = 1e-60.
   */
  reaches(fraction: number): number | undefined;
}

const MOST_STEPS = 4000;
const CLOSEST = 1e-60; // to the horizon, as r/2M - 1

interface Values<T> {
  readonly m: T;
  readonly psi: T;
}

/**
 * First-order back-reaction on a hole of mass M.
 *
 * @param source Tensor on the Schwarzschild metric; must be conserved for the result to solve all equations.
 * @param mass M, positive.
 * @param from Where m = psi = 0: a radius (the horizon 2M included, where (epsilon + p)/(1 - 2M/r) must be
 * regular), or Infinity.
 * @throws {ReferenceError} if the source holds other names than r, M and pi.
 * @throws {RangeError} if M or the radius is out of range.
 * @example Vacuum changes nothing
 * ```ts
 * import { backReaction } from "@backstamp/backstamp";
 * const none = backReaction({ energy: "0", pressure: "0" }, 1, Infinity);
 * if (none.at(3).m.value !== 0) throw new Error("a mass out of nothing");
 * ```
 */
export function backReaction(source: RadialSource, mass: number, from: number): BackReaction {
  if (!(mass > 0 && mass < Infinity) || !(from >= 2 * mass)) {
    throw new RangeError(
      `Cannot integrate the source as M must be positive and the start at 2M or outside: current values are ${mass} and ${from}`,
    );
  }
  const along = (variable: "w" | "d"): Program => {
    const w = variable === "w" ? "w" : "(1-d)", sign = variable === "w" ? "-" : "";
    const read = (text: string): Expr => {
      const e = parse(text), strange = names(e).find((n) => !["r", "M", "pi"].includes(n));
      if (strange === undefined) return substitute(e, { r: parse(`2*M/${w}`) });
      throw new ReferenceError(
        `Cannot use the source as it may hold r, M and pi only: it holds ${strange}`,
      );
    };
    const both = { e: read(source.energy), p: read(source.pressure) };
    const tidy = (text: string) =>
      normalForm(substitute(parse(`${sign}(${text})`), both), { positive: () => true });
    return lower({
      independent: variable,
      unknowns: ["m", "psi"],
      parameters: ["M", "pi"],
      let: [],
      derivative: { m: "dm", psi: "dpsi" },
      series: [],
      outputs: [],
    }, {
      // r = 2M/w, dr = -(2M/w^2) dw, dw = -dd; factors that cancel are divided out
      dm: tidy(`32*pi*M^3*e/${w}^4`),
      dpsi: tidy(`16*pi*M^2*(e+p)/(${w}^3*(1-${w}))`),
    });
  };
  const program = along("w");
  const narrow = doubleCode(program, SETTINGS.double);
  const fine = doubleDoubleCode(program, SETTINGS.doubleDouble);
  const start = from === Infinity ? 0 : 2 * mass / from;
  // in units of 1/M and 1/M^2; small, so that the first step from infinity keeps all digits far out
  const floors = { m: 1e-40 / mass, psi: 1e-40 / (mass * mass) };
  const walkers = {
    quick: () => new DoubleWalker(narrow, { M: mass, pi: double.pi }, floors, 0.01),
    wide: () => {
      const A = doubleDouble;
      return new DoubleDoubleWalker(fine, { M: A.from(mass), pi: A.pi }, floors, 0.01);
    },
  };
  const one = (v: DoubleDouble, other: number) =>
    bounded(v, v.hi - other, Math.abs(v.hi), AGAINST_DOUBLE);
  /** m, psi and the relative change of -g_tt at r, in both arithmetics. */
  const change = (r: number) => {
    const A = doubleDouble, two = A.mul(A.from(2), A.from(mass)), gap = A.sub(A.from(r), two);
    const of = (radius: number) => radius === Infinity ? A.from(0) : A.div(two, A.from(radius));
    const x = run(walkers.quick(), start, 2 * mass / r);
    const y = run(walkers.wide(), of(from), of(r));
    const wide = A.mul(A.from(2), A.sub(y.psi, A.div(y.m, gap)));
    return { x, y, wide, quick: 2 * (x.psi - x.m / (r - 2 * mass)) };
  };
  const at = (r: number): Correction => {
    const { x, y, wide, quick } = change(r);
    return { m: one(y.m, x.m), psi: one(y.psi, x.psi), relative: one(wide, quick) };
  };
  /** dm/dw at the horizon over M is -8 pi r^2 epsilon, what energy there takes off the surface gravity. */
  const slope = <T>(walker: Walker<T>): T => {
    const A = walker.arithmetic;
    walker.place(A.from(1), [A.from(0), A.from(0)]);
    walker.expand([]);
    return A.div(walker.coefficient("m", 1), A.from(mass));
  };
  const temperatureShift = (r: number): Bounded => {
    if (from !== 2 * mass) {
      throw new RangeError(
        `Cannot give the temperature as the start must be the horizon 2M = ${
          2 * mass
        }: current start is ${from}`,
      );
    }
    const A = doubleDouble, { wide, quick } = change(r), half = A.ratio(1n, 2n);
    const fine = A.sub(slope(walkers.wide()), A.mul(half, wide));
    return one(fine, slope(walkers.quick()) - quick / 2);
  };
  return {
    at,
    temperatureShift,
    reaches: (fraction) => {
      const code = doubleCode(along("d"), SETTINGS.double);
      const walker = new DoubleWalker(code, { M: mass, pi: double.pi }, floors, 0.01);
      return reaches(walker, 1 - start, mass, fraction);
    },
  };
}

/** m and psi at w, from 0 at `start`. */
function run<T>(walker: Walker<T>, start: T, w: T): Values<T> {
  const A = walker.arithmetic, close = A.epsilon * Math.abs(A.toNumber(w));
  walker.place(start, [A.from(0), A.from(0)]);
  for (let i = 0; i < MOST_STEPS; i++) {
    const left = A.toNumber(A.sub(w, walker.time()));
    if (Math.abs(left) <= close) {
      const [m, psi] = walker.state() as [T, T];
      return { m, psi };
    }
    const step = Math.min(walker.expand([]), Math.abs(left));
    if (!(step > 0)) break;
    walker.advance(Math.sign(left) * step);
  }
  throw new RangeError(
    `Cannot integrate the source to 2M/r = ${A.toNumber(w)} as it must be regular on the way: ` +
      `it stops at ${A.toNumber(walker.time())}`,
  );
}

/** Bisection within the step in which |relative change| passes the fraction; d = 1 - 2M/r from `start`. */
function reaches(
  walker: Walker<number>,
  start: number,
  mass: number,
  fraction: number,
): number | undefined {
  const away = start > 0.5 ? -1 : 1, last = away < 0 ? CLOSEST : 1;
  const excess = (d: number, m: number, psi: number) =>
    Math.abs(2 * psi - m * (1 - d) / (mass * d)) - fraction;
  walker.place(start, [0, 0]);
  for (let i = 0; i < MOST_STEPS; i++) {
    const t = walker.time(), left = Math.abs(last - t);
    // a pole at d = 0 lies ahead: half of the way at most
    const step = Math.min(walker.expand([]), away < 0 ? t / 2 : left, left);
    if (!(step > 0) || (away < 0 && t <= CLOSEST)) return undefined;
    const value = (h: number) => excess(t + h, walker.series("m", h), walker.series("psi", h));
    if (value(away * step) >= 0) {
      let [low, high] = [0, away * step];
      for (let k = 0; k < 60; k++) {
        const middle = (low + high) / 2;
        if (value(middle) >= 0) high = middle;
        else low = middle;
      }
      const d = t + high;
      return d / (1 - d);
    }
    walker.advance(away * step);
  }
  return undefined;
}
