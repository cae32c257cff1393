import { Solver } from "odex";
import { describe, expect, it } from "vitest";
import { pointAt } from "../../lib/observe/dense.ts";
import { enginesOf } from "../../lib/observe/engines.ts";
import { inwardFrame } from "../../lib/observe/frame.ts";
import { denseRun } from "../../lib/observe/inner_end.ts";
import type { DenseStep } from "../../lib/solve/engine.ts";
import { inputOf, models, type ShortRow } from "./solved.ts";

// Outside integrator: `odex` from npm (extrapolation, after Hairer, Norsett & Wanner) on the plain equations
// (1) and (2), in solver units lambda = 1, kappa and E scaled.
const CASES: readonly ShortRow[] = [
  { model: "cghs", state: "boulware", kappa: 1, mass: 10 },
  { model: "cghs", state: "boulware", kappa: 1, mass: -2 },
  { model: "cghs", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: -0.4 },
  { model: "cghs", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: 0.4 },
  { model: "rst", state: "boulware", kappa: 2, mass: 3 },
  { model: "rst", state: "thermal", kappa: 1, mass: 6, bathRatioMinusOne: 0 },
  { model: "bpp", state: "boulware", kappa: 1, mass: 3 },
  { model: "solvable", a: 1.5, state: "thermal", kappa: 1, mass: 9, bathRatioMinusOne: 0.2 },
  { model: "swave", state: "boulware", kappa: 1, mass: 1 },
  { model: "swave", state: "boulware", kappa: 0.5, mass: -1 },
  { model: "swave", state: "thermal", kappa: 1, mass: 5, bathRatioMinusOne: -0.3, wallRadius: 40 },
  { model: "swave", state: "thermal", kappa: 1, mass: 5, bathRatioMinusOne: 0.3, wallRadius: 40 },
];

/** H_phi, H_phiphi, K, K_phi, V, V_phi by hand. */
function action(row: ShortRow, kappa: number, phi: number): readonly number[] {
  if (row.model === "swave") return [Math.PI * phi, Math.PI, Math.PI, 0, Math.PI, 0];
  const E = Math.exp(-2 * phi),
    a = { cghs: undefined, rst: 0.5, bpp: 0, solvable: row.a }[
      row.model as "solvable"
    ];
  const h = a === undefined ? 0 : a - 1, k = a === undefined ? 0 : 1 - 2 * a;
  return [-2 * E + kappa * h, 4 * E, 4 * E + kappa * k, -8 * E, 4 * E, -8 * E];
}

describe("odex on the plain second-order equations", () => {
  for (const row of CASES) {
    it(`reaches the same dilaton and rho: ${JSON.stringify(row)}`, () => {
      const input = inputOf(row), engines = enginesOf(models[row.model]!), record: DenseStep[] = [];
      denseRun(engines.double(record), input, () => {});
      const { kappa } = inwardFrame(engines.double(), input);
      const first = pointAt(record[0]!, 0);
      // the last point that is still e^-12 above -g_tt = 0 and short of a singular end
      const inside = record.map((step) => pointAt(step, step.h / 2)).filter((p) =>
        p.rho > -6 && Math.abs(p.drho) < 5
      );
      const last = inside[inside.length - 1]!;
      const solver = new Solver(4);
      solver.absoluteTolerance = solver.relativeTolerance = 1e-12;
      solver.denseOutput = false;
      const out = solver.solve(
        (_t: number, [phi, dphi, rho, drho]: number[]) => {
          const [Hp, Hpp, K, Kp, V, Vp] = action(row, kappa, phi!) as [
            number,
            number,
            number,
            number,
            number,
            number,
          ];
          const g = Math.exp(2 * rho!),
            one = g * V - Hpp * dphi! * dphi!,
            two = (g * Vp - Kp * dphi! * dphi!) / 2;
          const det = Hp * Hp - kappa * K; // Hp phi'' + kappa rho'' = one, K phi'' + Hp rho'' = two
          return [-dphi!, -(Hp * one - kappa * two) / det, -drho!, -(Hp * two - K * one) / det];
        },
        -first.sigma, // odex runs upwards: t = -sigma
        [first.phi, first.dphi, first.rho, first.drho],
        -last.sigma,
      );
      const [phi, , rho] = out.y as [number, number, number, number];
      // odex's own error: 1e-12 a step, amplified by the growing mode of the unconstrained equations
      expect(Math.abs(phi - last.phi)).toBeLessThan(1e-8 * Math.max(1, Math.abs(last.phi)));
      expect(Math.abs(rho - last.rho)).toBeLessThan(1e-8 * Math.max(1, Math.abs(last.rho)));
      expect(first.rho - last.rho === 0).toBe(false);
    });
  }
});
