import { Solver } from "odex";
import { describe, expect, it } from "vitest";
import { recordOf, type ShortRow } from "./solved.ts";

// Throat data (dilaton, -g_tt) of a row, integrated outwards by `odex` from npm on the plain equations (1), (2):
// the mass that the row asked for must come out at infinity. No form, series or derivative of the library.

/** H_phi, H_phiphi, K, K_phi, V, V_phi by hand, lambda = G = 1. */
function action(row: ShortRow, phi: number): readonly number[] {
  if (row.model === "swave") return [Math.PI * phi, Math.PI, Math.PI, 0, Math.PI, 0];
  const E = Math.exp(-2 * phi),
    a = { cghs: undefined, rst: 0.5, bpp: 0, solvable: row.a }[
      row.model as "solvable"
    ];
  const h = a === undefined ? 0 : a - 1, k = a === undefined ? 0 : 1 - 2 * a;
  return [-2 * E + row.kappa * h, 4 * E, 4 * E + row.kappa * k, -8 * E, 4 * E, -8 * E];
}

type State = readonly [phi: number, dphi: number, rho: number, drho: number];

/** The solution at distances `sigma` outside the throat of a row. */
function outside(row: ShortRow, sigma: readonly number[]): State[] {
  const { kind, numbers } = recordOf(row);
  expect(kind).toBe("throat");
  const phi = numbers.dilaton_locus!.value, g = numbers.minus_gtt_locus!.value;
  const [, , , , V] = action(row, phi) as [number, number, number, number, number, number];
  const c = 2 * (1 + (row.bathRatioMinusOne ?? -1)); // lambda = 1; swave rows here have no bath
  // (C) at phi' = 0: rho'^2 = c^2/4 + e^{2 rho} V/kappa
  const start = [phi, 0, Math.log(g) / 2, Math.sqrt(c * c / 4 + g * V / row.kappa)];
  return sigma.map((end) => {
    const solver = new Solver(4);
    solver.absoluteTolerance = solver.relativeTolerance = 1e-13;
    solver.denseOutput = false;
    const rate = (_: number, [phi, dphi, rho, drho]: number[]) => {
      const [Hp, Hpp, K, Kp, V, Vp] = action(row, phi!) as [
        number,
        number,
        number,
        number,
        number,
        number,
      ];
      const e = Math.exp(2 * rho!), one = e * V - Hpp * dphi! * dphi!;
      const two = (e * Vp - Kp * dphi! * dphi!) / 2, det = Hp * Hp - row.kappa * K;
      return [dphi!, (Hp * one - row.kappa * two) / det, drho!, (Hp * two - K * one) / det];
    };
    return solver.solve(rate, 0, start, end).y as unknown as State;
  });
}

const FAMILY: readonly (ShortRow & { readonly mass: number })[] = [
  { model: "rst", state: "boulware", kappa: 1, mass: 3 },
  { model: "rst", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: -0.5 },
  { model: "bpp", state: "boulware", kappa: 2, mass: 3 },
  { model: "solvable", a: 1.3, state: "thermal", kappa: 1, mass: 20, bathRatioMinusOne: -0.3 },
];

describe("Throat data integrated outwards", () => {
  for (const row of FAMILY) {
    it(`recover the mass of the closed form: ${JSON.stringify(row)}`, () => {
      const a = row.a ?? (row.model === "rst" ? 0.5 : 0), tau = 1 + (row.bathRatioMinusOne ?? -1);
      for (const [phi, , rho] of outside(row, [2, 4])) {
        // E + a kappa phi = e^u + kappa (tau^2 - 1) u/4 + m with u = 2 (rho - phi) (hep-th/9512187)
        const u = 2 * (rho - phi), E = Math.exp(-2 * phi);
        const m = E + a * row.kappa * phi - Math.exp(u) - row.kappa * (tau * tau - 1) * u / 4;
        expect(Math.abs(m - row.mass)).toBeLessThan(1e-12 * E); // odex: 1e-13 a step, which the outward run does not amplify
      }
    });
  }

  for (const mass of [2, 10]) {
    it(`recover m of CGHS from its definition at infinity: m = ${mass}`, () => {
      const row = { model: "cghs", state: "boulware", kappa: 1, mass } as const;
      // E = e^u + m + O(e^{-u}) without a bath, u = 2 (rho - phi) + O(e^{-2u})
      const [near, far] = outside(row, [3.5, 5]).map(([phi, , rho]) => {
        const u = 2 * (rho - phi);
        return { z: Math.exp(-u), m: Math.exp(-2 * phi) - Math.exp(u) };
      }) as [{ z: number; m: number }, { z: number; m: number }];
      const m = (near.z * far.m - far.z * near.m) / (near.z - far.z); // the term in e^{-u} removed
      expect(Math.abs(near.m - mass)).toBeLessThan(2 * mass * near.z); // that term
      expect(Math.abs(m - mass)).toBeLessThan(mass * mass * near.z * far.z); // the next one, kappa m^2 e^{-2u}
    });
  }

  for (const mass of [1, 10]) {
    it(`recover M of the s-wave model as the Misner-Sharp mass far out, and time normalised there: M = ${mass}`, () => {
      const row = { model: "swave", state: "boulware", kappa: 1, mass } as const;
      for (const [r, dr, rho] of outside(row, [200 * mass, 1000 * mass])) {
        const g = Math.exp(2 * rho), misnerSharp = r * (1 - dr * dr / g) / 2;
        // (1) and (C) expanded in 1/r (derived here): M_MS = M + b M/r^2 + ..., g = 1 - 2M/r - 2bM/3r^3 + ...
        const b = row.kappa / Math.PI, next = 3 * b * mass * (mass + Math.sqrt(b)) / (r * r * r);
        expect(Math.abs(misnerSharp - mass - b * mass / (r * r))).toBeLessThan(next + 1e-11 * r); // odex, of r
        const far = 1 - 2 * mass / r - 2 * b * mass / (3 * r * r * r);
        expect(Math.abs(g - far)).toBeLessThan(next / r + 1e-11); // as above
      }
    });
  }
});
