import { describe, expect, it } from "vitest";
import { differentiate, type Discarded, simplify } from "../../lib/expr/algebra.ts";
import { parse } from "../../lib/expr/parse.ts";
import { AlgebraKilled, propose } from "../../lib/expr/proposer.ts";
import { compare, differences } from "../../lib/expr/verify.ts";
import { decideZero } from "../../lib/expr/zero.ts";

describe("differentiate", () => {
  // derivatives taken by hand
  it.each([
    ["y*sqrt(x)", "y", "sqrt(x)"],
    ["exp(sqrt(x))", "x", "exp(sqrt(x))/(2*sqrt(x))"],
    ["(1+sqrt(x))^2", "x", "1 + 1/sqrt(x)"],
    ["x^2*sqrt(x+1)", "x", "(5*x^2+4*x)/(2*sqrt(x+1))"],
    ["log(c*x^2)", "x", "2/x"],
    ["sqrt(exp(x))", "x", "exp(x/2)/2"],
    ["expm1(-2*x)", "x", "-2*exp(-2*x)"],
    ["log1p(x^2)", "x", "2*x/(1+x^2)"],
    ["sqrt1pm1(x)", "x", "1/(2*sqrt(1+x))"],
    ["exp(-2*phi) + kappa*(a-1)*phi", "phi", "-2*exp(-2*phi) + kappa*(a-1)"],
    ["e*i^2*pi", "i", "2*e*i*pi"],
    ["1e-20*x^2", "x", "2e-20*x"],
    ["x^y", "y", "x^y*log(x)"],
    ["0.3333333333333333333333333333333333*x", "x", "0.3333333333333333333333333333333333"],
  ])("d(%s)/d%s is %s", async (text, name, right) => {
    const d = await differentiate(parse(text), name);
    expect((await compare(d, parse(right))).outcome).toBe("agree");
  });

  it("records why a proposal was not taken", async () => {
    const discarded: Discarded[] = [];
    await differentiate(parse("sqrt(exp(x))"), "x", { discarded });
    expect(discarded).toHaveLength(1);
    expect(discarded[0]!.op).toBe("diff");
  });

  it("throws where no point lies inside the domain", async () => {
    await expect(differentiate(parse("sqrt(-1-x^2)"), "x")).rejects.toThrow("Cannot differentiate");
  });

  it("works inside given ranges", async () => {
    const d = await differentiate(parse("sqrt(-1-x)"), "x", { ranges: { x: [-3, -2] } });
    const w = await compare(d, parse("-1/(2*sqrt(-1-x))"), { ranges: { x: [-3, -2] } });
    expect(w.outcome).toBe("agree");
  });
});

describe("differences", () => {
  it("see a derivative that is wrong by one part in 10^30", async () => {
    const wrong = parse("2*x + 1e-30*x");
    expect((await differences(parse("x^2"), "x", wrong)).outcome).toBe("differ");
    expect((await differences(parse("x^2"), "x", parse("2*x"))).outcome).toBe("agree");
  });
});

describe("simplify", () => {
  // each of these is a known wrong simplification of the algebra system
  it.each(["1-x/3", "log(2*x+2*y)", "(x-y)/(y-x)", "sqrt(2*a+2*b)", "log(x/y)-log(x)+log(y)"])(
    "never changes the value of %s",
    async (text) => {
      const s = await simplify(parse(text));
      const w = await compare(parse(text), s, { seed: 99, count: 10 });
      expect(w.outcome).toBe("agree");
    },
  );

  it("takes a right and shorter form", async () => {
    expect(await simplify(parse("x+x+x-2*x*y/y"))).toEqual(parse("x"));
  });
});

describe("decideZero", () => {
  it("proves an expansion, and says when only numbers speak for it", async () => {
    expect((await decideZero(parse("(x+y)^2-x^2-2*x*y-y^2"))).verdict).toBe("proved");
    const h = await decideZero(parse("log(2*x+2*y)-log(x+y)-log(2)"));
    expect(h.verdict === "holds-numerically" || h.verdict === "proved").toBe(true);
    expect(h.witness.count).toBe(20);
  });

  it("calls a term of relative size 1e-30 non-zero, with a point", async () => {
    const d = await decideZero(parse("(x+y)^2-x^2-2*x*y-y^2+1e-30*x"));
    expect(d.verdict).toBe("nonzero");
    expect(Object.keys(d.witness.at!)).toEqual(["x", "y"]);
  });

  it("is undecided outside the domain", async () => {
    expect((await decideZero(parse("log(-x)-log(-2*x)"))).verdict).toBe("undecided");
  });
});

describe("propose", () => {
  it("kills a request that does not end, which is an error, and works afterwards", async () => {
    const long = propose({ op: "expand", text: "(a+b+c+d)^60" }, 700);
    await expect(long).rejects.toThrow(AlgebraKilled);
    expect(await propose({ op: "diff", text: "x^2", name: "x" })).toEqual({ text: "2*x" });
  });
});
