import { expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { familyInput, familyRows } from "../reference/family_rows.ts";
import { oracleInput, oracleRows } from "../reference/oracle_rows.ts";

const models = Object.fromEntries(
  await Promise.all(
    (["cghs", "rst", "bpp", "solvable", "swave"] as const).map(async (
      n,
    ) => [n, await compileModel(n)]),
  ),
);

it("Rows 1e-4 or more from a boundary meet a tolerance of 1e-11 in every column", () => {
  const family = familyRows(400, 11).filter((row) => Math.abs(row.bathRatioMinusOne ?? 1) > 1e-4)
    .map((row) => familyInput(row, 1e-11));
  const others = oracleRows().filter((row) => !row.case.includes("near")).map((row) =>
    oracleInput(row, 1e-11)
  );
  let checked = 0;
  for (const input of [...family, ...others]) {
    const { result } = computeRow(input, models[input.model]!);
    const above = result.evidence["mass_above_critical"];
    const distance = above &&
      Math.abs(above.value) / Math.max(Math.abs(input.mass ?? 0), input.kappa);
    const horizon = result.evidence["horizon_above_critical"];
    if ((distance ?? 1) < 1e-4 || result.outcome === "refused") continue;
    if (
      input.horizonDilaton !== undefined && horizon && Math.abs(horizon.value) < 1e-4 * input.kappa
    ) continue;
    checked++;
    expect(result.outcome, `${JSON.stringify(input)} ${result.reason}`).toBe("solved");
    const g = result.numbers.minus_gtt_locus;
    if (g?.error && g.value > 1e-300) expect(g.error / g.value).toBeLessThan(1e-11); // stricter than the stated 1e-10
  }
  expect(checked).toBeGreaterThan(300);
});
