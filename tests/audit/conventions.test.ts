import { afterAll, describe, expect, it } from "vitest";
import { conventionOf, CONVENTIONS, conversion, QUANTITIES } from "../../lib/audit/conventions.ts";
import { runClaims } from "../../lib/audit/run_claims.ts";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { normalForm } from "../../lib/expr/normal.ts";
import { print } from "../../lib/expr/print.ts";
import { isNum, mul } from "../../lib/expr/tree.ts";

afterAll(closeAlgebra);

describe("Conventions", () => {
  it("convert there and back to exactly one, and along any way to the same, for every pair", () => {
    for (const quantity of QUANTITIES) {
      for (const a of CONVENTIONS) {
        for (const b of CONVENTIONS) {
          const there = conversion(quantity, a, b), back = conversion(quantity, b, a);
          expect(isNum(normalForm(mul(there, back)), 1), `${quantity} ${a.name} ${b.name}`).toBe(
            true,
          );
          for (const c of CONVENTIONS) {
            const way = normalForm(mul(there, conversion(quantity, b, c)));
            expect(print(way)).toBe(print(conversion(quantity, a, c)));
          }
        }
      }
    }
  });

  // worked by hand from the definitions
  it.each([
    ["kappa", "house", "kappa-24", "1/2"],
    ["kappa", "kappa-48", "kappa-24", "2"],
    ["action", "house", "four-dimensional", "2/pi"],
    ["action", "bare-action", "half-action", "2"],
    ["curvature", "house", "negative-curvature", "-1"],
    ["mass", "house", "canonical-mass", "1/pi"],
    ["flux", "pulse", "house", "1/pi"],
  ])("%s from %s to %s: %s", (quantity, a, b, factor) => {
    const found = conversion(quantity as "kappa", conventionOf(a), conventionOf(b));
    expect(print(found)).toBe(factor);
  });

  it("let one claim be stated in each, and refuse it with the factor of another", async () => {
    // box H - V = kappa R/2 of the house convention, by the factors above
    const right: Record<string, string> = {
      "house": "kappa*R/2",
      "kappa-24": "kappa*R",
      "kappa-48": "2*kappa*R",
      "negative-curvature": "-kappa*R/2",
      "four-dimensional": "kappa*R/pi",
      "half-action": "kappa*R/(2*pi)",
      "bare-action": "kappa*R/(4*pi)",
      "pulse": "kappa*R/2",
      "canonical-mass": "kappa*R/2",
    };
    const claims = CONVENTIONS.flatMap(({ name }) =>
      CONVENTIONS.map((other) => ({
        id: `${name}-${other.name}`,
        statement: "trace",
        left: "exp(-2*rho)*d(H, sigma, sigma) - V",
        right: right[other.name]!,
        on_shell: true,
        convention: name,
      }))
    );
    for (const model of ["any", "swave"]) {
      const file = { title: "trace", setting: "static", model, claims };
      const ledger = await runClaims(JSON.stringify(file));
      for (const step of ledger.parts[1]!.steps) {
        const [name, other] = claims.flatMap(({ id, convention, right: text }) =>
          id === step.id ? [convention, text] : []
        );
        expect(step.verdict, step.id).toBe(right[name!] === other ? "proved" : "refuted");
        expect(step.convention).toBe(name);
        if (step.verdict === "refuted") {
          expect(step.repair, step.id).toMatch(/^left side = \(.*\) \* right side$/);
        }
      }
    }
  });
});
