import { describe, expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import type { RowInput } from "../../lib/model/input.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { uniform } from "../reference/family_rows.ts";

const models = {
  cghs: await compileModel("cghs"),
  rst: await compileModel("rst"),
  swave: await compileModel("swave"),
};

function log10Gtt(input: RowInput) {
  const b = computeRow(input, models[input.model as keyof typeof models]).result.numbers
    .log10_minus_gtt_locus;
  expect(b, JSON.stringify(input)).toBeDefined();
  return b!;
}

describe("Exact scaling", () => {
  it("(E, kappa, m) -> s (E, kappa, m) - s kappa (tau^2 - k) ln(s)/4 leaves -g_tt unchanged (cghs, rst: k = 0)", () => {
    const next = uniform(3);
    for (let i = 0; i < 30; i++) {
      const model = i % 2 ? "cghs" : "rst",
        s = Math.exp(20 * (next() - 0.5)),
        kappa = Math.exp(6 * (next() - 0.5));
      const m = kappa * (2 + 50 * next()), tau = i % 3 ? 0.9 * next() : 0;
      const row = {
        model,
        state: "thermal",
        lambda: 1,
        tolerance: 1e-10,
        bathRatioMinusOne: tau - 1,
      } as const;
      const x = log10Gtt({ ...row, kappa, mass: m });
      const y = log10Gtt({
        ...row,
        kappa: s * kappa,
        mass: s * m - s * kappa * tau * tau * Math.log(s) / 4,
      });
      // s kappa and the shifted mass are rounded to double: some 1e-16 of m, magnified by at most m/(m - m_c) < 100
      expect(Math.abs(x.value - y.value)).toBeLessThan(2e-14);
    }
  });

  it("the shift of sigma that lambda makes rescales R by lambda^2 and nothing else", () => {
    for (const lambda of [0.001, 3, 700]) {
      const row = { state: "boulware", kappa: 2, tolerance: 1e-10 } as const;
      const one =
        computeRow({ model: "cghs", ...row, lambda: 1, mass: 30 }, models.cghs).result.numbers;
      const other =
        computeRow({ model: "cghs", ...row, lambda, mass: 30 * lambda }, models.cghs).result
          .numbers;
      const ratio = other.curvature_locus!.value / one.curvature_locus!.value;
      expect(Math.abs(ratio / (lambda * lambda) - 1)).toBeLessThan(1e-14); // 30 lambda is rounded
      expect(Math.abs(other.dilaton_locus!.value - one.dilaton_locus!.value)).toBeLessThan(1e-15); // as above
    }
  });

  it("(kappa, M, r_w) -> (s^2 kappa, s M, s r_w) leaves -g_tt of swave unchanged", () => {
    for (const s of [2 ** -30, 2 ** 7, 2 ** 90]) { // exact in double precision
      for (const bath of [{}, { bathRatioMinusOne: -0.3, wallRadius: 25 }]) {
        const state = "wallRadius" in bath ? "thermal" : "boulware";
        const row: RowInput = {
          model: "swave",
          state,
          kappa: 0.2,
          mass: 1.5,
          tolerance: 1e-10,
          ...bath,
        };
        const big: RowInput = {
          ...row,
          kappa: 0.2 * s * s,
          mass: 1.5 * s,
          ...("wallRadius" in bath ? { wallRadius: 25 * s } : {}),
        };
        const x = log10Gtt(row), y = log10Gtt(big);
        expect(Math.abs(x.value - y.value)).toBeLessThanOrEqual(x.error! + y.error!);
      }
    }
  });
});
