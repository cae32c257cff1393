import { describe, expect, it } from "vitest";
import { recordOf, type ShortRow, valueOf } from "./solved.ts";

const HORIZONS: readonly ShortRow[] = [
  { model: "cghs", state: "hartle-hawking", kappa: 1, horizonDilaton: -1.3 },
  { model: "cghs", state: "hartle-hawking", kappa: 1e-8, horizonDilaton: -1.3 },
  { model: "rst", state: "hartle-hawking", kappa: 2, horizonDilaton: -0.9 },
  { model: "solvable", a: 1.6, state: "hartle-hawking", kappa: 2, horizonDilaton: -1 },
  { model: "swave", state: "hartle-hawking", kappa: 0.4, horizonDilaton: 7, wallRadius: 60 },
  { model: "swave", state: "hartle-hawking", kappa: 1e-12, horizonDilaton: 7, wallRadius: 60 },
];

describe("A horizon solved outwards", () => {
  for (const row of HORIZONS) {
    const { horizonDilaton, ...rest } = row, mass = () => valueOf(row, "mass");
    it(`is found again from its mass: ${JSON.stringify(row)}`, () => {
      const back = valueOf({ ...rest, mass: mass() }, "dilaton_locus");
      expect(Math.abs(back - horizonDilaton!)).toBeLessThan(
        2e-15 * Math.max(1, Math.abs(horizonDilaton!)),
      ); // the mass is rounded to double
    });

    it(`is met from outside: a bath a little colder opens a throat there, a hotter one a naked singularity: ${JSON.stringify(row)}`, () => {
      const excess = valueOf(row, "bath_ratio_minus_one");
      const at = (d: number) =>
        recordOf({ ...rest, state: "thermal", mass: mass(), bathRatioMinusOne: excess + d });
      for (const d of [1e-5, 1e-7]) {
        const cold = at(-d), hot = at(d);
        expect([cold.kind, hot.kind]).toEqual(["throat", "naked-singularity"]);
        // the throat tends to the horizon, linearly in d up to a logarithm
        expect(Math.abs(cold.numbers.dilaton_locus!.value - horizonDilaton!)).toBeLessThan(300 * d);
      }
      // -g_tt at the throat is proportional to the distance in the bath ratio
      const ratio = at(-1e-6).numbers.minus_gtt_locus!.value /
        at(-1e-7).numbers.minus_gtt_locus!.value;
      expect(Math.abs(ratio - 10)).toBeLessThan(1e-2); // next order in 1e-6 with its factor
    });
  }
});
