import { Solver } from "odex";
import { describe, expect, it } from "vitest";
import { anomalyOf, type FieldContent } from "../../lib/model/content.ts";
import { minimalSphere } from "../../lib/stress/minimal_sphere.ts";

const one: FieldContent = { scalars: 1, weyl: 0, vectors: 0 };
const scalar = anomalyOf(one, "zeta");

function sphere(content: FieldContent, mass: number) {
  const found = minimalSphere(anomalyOf(content, "zeta"), mass);
  if (found.outcome !== "solved") throw new Error(found.reason);
  return found;
}

/** The same equations with p = dR/dl as variable, by odex; alpha R = y from the quartic by Newton's method. */
function byOdex(g: number): { R: number; gtt: number } {
  const slope = (t: number, [lnR]: number[]) => {
    const p = -t, gamma = g * Math.exp(-2 * lnR!), rest = (1 - p) * (1 + p);
    let y = Math.min(rest / Math.max(2 * p, 1e-9), Math.sqrt(Math.sqrt(rest / gamma)));
    for (let i = 0; i < 50; i++) {
      y -= (gamma * y ** 4 + 2 * p * y - rest) / (4 * gamma * y ** 3 + 2 * p);
    }
    const D = rest + 3 * gamma * y ** 4;
    return [-2 * p / D, -2 * y / D];
  };
  const solver = new Solver(2);
  solver.absoluteTolerance = solver.relativeTolerance = 1e-12;
  const R0 = 400, p0 = Math.sqrt(1 - 2 / R0); // the source is of relative size g R^-6 there
  const { y: [lnR, psi] } = solver.solve(slope, -p0, [Math.log(R0), Math.log(p0)], 0);
  return { R: Math.exp(lnR!), gtt: Math.exp(2 * psi!) };
}

describe("The minimal sphere", () => {
  it("is where odex finds it with the slope of the radius as variable", () => {
    for (const mass of [3, 30]) {
      const found = sphere(one, mass), g = 1 / 180 / Math.PI / mass ** 2;
      const { R, gtt } = byOdex(g);
      // odex at 1e-12 a step, some hundred steps
      expect(found.radius.value / mass / R).toBeCloseTo(1, 9);
      expect(found.minusGtt.value / gtt).toBeCloseTo(1, 9);
    }
  });

  it("approaches the law (1/4) sqrt((a + beta/2)/S) over hierarchies 1e-2 to 1e-70, with the next order 1/M", () => {
    // own computation elsewhere: 0.9995863, 0.9999585, 0.9999958 at G/M^2 = 1e-4, 1e-6, 1e-8
    const share = (mass: number) => {
      const { minusGtt, law } = sphere(one, mass);
      return minusGtt.value / law;
    };
    expect(share(1e2)).toBeCloseTo(0.9995863, 6);
    expect(share(1e3)).toBeCloseTo(0.9999585, 6);
    expect(share(1e4)).toBeCloseTo(0.9999958, 6);
    for (let e = 2; e < 7; e++) expect((1 - share(10 ** e)) * 10 ** e).toBeCloseTo(0.0415, 3);
    expect(share(1e35)).toBeCloseTo(1, 14);
    expect(sphere(one, 10).law).toBeCloseTo(Math.sqrt(1 / 180 / (4 * Math.PI * 100)) / 4, 15);
  });

  it("fulfils alpha^4 = pi/(R^2 (a + beta/2)) within the bounds", () => {
    for (const mass of [1, 50, 1e20]) {
      const { radius, acceleration } = sphere(one, mass);
      const exact = Math.sqrt(Math.sqrt(180 * Math.PI) / radius.value);
      // the check itself rounds four times
      expect(Math.abs(acceleration.value / exact - 1)).toBeLessThan(
        acceleration.error! / exact + 4 * 2 ** -53,
      );
    }
  });

  it("has bounds of half a unit in the last place at every mass, and grows with the number of fields", () => {
    for (const mass of [1, 1e3, 1e30, 1e70]) {
      const found = sphere(one, mass);
      for (const { value, error } of [found.radius, found.minusGtt, found.acceleration]) {
        expect(error! / value).toBeLessThan(2 ** -52.9);
      }
      const many = sphere({ scalars: 400, weyl: 0, vectors: 0 }, mass);
      expect(many.law / found.law).toBeCloseTo(20, 12);
    }
  });

  it("is refused where the leading term vanishes or has the wrong sign, and the mass is out of range", () => {
    const vector = anomalyOf({ scalars: 0, weyl: 0, vectors: 1 }, "zeta");
    expect(minimalSphere(vector, 10).outcome).toBe("solved"); // 62/360 - 18/360 > 0
    const flat = { ...scalar, beta: { kind: "num", p: -1n, q: 180n } } as const;
    const wrong = { ...scalar, beta: { kind: "num", p: -1n, q: 10n } } as const;
    for (const c of [flat, wrong]) {
      const found = minimalSphere(c, 10);
      expect(found.outcome === "refused" && found.reason).toContain("no-leading-term: ");
    }
    for (const mass of [0, -1, NaN, Infinity, 1e71]) {
      expect(() => minimalSphere(scalar, mass)).toThrow("the mass must lie in");
    }
  });
});
