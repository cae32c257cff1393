import { describe, expect, it } from "vitest";
import { recordOf, type ShortRow, valueOf } from "./solved.ts";

// Own 60-digit computation by another program, lambda = 1, G = 1; no published source. 15 digits.
const THROATS: readonly (readonly [row: ShortRow, dilaton: number, g: number, R?: number])[] = [
  [
    { model: "rst", state: "boulware", kappa: 1, mass: 1 },
    -0.275276523050164,
    0.144157704688610,
    4.67375826354158,
  ],
  [
    { model: "rst", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: -0.5 },
    -1.20361570638937,
    0.0168870563601478,
    4.09213890714467,
  ],
  [
    { model: "cghs", state: "boulware", kappa: 1, mass: 10 },
    -1.22014335309958,
    0.0228495272076271,
    4.38181307466557,
  ],
  [
    { model: "cghs", state: "boulware", kappa: 1, mass: 1 },
    -0.372409889547155,
    0.168946485899208,
    7.61643430721245,
  ],
  [
    { model: "cghs", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne: -0.5 },
    -1.21610669684165,
    0.0175403491412357,
    4.38520609807039,
  ],
  [{ model: "swave", state: "boulware", kappa: 1, mass: 1 }, 2.20936319274639, 0.0185353170714590],
  [
    { model: "swave", state: "boulware", kappa: 1, mass: 10 },
    20.0398472971608,
    1.98785775825256e-4,
  ],
];

describe("Throats", () => {
  for (const [row, dilaton, g, R] of THROATS) {
    it(`agree with an independent 60-digit computation: ${JSON.stringify(row)}`, () => {
      const { kind, numbers } = recordOf(row);
      expect(kind).toBe("throat");
      expect(Math.abs(numbers.dilaton_locus!.value / dilaton - 1)).toBeLessThan(4e-15); // 15 printed digits
      expect(Math.abs(numbers.minus_gtt_locus!.value / g - 1)).toBeLessThan(4e-15); // as above
      if (R) expect(Math.abs(numbers.curvature_locus!.value / R - 1)).toBeLessThan(4e-15); // as above
    });
  }

  it("of CGHS obey R = 4 lambda^2 E/(E - kappa) exactly (derived from equations (1), (2) at phi' = 0)", () => {
    for (const mass of [0.3, 2, 50, 1e9]) {
      const row = { model: "cghs", state: "boulware", kappa: 1, mass } as const;
      const E = valueOf(row, "entropy_classical") / 2;
      expect(Math.abs(valueOf(row, "curvature_locus") / (4 * E / (E - 1)) - 1)).toBeLessThan(1e-14); // round-off of E - 1
    }
  });
});

describe("The Hartle-Hawking state of CGHS", () => {
  const excess = (E: number) =>
    valueOf(
      { model: "cghs", state: "hartle-hawking", kappa: 1, horizonDilaton: -Math.log(E) / 2 },
      "bath_ratio_minus_one",
    );

  it("has the bath ratio of two independent computations (no published source)", () => {
    expect(Math.abs(excess(3) - 0.094777112329314)).toBeLessThan(1e-15); // 15 printed digits
    expect(Math.abs(excess(10) - 0.025966216058941)).toBeLessThan(1e-15); // as above
    expect(Math.abs(excess(100) - 0.002509403661352)).toBeLessThan(1e-15); // as above
  });

  it("approaches 1 + x/4 + 3x^2/32 + 11x^3/384, x = kappa/E, with a remainder of fourth order", () => {
    const remainder = (x: number) =>
      excess(1 / x) - (x / 4 + 3 * x * x / 32 + 11 * x * x * x / 384);
    const order = Math.log2(remainder(1 / 100) / remainder(1 / 200));
    expect(Math.abs(order - 4)).toBeLessThan(0.1); // next order in x = 1/100
  });

  it("never has bath ratio 1, and a thermal row at bath ratio 1 is a throat", () => {
    for (const mass of [2, 10, 1e6, 1e60]) {
      const row = { model: "cghs", kappa: 1, mass } as const;
      expect(valueOf({ ...row, state: "hartle-hawking" }, "bath_ratio_minus_one")).toBeGreaterThan(
        0,
      );
      expect(recordOf({ ...row, state: "thermal", bathRatioMinusOne: 0 }).kind).toBe("throat");
    }
  });
});

describe("The Hartle-Hawking state of RST", () => {
  it("has bath ratio 1 and temperature lambda/2 pi whatever the mass (common practice, no source)", () => {
    for (const mass of [1, 5, 1e3, 1e20, 1e60]) {
      const { numbers } = recordOf({ model: "rst", state: "hartle-hawking", kappa: 1, mass });
      expect(numbers.bath_ratio_minus_one!.value).toBe(0);
      expect(numbers.temperature_horizon!.value).toBe(1 / (2 * Math.PI));
    }
  });

  it("obeys the first law dM/pi = T dS with the classical and one-loop parts of S: S = 2m exactly at a = 1/2", () => {
    // S = 2 H - kappa psi_h with psi = 2 lambda sigma - 2 rho = -2 phi at a horizon of rho = phi + sigma:
    // 2 E - kappa phi + 2 kappa phi = 2 (E + kappa phi/2) = 2 m (derived here)
    const row = { model: "rst", state: "hartle-hawking", kappa: 2, mass: 7 } as const;
    const S = valueOf(row, "entropy_classical") + 2 * valueOf(row, "dilaton_locus");
    expect(Math.abs(S - 14)).toBeLessThan(4e-15 * 14); // round-off of the sum
  });
});
