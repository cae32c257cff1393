import { bignumber } from "mathjs";
import { describe, expect, it } from "vitest";
import type { NumericColumn } from "../../lib/observe/result.ts";
import { type FamilyRow, familyValues } from "../reference/closed_form.ts";
import { familyInput } from "../reference/family_rows.ts";
import { Tally } from "./exact.ts";
import { recordOf, type ShortRow } from "./solved.ts";

const kindOf = (row: ShortRow) => recordOf(row).kind ?? recordOf(row).outcome;
const one = { kappa: 1, lambda: 1 } as const;

/** Corners of the family, each against the closed form in 110 digits (tests/reference/closed_form.ts). */
const FAMILY: readonly FamilyRow[] = [1e-6, 1, 2].flatMap((a): FamilyRow[] => [
  { ...one, a, state: "boulware", mass: 10 },
  { ...one, a, state: "boulware", mass: 1e60 },
  { ...one, a, state: "boulware", massAboveCritical: 1e-12 },
  { ...one, a, state: "boulware", massAboveCritical: -1e-12 },
  { ...one, a, state: "thermal", bathRatioMinusOne: -1e-12, mass: 10 },
  { ...one, a, state: "thermal", bathRatioMinusOne: 1e-12, mass: 10 },
  { ...one, a, state: "thermal", bathRatioMinusOne: 9, mass: 10 },
  { ...one, a, state: "thermal", bathRatioMinusOne: 999, mass: 10 },
  { ...one, a, state: "hartle-hawking", mass: 1e60 },
  { ...one, a, state: "hartle-hawking", massAboveCritical: 1e-12 },
]).concat([
  { ...one, a: 0.5, kappa: 1e-12, state: "boulware", mass: 1 },
  { ...one, a: 0.5, kappa: 1e6, state: "boulware", mass: 3e6 },
  { ...one, a: 0.5, kappa: 1e-12, state: "thermal", bathRatioMinusOne: 999, mass: 1 },
  { ...one, a: 0.5, kappa: 4, state: "hartle-hawking", horizonDilaton: -Math.log1p(1e-9) / 2 },
  { ...one, a: 0, kappa: 4, state: "boulware", massAboveCritical: 1e-12 },
]);
const COLUMNS: readonly [NumericColumn, "dilaton" | "log10MinusGtt" | "curvature"][] = [
  ["dilaton_locus", "dilaton"],
  ["log10_minus_gtt_locus", "log10MinusGtt"],
  ["curvature_locus", "curvature"],
];

describe("In the corners of the range", () => {
  for (const row of FAMILY) {
    it(`the closed form lies within the bounds: ${JSON.stringify(row)}`, () => {
      const { kind, numbers } = recordOf(familyInput(row)),
        exact = familyValues(row),
        tally = new Tally();
      expect(kind).toBe(exact?.kind);
      for (const [column, key] of COLUMNS) {
        const b = numbers[column], value = exact![key];
        expect(b === undefined).toBe(value === undefined);
        if (b && value) tally.add("", column, b.value, b.error, bignumber(value));
      }
      expect(tally.violations).toEqual([]);
    });
  }

  it("a bath 1e-12 off the lambda/2 pi of CGHS is a throat either way: its horizon asks for more", () => {
    for (const bathRatioMinusOne of [-1e-12, 0, 1e-12]) {
      expect(kindOf({ model: "cghs", state: "thermal", kappa: 1, mass: 10, bathRatioMinusOne }))
        .toBe("throat");
    }
  });

  it("hot baths end cghs and swave naked, with a logarithm of -g_tt that is a number", () => {
    for (const bathRatioMinusOne of [9, 999]) {
      for (
        const row of [{ model: "cghs" }, { model: "swave", wallRadius: 40 }] as const
      ) {
        const r = recordOf({ ...row, state: "thermal", kappa: 1e-3, mass: 5, bathRatioMinusOne });
        expect(r.kind, JSON.stringify(row)).toBe("naked-singularity");
        expect(Number.isFinite(r.numbers.log10_minus_gtt_locus!.value)).toBe(true);
      }
    }
  });

  it("kappa = 1e-12 and 1e6 leave the s-wave model its kinds", () => {
    for (const kappa of [1e-12, 1e6]) {
      const mass = 3 * Math.sqrt(kappa), wallRadius = 10 * mass;
      expect(kindOf({ model: "swave", state: "boulware", kappa, mass })).toBe("throat");
      expect(kindOf({ model: "swave", state: "hartle-hawking", kappa, mass, wallRadius })).toBe(
        "horizon",
      );
      const bath = { model: "swave", state: "thermal", kappa, mass, wallRadius } as const;
      expect(kindOf({ ...bath, bathRatioMinusOne: -0.5 })).toBe("throat");
      expect(kindOf({ ...bath, bathRatioMinusOne: 0.5 })).toBe("naked-singularity");
    }
  });

  it("a tolerance below the rounding of a double fails with its reason, in every model", () => {
    for (const model of ["cghs", "rst", "bpp", "swave"] as const) {
      const { outcome, reason, numbers } = recordOf({
        model,
        state: "boulware",
        kappa: 1,
        mass: 10,
        tolerance: 1e-17 / 3,
      });
      expect([outcome, numbers]).toEqual(["failed", {}]);
      expect(reason).toMatch(/^tolerance: the bound of \w+ is /);
    }
  });
});
