import { describe, expect, it } from "vitest";
import { claimsAudits } from "../../lib/audit/claims.ts";
import { ClaimsError, readClaims } from "../../lib/audit/claims_file.ts";

const faults = (text: string): readonly string[] => {
  try {
    claimsAudits(readClaims(text));
  } catch (error) {
    if (error instanceof ClaimsError) return error.faults;
    throw error;
  }
  return [];
};
const head = "title: t\nsetting: static\nmodel: rst\n";
const claim = (left: string, more = "") =>
  `claims:\n  - {id: a, statement: s, left: "${left}", right: 0${more}}\n`;

describe("A claims file is refused with line and column", () => {
  it.each([
    ["title: [", "line 1, column 9"],
    [
      "title: t\nsetting: statics\nclaims: []\n",
      'Cannot use setting, line 2, column 10, as it must be one of static, light-cone, free: current value is "statics"',
    ],
    [
      head + "claim: 1\n" + claim("1"),
      "Cannot use the file, line 4, column 8, as it must not have the part: current value is claim",
    ],
    [
      head + "claims: [{id: a}]\n",
      "claims.0, line 4, column 10, as it must have required property 'left'",
    ],
    [head + claim("exp(2*rho) +"), "claims.0.left, line 5, column 33: Cannot read the expression"],
    [
      head + claim("rho + kapa"),
      "Cannot use the name kapa as it must be declared or part of the setting (nearest: kappa)",
    ],
    [head + claim("e^2"), "write exp(1)"],
    [head + claim("ln(phi)"), "a function must be one of"],
    [
      head + claim("d(H, sigm)"),
      "Cannot use the name sigm as it must be a coordinate, field or constant to differentiate by it (nearest: sigma)",
    ],
    [head + claim("d(d(rh, sigma), sigma)"), "Cannot use the name rh "],
    [head + claim("1/(2-2)"), "a divisor must not be 0"],
    [head + claim("1/d(kappa, sigma)"), "Cannot divide as the divisor must not be the exact zero"],
    [
      head + "constants: [kappa]\n" + claim("1"),
      "constants.0, line 4, column 13: Cannot declare the name kappa as it must be new",
    ],
    [head + "define: {g: q}\n" + claim("g"), "define.g, line 4, column 13: Cannot use the name q"],
    [
      head + "ranges: {phi: [2, 1]}\n" + claim("1"),
      "ranges.phi, line 4, column 15: Cannot use the range as it must rise",
    ],
    [head + "ranges: {zeta: [1, 2]}\n" + claim("1"), "Cannot use the name zeta"],
    [
      head + "quantities: {q: mass}\n" + claim("1"),
      "Cannot use the name q as it must be a constant or defined",
    ],
    [
      head + "fields: [f]\n" + claim("1"),
      "fields, line 4, column 9: Cannot use it as the setting must have it: current setting is static",
    ],
    [
      "title: t\nsetting: static\nmodel: rts\n" + claim("1"),
      "model, line 3, column 8: Cannot audit the model as its name must be one of",
    ],
    ["title: t\nsetting: light-cone\n" + claim("1"), "a model must be named"],
    [
      head + "convention: mine\n" + claim("1"),
      "convention, line 4, column 13: Cannot use the convention as its name must be one of house",
    ],
    [
      head + claim("1", ", convention: mine"),
      "claims.0.convention, line 5, column 60: Cannot use the convention",
    ],
    [
      "title: t\nsetting: static\nmodel: {H: 1, K: 0, V: 0}\n" + claim("1"),
      "model, line 3, column 8",
    ],
    [
      'title: t\nsetting: free\nrules: {"x+1": 2}\nconstants: [x]\n' + claim("1"),
      "Cannot use the rule as its left side must be a name",
    ],
    ["a: &a [x]\nb: [*a, *a]\n" + head.repeat(2), "Map keys must be unique"],
  ])("%.60s", (text, message) => {
    expect(faults(text).join("\n")).toContain(message);
  });

  it("with all faults at once", () => {
    const text = `${head}constants: [rho]\nclaims:\n` +
      `  - {id: a, statement: s, left: x1, right: "("}\n  - {id: a, statement: s, left: 1, right: x2}\n`;
    expect(faults(text)).toHaveLength(5);
  });
});

describe("A hostile claims file", () => {
  it.each([
    ["9^9^9^9", "needs brackets"],
    ["2000!", "only numbers"],
    ["(".repeat(10_000) + "1" + ")".repeat(10_000), "nest"],
    ["constructor", "reserved"],
    ["__proto__", "only numbers"],
    ["globalThis.x", "only numbers"],
    ["rho; rho", "only numbers"],
    ["d(rho, sigma, sigma, sigma, sigma, sigma, sigma, sigma, sigma, sigma)", "must follow"],
    ["x".repeat(66_000), "must NOT have more than 65536 characters"],
  ])("is refused by counted limits: %.30s", (left, message) => {
    expect(faults(head + claim(left)).join("\n")).toContain(message);
  });

  it("cannot name a prototype's member, run a tag, or unfold without end", () => {
    for (const name of ["__proto__", "constructor", "toString", "exp", "d", "pi"]) {
      expect(faults(`${head}define: {${name}: 1}\n${claim("1")}`).length, name).toBeGreaterThan(0);
    }
    expect(faults(`title: !!js/function "function(){}"\n`).length).toBeGreaterThan(0);
    const bomb = ["a: &a [x,x,x,x,x,x,x,x,x]"];
    for (let i = 1; i < 12; i++) {
      bomb.push(`b${i}: &b${i} [${Array(9).fill(i > 1 ? `*b${i - 1}` : "*a")}]`);
    }
    expect(faults(bomb.join("\n")).join()).toMatch(/alias/i);
    expect(faults(`title: ${"x".repeat(2_000_000)}\n`)[0]).toContain("at most 1000000 characters");
  });
});
