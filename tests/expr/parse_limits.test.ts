import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";

describe("parse refuses what could run code or hang, by counted limits", () => {
  it.each([
    ["9^9^9^9", "needs brackets"],
    ["(((9^64)^64)^64)^64", "exact constant"],
    ["2000!", "only numbers"],
    ["(".repeat(10_000) + "x" + ")".repeat(10_000), "nest"],
    [Array(9000).fill("1e400").join("*"), "exact constant"],
    [Array(4000).fill("1e400/3e399").join("*"), "exact constant"],
    ["x^65", "exponent"],
    ["constructor", "reserved"],
    ["prototype*2", "reserved"],
    ["__proto__", "only numbers"],
    ["globalThis.x", "only numbers"],
    ["f(x)", "function must be one of"],
    ["x;y", "only numbers"],
    ["1/0", "divisor"],
    [`${"x+".repeat(6000)}x`, "nodes"],
    ["x".repeat(70_000), "characters"],
    ["", "must follow"],
  ])("%.30s", (text, message) => {
    const begin = performance.now();
    expect(() => parse(text)).toThrow(message);
    expect(performance.now() - begin).toBeLessThan(2000); // milliseconds; most take under ten
  });

  it("treats names of JavaScript's own as names or refuses them, and never reaches them", () => {
    expect(parse("eval")).toEqual({ kind: "sym", name: "eval" });
    expect(() => parse("eval(x)")).toThrow("function must be one of");
  });
});
