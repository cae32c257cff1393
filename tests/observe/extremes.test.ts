import { describe, expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import { MODEL_NAMES, type RowInput } from "../../lib/model/input.ts";
import { computeRow } from "../../lib/observe/row.ts";

const models = Object.fromEntries(
  await Promise.all(MODEL_NAMES.map(async (name) => [name, await compileModel(name)] as const)),
);

type Row = Omit<RowInput, "tolerance"> & { readonly tolerance?: number };

function solved(row: Row) {
  const lambda = row.model === "swave" ? {} : { lambda: 1 };
  const input: RowInput = { tolerance: 1e-10, ...lambda, ...row };
  const { result } = computeRow(input, models[row.model]!);
  for (const [name, b] of Object.entries(result.numbers)) {
    expect(Number.isNaN(b.value), `${name} of ${JSON.stringify(row)}`).toBe(false);
    expect(b.error === undefined || (b.error >= 0 && b.error < Infinity), name).toBe(true);
  }
  return result;
}
const kindOf = (row: Row) => solved(row).kind ?? solved(row).outcome;

describe("At the edges", () => {
  it("m/kappa = 1e60 gives throats without a bath and a tau_H - 1 = kappa/4m for CGHS", () => {
    for (const model of ["cghs", "rst", "bpp"] as const) {
      expect(kindOf({ model, state: "boulware", kappa: 1, mass: 1e60 })).toBe("throat");
    }
    const b = solved({ model: "cghs", state: "hartle-hawking", kappa: 1, mass: 1e60 }).numbers
      .bath_ratio_minus_one!;
    expect(Math.abs(b.value / 2.5e-61 - 1)).toBeLessThan(1e-14); // series of tau_H, next term 1e-60 smaller
    expect(kindOf({ model: "cghs", state: "thermal", kappa: 1, mass: 1e60, bathRatioMinusOne: 0 }))
      .toBe("throat");
  });

  it("kappa/M^2 = 1e-76 gives the s-wave throat law to all digits", () => {
    const g = solved({ model: "swave", state: "boulware", kappa: 1e-76, mass: 1 }).numbers
      .minus_gtt_locus!;
    expect(Math.abs(g.value / (1e-76 / (16 * Math.PI)) - 1)).toBeLessThan(1e-14); // corrections of order kappa/M^2
  });

  it("a bath 1e-12 below or above its natural temperature is a throat or a naked singularity of RST", () => {
    const row = { model: "rst", state: "thermal", kappa: 1, mass: 10 } as const;
    expect(kindOf({ ...row, bathRatioMinusOne: -1e-12 })).toBe("throat");
    expect(kindOf({ ...row, bathRatioMinusOne: 0 })).toBe("horizon");
    expect(kindOf({ ...row, bathRatioMinusOne: 1e-12 })).toBe("naked-singularity");
  });

  it("BPP at its critical mass is a semi-infinite throat, and a throat 1e-12 above it", () => {
    expect(kindOf({ model: "bpp", state: "boulware", kappa: 4, mass: -1 })).toBe(
      "semi-infinite-throat",
    );
    const above = solved({ model: "bpp", state: "boulware", kappa: 4, massAboveCritical: 1e-12 });
    expect(above.kind).toBe("throat");
    // E = m - m_c at the throat of a = 0
    expect(Math.abs(above.numbers.entropy_classical!.value / 2e-12 - 1)).toBeLessThan(1e-9); // 1e-10 tolerance, sqrt conditioning
    expect(kindOf({ model: "bpp", state: "boulware", kappa: 4, massAboveCritical: -1e-12 })).toBe(
      "naked-singularity",
    );
  });

  it("tiny and large kappa scale the solution", () => {
    for (const kappa of [1e-12, 1e6]) {
      expect(kindOf({ model: "cghs", state: "boulware", kappa, mass: 3 * kappa })).toBe("throat");
      expect(kindOf({ model: "rst", state: "hartle-hawking", kappa, massAboveCritical: 3 * kappa }))
        .toBe(
          "horizon",
        );
    }
  });

  it("a horizon within 1e-9 of critical is still found from both sides", () => {
    const at = (E: number) => -Math.log(E) / 2;
    expect(
      kindOf({ model: "cghs", state: "hartle-hawking", kappa: 1, horizonDilaton: at(1 + 1e-9) }),
    ).toBe("horizon");
    expect(
      kindOf({ model: "cghs", state: "hartle-hawking", kappa: 1, horizonDilaton: at(1 - 1e-9) }),
    ).toBe("refused");
    expect(
      kindOf({ model: "rst", state: "hartle-hawking", kappa: 4, horizonDilaton: at(1 + 1e-9) }),
    ).toBe("horizon");
    expect(
      kindOf({ model: "rst", state: "hartle-hawking", kappa: 4, horizonDilaton: at(1 - 1e-9) }),
    ).toBe("refused");
  });

  it("zero mass without a bath is the vacuum, negative mass a naked singularity (rst, cghs, swave)", () => {
    for (const model of ["rst", "cghs", "swave"] as const) {
      expect(kindOf({ model, state: "boulware", kappa: 1, mass: 0 })).toBe("vacuum");
      for (const mass of [-1e-3, -2, -1e9]) {
        expect(kindOf({ model, state: "boulware", kappa: 1, mass }), `${model} ${mass}`).toBe(
          "naked-singularity",
        );
      }
    }
    expect(
      kindOf({ model: "solvable", a: 0.25, state: "boulware", kappa: 1, massAboveCritical: 0 }),
    ).toBe("marginal");
  });

  it("Hartle-Hawking is refused below the critical mass and singular exactly at it", () => {
    expect(kindOf({ model: "rst", state: "hartle-hawking", kappa: 4, mass: 1 })).toBe(
      "singular-horizon",
    );
    expect(kindOf({ model: "rst", state: "hartle-hawking", kappa: 4, mass: 0.999 })).toBe(
      "refused",
    );
    expect(kindOf({ model: "rst", state: "hartle-hawking", kappa: 4, massAboveCritical: 0 })).toBe(
      "singular-horizon",
    );
    expect(kindOf({ model: "cghs", state: "hartle-hawking", kappa: 1, mass: 1 })).toBe("refused");
    expect(
      kindOf({
        model: "swave",
        state: "hartle-hawking",
        kappa: 1,
        horizonDilaton: 0.5,
        wallRadius: 30,
      }),
    ).toBe("refused");
  });

  it("hot baths are naked singularities whose logarithm is a number", () => {
    for (const bathRatioMinusOne of [9, 999]) {
      const r = solved({ model: "rst", state: "thermal", kappa: 1, mass: 1e8, bathRatioMinusOne });
      expect(r.kind).toBe("naked-singularity");
      expect(Number.isFinite(r.numbers.log10_minus_gtt_locus!.value)).toBe(true);
    }
    const deep = solved({
      model: "cghs",
      state: "thermal",
      kappa: 1,
      mass: 1e60,
      bathRatioMinusOne: 0.1,
    });
    expect(deep.numbers.minus_gtt_locus).toEqual({ value: 0, error: 5e-324 });
    // ln(-g_tt) -> -4m/(kappa (tau^2 - 1)) (solvable family; CGHS differs by O(kappa/m))
    const ln = deep.numbers.log10_minus_gtt_locus!.value * Math.LN10;
    expect(Math.abs(ln / (-4e60 / (1.1 * 1.1 - 1)) - 1)).toBeLessThan(1e-12); // round-off of 1.1^2 - 1
  });

  it("a bath whose pressure changes sign on the way in does not stop the solver (T = 0 far out)", () => {
    const row = {
      model: "cghs",
      state: "thermal",
      kappa: 0.160162965539838,
      mass: 0.00266203725264856,
    } as const;
    expect(kindOf({ ...row, bathRatioMinusOne: 0.999168206940886 - 1 })).toBe("naked-singularity");
  });

  it("a tolerance that double precision cannot meet fails with a reason", () => {
    const r = solved({ model: "cghs", state: "boulware", kappa: 1, mass: 10, tolerance: 1e-18 });
    expect(r.outcome).toBe("failed");
    expect(r.reason).toMatch(/^tolerance: /);
  });
});
