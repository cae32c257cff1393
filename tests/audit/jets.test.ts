import { describe, expect, it } from "vitest";
import { Jets } from "../../lib/audit/jets.ts";
import { solveLinear } from "../../lib/audit/shell.ts";
import { type Expr, isNum, sub } from "../../lib/expr/tree.ts";
import { decideZero } from "../../lib/expr/zero.ts";

const line = new Jets({ coordinates: ["x"], fields: ["q", "r"] });
const plane = new Jets({ coordinates: ["t", "x"], fields: ["u"] });
const open = new Jets({ coordinates: ["x"], fields: ["q"], functions: { f: "q", w: "x" } });

async function same(left: Expr, right: Expr) {
  const signed = Object.fromEntries(["q", "u"].map((name) => [name, [0.2, 1.9]] as const));
  expect((await decideZero(sub(left, right), { ranges: signed })).verdict).toBe("proved");
}

describe("The Euler-Lagrange operator", () => {
  // I. M. Gelfand & S. V. Fomin, Calculus of Variations (1963): the operator in one and several variables; the
  // derivatives of these Lagrangians taken by hand
  it.each([
    ["d(q,x)^2/2 - q^4/4", "-d(q,x,x) - q^3"],
    ["d(q,x,x)^2/2", "d(q,x,x,x,x)"],
    ["d(q,x,x,x)^2/2", "-d(q,x,x,x,x,x,x)"],
    ["d(q,x,x,x,x)^2/2", "d(q,x,x,x,x,x,x,x,x)"],
    ["sqrt(1+d(q,x)^2)", "-d(q,x,x)/sqrt(1+d(q,x)^2)^3"],
    ["q*d(q,x,x)", "2*d(q,x,x)"],
    ["x*q*d(q,x)", "-q"],
    ["exp(q)*d(r,x)", "exp(q)*d(r,x)"],
  ])("of %s is %s", async (lagrangian, right) => {
    await same(line.euler(line.read(lagrangian), "q"), line.read(right));
  });

  it.each([
    ["d(u,t)^2/2 - d(u,x)^2/2", "d(u,x,x) - d(u,t,t)"],
    ["d(u,t,x)^2/2", "d(u,t,t,x,x)"],
    ["d(u,x)*d(u,t)/2 + d(u,x)^3 - d(u,x,x)^2/2", "-d(u,t,x) - 6*d(u,x)*d(u,x,x) - d(u,x,x,x,x)"],
  ])("in two coordinates, of %s is %s", async (lagrangian, right) => {
    await same(plane.euler(plane.read(lagrangian), "u"), plane.read(right));
  });

  it("is zero on total derivatives, of any order", () => {
    for (const f of ["q^3*exp(x)", "d(q,x)^2*q", "d(q,x,x)*d(r,x)/(1+q^2)"]) {
      const e = line.euler(line.read(`d(${f},x)`), "q");
      expect(isNum(e, 0), f).toBe(true);
    }
    expect(isNum(plane.euler(plane.read("d(u*d(u,x),t) - d(u*d(u,t),x)"), "u"), 0)).toBe(true);
  });

  it("uses the chain rule on open functions of fields and of coordinates", async () => {
    await same(
      open.euler(open.read("f*d(q,x)^2 + w*q"), "q"),
      open.read("-d(f,q)*d(q,x)^2 - 2*f*d(q,x,x) + w"),
    );
    await same(open.read("d(w*f,x)"), open.read("d(w,x)*f + w*d(f,q)*d(q,x)"));
  });
});

describe("solveLinear", () => {
  it("gives rules for one and for two names", async () => {
    const e = line.read("2*d(q,x,x) + q*d(r,x,x) - x"), f = line.read("d(q,x,x) - d(r,x,x)");
    const rules = solveLinear([e, f], ["d(q, x, x)", "d(r, x, x)"], line);
    for (const { by } of rules) await same(by, line.read("x/(2+q)"));
  });

  it("refuses equations that are not linear, or not one or two", () => {
    const square = line.read("d(q,x,x)^2 - 1");
    expect(() => solveLinear([square], ["d(q, x, x)"], line)).toThrow("must be linear");
    expect(() => solveLinear([square, square, square], ["a", "b", "c"], line)).toThrow(
      "one or two",
    );
  });
});
