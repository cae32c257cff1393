import { expect, it } from "vitest";
import { unmet } from "../../lib/observe/tolerance.ts";

const input = { model: "swave", state: "boulware", kappa: 1, mass: 1, tolerance: 1e-3 } as const;
const fault = (error?: number) =>
  unmet(input, { curvature_locus: error === undefined ? { value: 2 } : { value: 2, error } });

it("A bound meets the tolerance up to tolerance times magnitude, and one that is not a number never", () => {
  expect(fault()).toBe("");
  expect(fault(0)).toBe("");
  expect(fault(0.002)).toBe("");
  expect(fault(0.003)).toBe(
    "tolerance: the bound of curvature_locus is 3.0e-3, the tolerance asks for 2.0e-3",
  );
  expect(unmet(input, { mass: { value: NaN } })).toMatch(/^out-of-range: mass /);
  expect(fault(Infinity)).toMatch(/^tolerance: .* is Infinity/);
  expect(fault(NaN)).toMatch(/^tolerance: the bound of curvature_locus is unknown/);
});
