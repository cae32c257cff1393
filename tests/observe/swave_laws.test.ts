import { describe, expect, it } from "vitest";
import { profileOfRow, recordOf, valueOf } from "./solved.ts";

const throat = (b: number) =>
  ({ model: "swave", state: "boulware", kappa: Math.PI * b, mass: 1 }) as const;

describe("The s-wave throat without a bath", () => {
  it("has -g_tt M^2 -> kappa/16 pi, with corrections that vanish with kappa/M^2 (derived here)", () => {
    const defect = (b: number) => Math.abs(valueOf(throat(b), "minus_gtt_locus") * 16 / b - 1);
    expect(defect(1e-8) / defect(1e-6)).toBeLessThan(0.03); // linear in b, with a logarithm
    expect(defect(1e-30)).toBeLessThan(1e-14); // round-off
  });

  it("lies at 2M + (b/8M)[ln(16 M^2/b) + 3/2], b = kappa/pi (derived here)", () => {
    const defect = (b: number) =>
      Math.abs(
        (valueOf(throat(b), "dilaton_locus") - 2) / (b / 8 * (Math.log(16 / b) + 1.5)) - 1,
      );
    expect(defect(1e-5)).toBeLessThan(1e-4); // terms of order b ln b
    const order = Math.log10(defect(1e-4) / defect(1e-5));
    expect(Math.abs(order - 1)).toBeLessThan(0.15); // linear in b, with a logarithm
  });

  it("obeys e^{2 rho} = b rho'^2 exactly", () => {
    const { result, profile } = profileOfRow(throat(0.1));
    const i = profile.proper_distance.findIndex((l) => l <= 0),
      g = result.numbers.minus_gtt_locus!.value;
    // c^2/4 - rho'^2 = pressure e^{2 rho} 2 pi/kappa, at the throat -rho'^2
    const slope2 = -profile.pressure[i]! * profile.minus_gtt[i]! * 2 / 0.1;
    expect(Math.abs(profile.minus_gtt[i]! / g - 1)).toBeLessThan(1e-12); // the row of the locus, double precision
    expect(Math.abs(0.1 * slope2 / g - 1)).toBeLessThan(1e-12); // as above
  });

  it("ends in a null singularity a proper distance of about sqrt b inwards: 0.996671, 0.999667 of it", () => {
    // own computation, no published source: for b = 1e-2, 1e-3 in units of the throat radius squared
    for (
      const [ratio, fraction] of [[1e-2, 0.9966709281730604], [1e-3, 0.9996667109244635]] as const
    ) {
      let b = 4 * ratio; // r_t is close to 2M; a few rounds find b with b/r_t^2 = ratio
      for (let i = 0; i < 60; i++) b = ratio * valueOf(throat(b), "dilaton_locus") ** 2;
      const { result, profile } = profileOfRow(throat(b));
      expect(result.innerEnd).toBe("null-singularity");
      const depth = -profile.proper_distance[profile.proper_distance.length - 1]! / Math.sqrt(b);
      expect(Math.abs(depth / fraction - 1)).toBeLessThan(1e-9); // remaining distance at e^-30 and b to 1e-15
    }
  });

  it("exists for every positive mass, and is published to lie outside 2M with a singularity behind (hep-th/0512167)", () => {
    for (const mass of [0.05, 0.5, 3, 1e20]) {
      const { kind, innerEnd, numbers } = recordOf({
        model: "swave",
        state: "boulware",
        kappa: 1,
        mass,
      });
      expect([kind, innerEnd]).toEqual(["throat", "null-singularity"]);
      if (mass < 1e8) expect(numbers.dilaton_locus!.value).toBeGreaterThan(2 * mass);
    }
  });
});
