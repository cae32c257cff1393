import { type BigNumber, bignumber } from "mathjs";
import { describe, expect, it } from "vitest";
import { type DoubleDouble, doubleDouble as A } from "../../lib/solve/arithmetic/double_double.ts";
import { precise } from "../../lib/expr/precise.ts";
import { call, type FunctionName, sym } from "../../lib/expr/tree.ts";
import { exactly } from "../observe/exact.ts";
import { uniform } from "../reference/family_rows.ts";

const wide = (x: DoubleDouble): BigNumber => exactly(x.hi).add(exactly(x.lo)) as BigNumber;
const relative = (x: DoubleDouble, want: BigNumber) =>
  Math.abs(wide(x).sub(want).div(want).toNumber());
const { evaluate } = await precise(64);

describe("Double-double", () => {
  it("holds pi and ln 2 to 32 digits (OEIS A000796, A002162)", () => {
    const pi = bignumber("3.14159265358979323846264338327950288419716939937510582097494459");
    const ln2 = bignumber("0.693147180559945309417232121458176568075500134360255254120680009");
    expect(relative(A.pi, pi)).toBeLessThan(2 ** -104); // one rounding of the second part
    expect(relative(A.log(A.from(2)), ln2)).toBeLessThan(2 ** -98); // stated accuracy of functions
  });

  it("does the four operations and roots to 2^-102 on 300 seeded pairs", () => {
    const next = uniform(5);
    for (let i = 0; i < 300; i++) {
      const draw = () => A.div(A.from((next() - 0.5) * Math.exp(40 * (next() - 0.5))), A.from(3));
      const x = draw(), y = draw(), X = wide(x), Y = wide(y);
      expect(relative(A.mul(x, y), X.mul(Y) as BigNumber)).toBeLessThan(2 ** -102);
      expect(relative(A.div(x, y), X.div(Y) as BigNumber)).toBeLessThan(2 ** -101); // two more roundings
      expect(relative(A.add(x, y), X.add(Y) as BigNumber)).toBeLessThan(2 ** -102);
      const square = A.mul(x, x);
      expect(relative(A.sqrt(square), X.abs() as BigNumber)).toBeLessThan(2 ** -100); // error of the square, halved, and its own
    }
  });

  it("does exp, expm1, log, log1p, sqrt1pm1 to 2^-98 against mathjs at 64 digits", () => {
    const next = uniform(9);
    for (let i = 0; i < 200; i++) {
      const size = Math.exp(12 * (next() - 0.5)),
        x = A.mul(A.from(next() < 0.5 ? -size : size), A.ratio(1n, 3n));
      const positive = x.hi < 0 ? A.neg(x) : x;
      for (
        const fn of [
          "exp",
          "expm1",
          "log",
          "log1p",
          "sqrt1pm1",
        ] as const satisfies readonly FunctionName[]
      ) {
        const at = fn === "exp" || fn === "expm1" ? x : positive;
        const want = evaluate(call(fn, sym("x")), { x: wide(at) });
        const room = fn === "exp" && Math.abs(at.hi) > 1 ? Math.abs(at.hi) : 1; // exp magnifies the argument's rounding
        expect(relative(A[fn](at), want), `${fn}(${at.hi})`).toBeLessThan(room * 2 ** -98);
      }
    }
  });

  it("rounds ratios of integers once", () => {
    expect(relative(A.ratio(1n, 3n), bignumber(1).div(3) as BigNumber)).toBeLessThan(2 ** -104);
    expect(A.ratio(-3n, 4n)).toEqual({ hi: -0.75, lo: 0 });
  });
});
