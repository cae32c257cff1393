import { describe, expect, it } from "vitest";
import { size } from "../../lib/expr/algebra.ts";
import { expandedTerms } from "../../lib/expr/expanded.ts";
import { normalForm, normalIsZero } from "../../lib/expr/normal.ts";
import { parse } from "../../lib/expr/parse.ts";
import { compare } from "../../lib/expr/verify.ts";

describe("normalIsZero", () => {
  // identities of elementary functions, true on positive names
  it.each([
    "log(2*x+2*y)-log(x+y)-log(2)",
    "1/(x+y)+1/(x-y)-2*x/(x^2-y^2)",
    "sqrt(8)-2*sqrt(2)",
    "sqrt(x/(x+1))-sqrt(x)*sqrt(x+1)/(x+1)",
    "(sqrt(x)+1)/(x-1)-1/(sqrt(x)-1)",
    "x^y*x-x^(y+1)",
    "exp(2*log(x)+y/3)-x^2*exp(y/6)^2",
    "log(x^2*exp(-2*y)/(x+1))-2*log(x)+2*y+log(x+1)",
    "sqrt(x+sqrt(y))^2-x-sqrt(y)",
    "1/sqrt(x+y)-sqrt(x+y)/(x+y)",
    "expm1(x)-exp(x)+1",
    "log(sqrt(x))-log(x)/2",
  ])("reaches 0 for %s", (text) => {
    expect(normalIsZero(parse(text))).toBe(true);
  });

  it.each([
    "log(x+y)-log(x)",
    "sqrt(x)+sqrt(y)-sqrt(x+y)",
    "exp(x)-1-x",
    "1/(x+1)-1/(x+2)",
    "1e-30*x",
  ])(
    "does not reach 0 for %s",
    (text) => {
      expect(normalIsZero(parse(text))).toBe(false);
    },
  );

  it("does not take sqrt(x^2) for x where x may be negative", () => {
    expect(normalIsZero(parse("sqrt(x^2)-x"), { positive: () => false })).toBe(false);
    expect(normalIsZero(parse("sqrt(x^2)-x"))).toBe(true);
  });

  it("says when its counted budget is spent", () => {
    expect(normalIsZero(parse("(a+b+c+d)^60-1"), { budget: 1000 })).toMatch(/budget/);
  });
});

describe("expandedTerms", () => {
  // (n + k - 1 choose k) terms of a sum of n to the power k
  it.each([
    ["x*(y+1)", 2],
    ["(a+b)^3", 4],
    ["(a+b+c)^2/(1+x)", 12],
    ["(a+b+c+d)^60", 39711],
    ["x^(-2)", 1],
  ])("counts %s", (text, count) => {
    expect(expandedTerms(parse(text))).toBe(count);
  });

  it("stays finite where the number would not", () => {
    expect(expandedTerms(parse("((((a+b)^64+1)^64+1)^64+1)^64"))).toBe(1e12);
  });
});

describe("normalForm", () => {
  // the text of the form tells whether a factor was taken off
  it.each([
    ["(x^2-y^2)/(x+y)", "x - y"],
    ["(x^3-1)/(x-1)^2", "(x^2 + x + 1)/(x - 1)"],
    ["(exp(2*x)-y)/(exp(x)-sqrt(y))", "exp(x) + sqrt(y)"],
    ["(x*y^2-x)/(x*y+x)^2", "(y - 1)/(x*(y + 1))"],
  ])("divides %s out", async (text, right) => {
    const form = normalForm(parse(text));
    expect(size(form)).toBeLessThanOrEqual(size(parse(right)) + 4);
    expect((await compare(form, parse(right), { count: 8 })).outcome).toBe("agree");
  });

  it("does not divide where there is a rest", async () => {
    const e = parse("(x^2+y^2)/(x+y)");
    expect((await compare(normalForm(e), e, { count: 8 })).outcome).toBe("agree");
  });

  it.each([
    "exp(-2*phi)*(a+b)/(1+x)+3/(x+1)^2",
    "sqrt(x+y)^3/2-log(3*x)",
    "x^(-1/2)*(y-2)/(x*y)",
    "(2/3)^(1/2)*x^y*exp(x/(1+y))",
  ])("keeps the value of %s", async (text) => {
    expect((await compare(parse(text), normalForm(parse(text)), { count: 8 })).outcome).toBe(
      "agree",
    );
  });
});
