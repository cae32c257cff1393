import { describe, expect, it } from "vitest";
import { enginesOf } from "../../lib/observe/engines.ts";
import { inwardFrame } from "../../lib/observe/frame.ts";
import { denseRun } from "../../lib/observe/inner_end.ts";
import { profileOf } from "../../lib/observe/profile.ts";
import type { DenseStep } from "../../lib/solve/engine.ts";
import { inputOf, models, profileOfRow, type ShortRow } from "./solved.ts";

const ROWS: readonly ShortRow[] = [
  { model: "cghs", state: "boulware", kappa: 1, mass: 10 },
  { model: "cghs", state: "hartle-hawking", kappa: 1, mass: 10 },
  { model: "cghs", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: 0.5 },
  { model: "rst", state: "thermal", kappa: 1, mass: 6, bathRatioMinusOne: 0.4 },
  { model: "rst", state: "boulware", kappa: 1, mass: 1e40 },
  { model: "bpp", state: "boulware", kappa: 1, mass: -3 },
  { model: "bpp", state: "hartle-hawking", kappa: 2, mass: 40 },
  {
    model: "solvable",
    a: 1.3,
    state: "thermal",
    kappa: 1,
    mass: 20,
    bathRatioMinusOne: -0.2,
    lambda: 3,
  },
  { model: "swave", state: "boulware", kappa: 1, mass: 1 },
  { model: "swave", state: "boulware", kappa: 1e-70, mass: 1 },
  { model: "swave", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: 0, wallRadius: 40 },
  { model: "swave", state: "hartle-hawking", kappa: 0.3, mass: 3, wallRadius: 30 },
];

/** f'' at point i from the quartic through five points, and the round-off in it. */
function secondDerivative(x: Float64Array, f: Float64Array, i: number) {
  const at = [-2, -1, 0, 1, 2].map((k) => x[i + k]! - x[i]!), eps = 2 ** -52;
  let value = 0, noise = 0;
  for (const j of [0, 1, 3, 4]) {
    const others = [0, 1, 2, 3, 4].filter((k) => k !== j).map((k) => at[k]!);
    let pairs = 0, below = 1;
    others.forEach((a, k) => {
      below *= at[j]! - a;
      for (const b of others.slice(k + 1)) pairs += a * b;
    });
    const weight = 2 * pairs / below, rise = f[i + j - 2]! - f[i]!;
    value += weight * rise;
    noise += eps * Math.abs(weight) *
      (Math.abs(f[i]!) + Math.abs(rise) * (1 + Math.abs(x[i]! / at[j]!)));
  }
  return { value, noise };
}

describe("Profiles", () => {
  for (const row of ROWS) {
    it(`solve all three field equations: ${JSON.stringify(row)}`, () => {
      const { profile } = profileOfRow(row);
      for (const name of ["residual_1", "residual_2", "residual_c"] as const) {
        const worst = profile[name].reduce((a, b) => Math.max(a, Math.abs(b)), 0);
        expect(worst, name).toBeLessThan(2e-13); // second derivatives of double-precision series
      }
    });

    it(`have the trace kappa R/2 pi and a conserved stress tensor: ${JSON.stringify(row)}`, () => {
      const { profile: p } = profileOfRow(row), n = p.sigma.length;
      let worst = 0, checked = 0;
      for (let i = 1; i < n - 1; i++) {
        const trace = p.pressure[i]! - p.energy_density[i]!,
          anomaly = row.kappa * p.curvature[i]! / (2 * Math.PI);
        expect(Math.abs(trace - anomaly)).toBeLessThan(
          1e-12 * (Math.abs(p.pressure[i]!) + Math.abs(anomaly)),
        ); // round-off of the difference
        // conservation in conformal gauge: p' + rho' (p + energy density) = 0, by the trapezoidal rule
        const h = p.sigma[i + 1]! - p.sigma[i]!, step = Math.abs(p.rho[i + 1]! - p.rho[i]!);
        const change = (f: Float64Array) => Math.abs(f[i + 1]! / f[i]! - 1);
        if (
          h === 0 || step > 0.05 || step < 1e-6 || change(p.pressure) > 0.1 ||
          change(p.energy_density) > 0.1
        ) continue;
        const mean =
          (p.pressure[i]! + p.energy_density[i]! + p.pressure[i + 1]! + p.energy_density[i + 1]!) /
          2;
        const residual = p.pressure[i + 1]! - p.pressure[i]! + (p.rho[i + 1]! - p.rho[i]!) * mean;
        worst = Math.max(
          worst,
          Math.abs(residual) /
            (Math.abs(p.pressure[i + 1]! - p.pressure[i]!) + Math.abs(mean) * step),
        );
        checked++;
      }
      expect(checked).toBeGreaterThan(10);
      expect(worst).toBeLessThan(2e-3); // trapezoidal error: a twelfth of the square of steps up to a tenth, twice
    });

    it(`have R = -2 rho'' e^{-2 rho}, rho'' by divided differences: ${JSON.stringify(row)}`, () => {
      const { profile: p } = profileOfRow(row);
      let worst = 0, checked = 0;
      for (let i = 2; i < p.sigma.length - 2; i++) {
        const { value, noise } = secondDerivative(p.sigma, p.rho, i);
        const R = p.curvature[i]!,
          change = [-2, 2].map((k) => Math.abs(p.curvature[i + k]! / R - 1));
        if (!(noise < 1e-5 * Math.abs(value)) || !(Math.max(...change) < 0.2)) continue;
        worst = Math.max(worst, Math.abs(-2 * value / p.minus_gtt[i]! / R - 1));
        checked++;
      }
      expect(checked).toBeGreaterThan(10);
      expect(worst).toBeLessThan(1e-3); // third order in steps over which R changes by a fifth
    });
  }

  it("run from outside inwards, with proper distance 0 at the locus", () => {
    for (const row of ROWS) {
      const { profile, result } = profileOfRow(row),
        { sigma, proper_distance: l, minus_gtt, rho } = profile;
      for (let i = 1; i < sigma.length; i++) {
        expect(sigma[i]).toBeLessThanOrEqual(sigma[i - 1]!);
        expect(l[i]).toBeLessThanOrEqual(l[i - 1]!);
        expect(minus_gtt[i]).toBe(Math.exp(2 * rho[i]!));
      }
      expect(l[0]).toBeGreaterThan(0);
      if (result.kind === "throat") expect(l[l.length - 1]).toBeLessThanOrEqual(0);
      else expect(l[l.length - 1]).toBeGreaterThanOrEqual(0);
    }
  });

  it("would show a wrong equation: residuals under a kappa that is off by one part in a million", () => {
    const input = inputOf(ROWS[0]!), record: DenseStep[] = [], engines = enginesOf(models["cghs"]!);
    denseRun(engines.double(record), input, () => {});
    const frame = inwardFrame(engines.double(), input);
    const wrong = profileOf(
      record,
      record.length,
      { ...frame, kappa: frame.kappa * (1 + 1e-6) },
      input,
      models["cghs"]!,
    );
    for (const name of ["residual_1", "residual_2", "residual_c"] as const) {
      const worst = wrong[name].reduce((a, b) => Math.max(a, Math.abs(b)), 0);
      if (name === "residual_2") expect(worst).toBeLessThan(2e-13); // kappa is not in it (CGHS)
      else expect(worst, name).toBeGreaterThan(1e-8);
    }
  });
});
