import { describe, expect, it } from "vitest";
import { profileOfRow, recordOf, type ShortRow, valueOf } from "./solved.ts";

interface Action {
  readonly Hp: number;
  readonly K: number;
  readonly V: number;
  readonly Vp: number;
}

/** H_phi, K, V, V_phi written by hand (CGHS: Phys. Rev. D 45 R1005; RST: D 46, 3444; reduction: pi r^2/2, pi, pi). */
function action(row: ShortRow, phi: number): Action {
  if (row.model === "swave") return { Hp: Math.PI * phi, K: Math.PI, V: Math.PI, Vp: 0 };
  const E = Math.exp(-2 * phi),
    a = { cghs: undefined, rst: 0.5, bpp: 0, solvable: row.a }[
      row.model as "solvable"
    ];
  const h = a === undefined ? 0 : a - 1, k = a === undefined ? 0 : 1 - 2 * a;
  return { Hp: -2 * E + row.kappa * h, K: 4 * E + row.kappa * k, V: 4 * E, Vp: -8 * E };
}

const ROWS: readonly ShortRow[] = [
  { model: "cghs", state: "hartle-hawking", kappa: 1, horizonDilaton: -0.8 },
  { model: "cghs", state: "hartle-hawking", kappa: 1, mass: 25 },
  { model: "rst", state: "hartle-hawking", kappa: 2, mass: 7 },
  { model: "bpp", state: "hartle-hawking", kappa: 2, mass: 7 },
  { model: "solvable", a: 0.3, state: "hartle-hawking", kappa: 2, mass: 7 },
  { model: "swave", state: "hartle-hawking", kappa: 0.5, mass: 4, wallRadius: 40 },
  { model: "swave", state: "hartle-hawking", kappa: 0.5, horizonDilaton: 3, wallRadius: 40 },
];

describe("A regular horizon", () => {
  for (const row of ROWS) {
    it(`obeys 2q H_phi p + kappa s/2 = V, 4qK p + H_phi s = V_phi, R = -s: ${JSON.stringify(row)}`, () => {
      const { kind, numbers } = recordOf(row), phi = numbers.dilaton_locus!.value;
      expect(kind).toBe("horizon");
      const { Hp, K, V, Vp } = action(row, phi);
      // the pair is linear in (2q p, s), so R does not depend on the normalisation of time
      const det = Hp * Hp - row.kappa * K, s = (Vp * Hp - 2 * K * V) / det;
      expect(Math.abs(-s / numbers.curvature_locus!.value - 1)).toBeLessThan(1e-13); // round-off of the determinant
    });

    it(`is approached with rho' -> q = 2 pi T and dphi/d(-g_tt) -> p/2q: ${JSON.stringify(row)}`, () => {
      const { profile, result: { numbers } } = profileOfRow(row);
      const { sigma, rho, dilaton, minus_gtt } = profile;
      const phi = numbers.dilaton_locus!.value,
        s = -numbers.curvature_locus!.value,
        q = 2 * Math.PI * numbers.temperature_horizon!.value;
      const { Hp, V } = action(row, phi), p = (V - row.kappa * s / 2) / (2 * q * Hp);
      const errors = (g: number) => {
        const i = minus_gtt.findIndex((x) => x < g), j = i - 1;
        const slope = (rho[j]! - rho[i]!) / (sigma[j]! - sigma[i]!);
        return [
          Math.abs(slope / q - 1) / minus_gtt[i]!,
          Math.abs((dilaton[i]! - phi) / minus_gtt[i]! * 2 * q / p - 1) / minus_gtt[i]!,
        ];
      };
      // both differences are of first order in -g_tt: their ratios to it tend to constants
      const near = errors(1e-4), far = errors(1e-3);
      for (const k of [0, 1]) {
        expect(near[k]! * 1e-4).toBeLessThan(1e-3); // the next order with its factor
        expect(Math.abs(near[k]! / far[k]! - 1)).toBeLessThan(0.3); // unequal steps of the slope, next order
      }
    });

    it(`has bath and horizon at one temperature: ${JSON.stringify(row)}`, () => {
      expect(valueOf(row, "temperature_bath")).toBe(valueOf(row, "temperature_horizon"));
    });
  }

  it("approaches the classical one as kappa -> 0: T = lambda/2 pi, R = 4 lambda^2; T_wall of Schwarzschild", () => {
    const cghs =
      recordOf({ model: "cghs", state: "hartle-hawking", kappa: 1e-14, mass: 3 }).numbers;
    expect(Math.abs(cghs.temperature_horizon!.value * 2 * Math.PI - 1)).toBeLessThan(1e-14); // kappa/4m
    expect(Math.abs(cghs.curvature_locus!.value / 4 - 1)).toBeLessThan(1e-14); // as above
    const hole =
      recordOf({ model: "swave", state: "hartle-hawking", kappa: 1e-14, mass: 3, wallRadius: 30 })
        .numbers;
    const tolman = 1 / (24 * Math.PI * Math.sqrt(1 - 6 / 30)); // Hawking 1974 with Tolman's factor
    expect(Math.abs(hole.temperature_bath!.value / tolman - 1)).toBeLessThan(1e-13); // kappa/M^2 with a factor of order ten
    expect(Math.abs(hole.dilaton_locus!.value / 6 - 1)).toBeLessThan(1e-13); // as above
  });
});
