import { describe, expect, it } from "vitest";
import { writeNumber } from "../../lib/batch/number.ts";
import { resultCells } from "../../lib/batch/result_row.ts";
import { RESULT_COLUMNS } from "../../lib/batch/result_columns.ts";
import { readTable } from "../../lib/batch/table.ts";
import type { RowResult } from "../../lib/observe/result.ts";

const row = readTable(
  new TextEncoder().encode("case,model,state,kappa,mass\nx,rst,boulware,1,2\n"),
)[0]!;
const solved: RowResult = {
  outcome: "solved",
  reason: "",
  kind: "throat",
  numbers: { dilaton_locus: { value: -0.5, error: 1e-17 }, curvature_locus: { value: -Infinity } },
  innerEnd: "null-singularity",
  validity: "inside",
  evidence: {},
};

describe("A results row", () => {
  it("has exactly the columns of the contract, in order", () => {
    const names =
      "case, model, state, outcome, reason, kind, kappa, lambda, a, wall_radius, mass, mass_err, bath_ratio, bath_ratio_err, bath_ratio_minus_one, bath_ratio_minus_one_err, dilaton_locus, dilaton_locus_err, minus_gtt_locus, minus_gtt_locus_err, log10_minus_gtt_locus, log10_minus_gtt_locus_err, curvature_locus, curvature_locus_err, temperature_bath, temperature_bath_err, temperature_horizon, temperature_horizon_err, entropy_classical, entropy_classical_err, inner_end, validity, tolerance, stamp";
    expect(RESULT_COLUMNS.map(({ name }) => name)).toEqual(names.split(", "));
    expect(Object.keys(resultCells(row, solved, "s"))).toEqual(names.split(", "));
  });

  it("writes divergent numbers as INF and -INF with an empty error, absent ones empty", () => {
    const cells = resultCells(row, solved, "s");
    expect([cells["curvature_locus"], cells["curvature_locus_err"], cells["temperature_horizon"]])
      .toEqual(["-INF", "", ""]);
    expect([cells["mass"], cells["mass_err"]]).toEqual(["2", "0"]);
  });

  it("refuses to write NaN, a missing bound, or an underflown -g_tt without its error", () => {
    const with_ = (numbers: RowResult["numbers"]) => () =>
      resultCells(row, { ...solved, numbers }, "s");
    expect(with_({ dilaton_locus: { value: NaN, error: 0 } })).toThrow(/NaN/);
    expect(with_({ dilaton_locus: { value: 1 } })).toThrow(/_err must be/);
    expect(
      with_({
        minus_gtt_locus: { value: 0, error: 0 },
        log10_minus_gtt_locus: { value: -400, error: 1 },
      }),
    ).toThrow(/5e-324/);
    expect(
      with_({
        minus_gtt_locus: { value: 0, error: 5e-324 },
        log10_minus_gtt_locus: { value: -400, error: 1 },
      }),
    ).not.toThrow();
  });

  it("keeps inputs and stamp of refused rows and leaves the rest empty", () => {
    const cells = resultCells(row, {
      outcome: "refused",
      reason: "below-critical: so it is",
      numbers: {},
      evidence: {},
    }, "s");
    const filled = Object.entries(cells).filter(([, text]) => text !== "").map(([name]) => name);
    expect(filled).toEqual([
      "case",
      "model",
      "state",
      "outcome",
      "reason",
      "kappa",
      "lambda",
      "mass",
      "mass_err",
      "tolerance",
      "stamp",
    ]);
  });
});

describe("A number", () => {
  it("reads back to the same double", () => {
    for (const x of [0.1, 1 / 3, 5e-324, 1e21, -1.7976931348623157e308, 123456789012345680000, 0]) {
      expect(Object.is(Number(writeNumber(x)), x)).toBe(true);
    }
  });
});
