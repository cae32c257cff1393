import { bignumber } from "mathjs";
import { expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { oracleInput, oracleRows } from "../reference/oracle_rows.ts";
import { Tally } from "./exact.ts";

// Reference: tests/reference/oracle/oracle.py, an integration of the plain second-order equations with
// 60 to 220 digits in mpmath (own computation; no published source).
const models = { cghs: await compileModel("cghs"), swave: await compileModel("swave") };

it("Bounds hold in every column of 240 cghs and swave rows against integrations of many digits", () => {
  const tally = new Tally(), wrong: string[] = [], rows = oracleRows();
  let decided = 0;
  for (const row of rows) {
    const { result } = computeRow(oracleInput(row), models[row.model]);
    const kind = result.outcome === "solved" ? result.kind! : result.outcome;
    if (kind === "undecided" || kind === "failed") continue;
    decided++;
    if (kind !== row.kind) wrong.push(`${row.case}: ${kind} for ${row.kind}`);
    const references = {
      dilaton_locus: row.dilatonLocus,
      minus_gtt_locus: row.minusGttLocus,
      log10_minus_gtt_locus: row.lnMinusGttLocus?.div(bignumber(10).ln()),
      curvature_locus: row.curvatureLocus,
      mass: row.massResult,
      bath_ratio_minus_one: row.bathRatioMinusOneResult,
    } as const;
    for (const [column, reference] of Object.entries(references)) {
      const b = result.numbers[column as keyof typeof references];
      if (b && reference && b.error !== 0) tally.add(row.case, column, b.value, b.error, reference);
    }
  }
  console.log("median bound/error:", tally.medians());
  expect(wrong).toEqual([]);
  expect(tally.violations).toEqual([]);
  expect(decided / rows.length).toBeGreaterThan(0.99);
  for (const median of Object.values(tally.medians())) expect(median).toBeLessThan(1e4);
});
