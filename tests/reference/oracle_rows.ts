/**
 * Rows of the high-precision oracle: inputs as doubles, results with 36 digits.
 *
 * @module
 */

import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { type BigNumber, bignumber } from "mathjs";
import type { RowInput } from "../../lib/model/input.ts";
import type { Big } from "./closed_form.ts";

/** One row; a result that is absent is `undefined`, a divergent one is infinite. */
export interface OracleRow {
  readonly case: string;
  readonly model: "cghs" | "swave";
  readonly state: "boulware" | "thermal" | "hartle-hawking";
  readonly kappa: number;
  readonly mass?: number;
  readonly bathRatioMinusOne?: number;
  readonly horizonDilaton?: number;
  readonly wallRadius?: number;
  readonly kind: "throat" | "horizon" | "naked-singularity";
  /** phi (cghs) or areal radius (swave). */
  readonly dilatonLocus: Big;
  /** Absent at horizons. */
  readonly lnMinusGttLocus?: Big;
  /** Absent below e^-20000. */
  readonly minusGttLocus?: Big;
  readonly curvatureLocus: Big;
  readonly massResult: Big;
  readonly bathRatioMinusOneResult: Big;
  /** log10 of the constraint's relative residual at the locus (for horizons: far outside). */
  readonly log10Check: number;
}

/** Reads a table that `oracle.py` wrote. */
export function oracleRows(
  path: string | URL = new URL("oracle/rows.csv", import.meta.url),
): OracleRow[] {
  const records: Record<string, string>[] = parse(readFileSync(path), { columns: true });
  const big = (text: string): Big => bignumber(text.replace("INF", "Infinity")) as BigNumber; // exact: 36 digits fit
  return records.map((r) => ({
    case: r.case,
    model: r.model as OracleRow["model"],
    state: r.state as OracleRow["state"],
    kappa: Number(r.kappa),
    ...(r.mass === "" ? {} : { mass: Number(r.mass) }),
    ...(r.bath_ratio_minus_one === "" ? {} : { bathRatioMinusOne: Number(r.bath_ratio_minus_one) }),
    ...(r.horizon_dilaton === "" ? {} : { horizonDilaton: Number(r.horizon_dilaton) }),
    ...(r.wall_radius === "" ? {} : { wallRadius: Number(r.wall_radius) }),
    kind: r.kind as OracleRow["kind"],
    dilatonLocus: big(r.dilaton_locus),
    ...(r.ln_minus_gtt_locus === "" ? {} : { lnMinusGttLocus: big(r.ln_minus_gtt_locus) }),
    ...(r.minus_gtt_locus === "" ? {} : { minusGttLocus: big(r.minus_gtt_locus) }),
    curvatureLocus: big(r.curvature_locus),
    massResult: big(r.mass_result),
    bathRatioMinusOneResult: big(r.bath_ratio_minus_one_result),
    log10Check: Number(r.log10_check),
  }));
}

/** The row as the solver takes it. */
export function oracleInput(row: OracleRow, tolerance = 1e-10): RowInput {
  const { model, state, kappa, mass, bathRatioMinusOne, horizonDilaton, wallRadius } = row;
  return {
    model,
    state,
    kappa,
    tolerance,
    ...(model === "cghs" ? { lambda: 1 } : {}),
    ...(mass === undefined ? {} : { mass }),
    ...(bathRatioMinusOne === undefined ? {} : { bathRatioMinusOne }),
    ...(horizonDilaton === undefined ? {} : { horizonDilaton }),
    ...(wallRadius === undefined ? {} : { wallRadius }),
  };
}
