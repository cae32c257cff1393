import { describe, expect, it } from "vitest";
import { lower } from "../../lib/expr/lower.ts";
import { double } from "../../lib/solve/arithmetic/double.ts";
import { type DoubleDouble, doubleDouble } from "../../lib/solve/arithmetic/double_double.ts";
import type { Arithmetic } from "../../lib/solve/arithmetic/arithmetic.ts";
import {
  doubleDoubleCode,
  DoubleDoubleWalker,
} from "../../lib/solve/series/double_double_walker.ts";
import { doubleCode, DoubleWalker } from "../../lib/solve/series/double_walker.ts";
import type { Walker } from "../../lib/solve/series/walker.ts";

// x' = f(t), x(0) = 0: each recurrence against an elementary antiderivative.
const third = <T>(A: Arithmetic<T>, t: T) => A.exp(A.mul(A.ratio(4n, 3n), A.log1p(t)));
const root = <T>(A: Arithmetic<T>, t: T) =>
  A.mul(A.ratio(2n, 3n), A.sub(A.mul(A.add(A.from(1), t), A.sqrt(A.add(A.from(1), t))), A.from(1)));
const logarithm = <T>(A: Arithmetic<T>, t: T) => A.sub(A.mul(A.add(A.from(1), t), A.log1p(t)), t);
const CASES: readonly [text: string, antiderivative: <T>(A: Arithmetic<T>, t: T) => T][] = [
  ["t*(2+3*t)", (A, t) => A.mul(A.mul(t, t), A.add(A.from(1), t))],
  ["(1+t)^2-(1-t)^2", (A, t) => A.mul(A.from(2), A.mul(t, t))],
  ["1/(1+t)", (A, t) => A.log1p(t)],
  ["t/(1+t)", (A, t) => A.sub(t, A.log1p(t))],
  ["exp(t)", (A, t) => A.expm1(t)],
  ["2*t*exp(t^2)", (A, t) => A.expm1(A.mul(t, t))],
  ["2*t*(1+expm1(t^2))", (A, t) => A.expm1(A.mul(t, t))],
  ["expm1(t)", (A, t) => A.sub(A.expm1(t), t)],
  ["log(1+t)", logarithm],
  ["log1p(t)", logarithm],
  ["sqrt(1+t)", root],
  ["sqrt1pm1(t)", (A, t) => A.sub(root(A, t), t)],
  ["(1+t)^(1/3)", (A, t) => A.mul(A.ratio(3n, 4n), A.sub(third(A, t), A.from(1)))],
  ["(1+t)^(-2)", (A, t) => A.div(t, A.add(A.from(1), t))],
];

function program(text: string) {
  return lower({
    independent: "t",
    unknowns: ["x"],
    parameters: [],
    let: [],
    derivative: { x: text },
    series: [],
    outputs: [],
  }, {});
}

function integrated<T>(walker: Walker<T>, end: number): T {
  walker.place(walker.arithmetic.from(0), [walker.arithmetic.from(0)]);
  for (let t = 0; t < end; t = walker.arithmetic.toNumber(walker.time())) {
    walker.advance(Math.min(walker.expand([]), end - t));
  }
  return walker.state()[0]!;
}

describe("The series of", () => {
  for (const [text, exact] of CASES) {
    it(`${text} integrates to its antiderivative in double precision`, () => {
      const code = doubleCode(program(text), { order: 24, tolerance: 1e-18 });
      const x = integrated(new DoubleWalker(code, {}, {}, 0.25), 0.75), want = exact(double, 0.75);
      expect(Math.abs(x - want)).toBeLessThan(4e-15 * Math.abs(want)); // round-off of some ten steps
    });
    it(`${text} integrates to its antiderivative in double-double precision`, () => {
      const code = doubleDoubleCode(program(text), { order: 40, tolerance: 1e-33 });
      const walker = new DoubleDoubleWalker(code, {}, {}, 0.25);
      const x = integrated<DoubleDouble>(walker, 0.75);
      const want = exact(doubleDouble, walker.time()); // steps end within a rounding of 0.75
      const error = Math.abs(doubleDouble.sub(x, want).hi);
      expect(error).toBeLessThan(4e-30 * Math.abs(want.hi)); // 2^-98 of a function, over some ten steps
    });
  }
});

describe("A walker", () => {
  it("converges with the order of its series at fixed steps", () => {
    // x' = x^2, x(0) = 1: x = 1/(1 - t); local error ~ h^{n+1}, global ~ h^n
    const riccati = lower({
      independent: "t",
      unknowns: ["x"],
      parameters: [],
      let: [],
      derivative: { x: "x^2" },
      series: [],
      outputs: [],
    }, {});
    for (const order of [4, 6, 8]) {
      const error = (steps: number) => {
        const walker = new DoubleWalker(
          doubleCode(riccati, { order, tolerance: 1e-18 }),
          {},
          {},
          0.1,
        );
        walker.place(0, [1]);
        for (let i = 0; i < steps; i++) {
          walker.expand([]);
          walker.advance(0.5 / steps);
        }
        return Math.abs(walker.state()[0]! - 2);
      };
      const measured = Math.log2(error(8) / error(16));
      expect(Math.abs(measured - order)).toBeLessThan(0.5); // next order in h at h = 1/16
    }
  });

  it("keeps coefficients in range whatever the scale of its variable", () => {
    for (const scale of [1e-60, 1e-9, 1, 1e60]) {
      const stretched = lower({
        independent: "t",
        unknowns: ["x"],
        parameters: ["s"],
        let: [],
        derivative: { x: "x^2/s" },
        series: [],
        outputs: [],
      }, {});
      const walker = new DoubleWalker(
        doubleCode(stretched, { order: 24, tolerance: 1e-18 }),
        { s: scale },
        {},
        1,
      );
      const x = integratedFrom(walker, 1, scale / 2);
      expect(Math.abs(x - 2)).toBeLessThan(4e-15); // round-off
    }
  });
});

function integratedFrom(walker: Walker<number>, x: number, end: number): number {
  walker.place(0, [x]);
  while (walker.time() < end) walker.advance(Math.min(walker.expand([]), end - walker.time()));
  return walker.state()[0]!;
}
