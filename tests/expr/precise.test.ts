import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { mathjsDerivative, precise } from "../../lib/expr/precise.ts";
import { compare } from "../../lib/expr/verify.ts";

describe("precise", () => {
  it("gives published digits of e, log 2 and sqrt 2", async () => {
    const { evaluate } = await precise(60);
    const digits = (text: string) => evaluate(parse(text), {}).toFixed(50);
    // OEIS A001113, A002162, A002193
    expect(digits("exp(1)")).toBe("2.71828182845904523536028747135266249775724709369996");
    expect(digits("log(2)")).toBe("0.69314718055994530941723212145817656807550013436026");
    expect(digits("sqrt(2)")).toBe("1.41421356237309504880168872420969807856967187537695");
  });

  it("knows pi, which no point draws", async () => {
    const { evaluate } = await precise(60);
    // OEIS A000796
    expect(evaluate(parse("pi"), {}).toFixed(50)).toBe(
      "3.14159265358979323846264338327950288419716939937511",
    );
    expect((await compare(parse("pi"), parse("355/113"))).outcome).toBe("differ");
  });

  it("keeps all digits of expm1, log1p and sqrt1pm1 at tiny and small arguments", async () => {
    const low = await precise(40), high = await precise(400);
    for (const fn of ["expm1", "log1p", "sqrt1pm1"]) {
      const long = { expm1: "exp(x)-1", log1p: "log(1+x)", sqrt1pm1: "sqrt(1+x)-1" }[fn]!;
      for (const x of ["1e-150", "-3e-60", "1e-21", "2e-19", "-1e-3", "0.4", "7"]) {
        if (fn === "expm1" || Number(x) > -1) {
          const a = high.big(low.evaluate(parse(`${fn}(x)`), { x }));
          const b = high.evaluate(parse(long), { x });
          // 2 digits above the working precision of 40, for the last operations' rounding
          expect(a.div(b).minus(1).abs().lt("1e-38"), `${fn}(${x})`).toBe(true);
        }
      }
    }
  });

  it("is not a number outside the real domain, and never infinite by a zero divisor", async () => {
    const { evaluate } = await precise();
    for (
      const text of ["log(0-x)", "sqrt(0-x)", "1/(x-1)", "(x-1)^(-2)", "log(x-1)", "(0-x)^(1/3)"]
    ) {
      expect(evaluate(parse(text), { x: 1 }).isFinite(), text).toBe(false);
    }
  });

  it("has a scale that shows hidden cancellations", async () => {
    const { evaluateScaled } = await precise(64);
    const { value, scale } = evaluateScaled(parse("exp(x)*((x+y)^2 - x^2 - 2*x*y - y^2)*z/(1+x)"), {
      x: "0.123456789012345678901234567890123456789012345678901234567890123456789",
      y: "0.7",
      z: "1e20",
    });
    expect(value.abs().lte(scale.times("1e-60"))).toBe(true);
    expect(scale.gt("1e18")).toBe(true);
  });

  it("names the missing value", async () => {
    const { evaluate } = await precise();
    expect(() => evaluate(parse("x+phi"), { x: 1 })).toThrow("current name is phi");
  });
});

describe("mathjsDerivative", () => {
  it.each([
    ["e^2*phi", "e", "2*e*phi"],
    ["i*pi*tau", "tau", "i*pi"],
    ["exp(-2*phi)", "phi", "-2*exp(-2*phi)"],
    ["m*s^3", "s", "3*m*s^2"],
    ["x", "phi", "0"],
  ])("takes names that mathjs predefines as plain names: d(%s)/d%s", async (text, name, right) => {
    const d = await mathjsDerivative(parse(text), name);
    expect((await compare(d, parse(right))).outcome).toBe("agree");
  });
});
