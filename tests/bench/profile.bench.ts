/**
 * Speed of one solve, as ratios measured in one run: against `odex` from npm on the plain second-order
 * equations, of double-double to double precision, and of the closed form.
 *
 * Run by `deno task bench`.
 *
 * @module
 */
import { Solver } from "odex";
import { closeAlgebra } from "../../lib/expr/proposer.ts";
import { compileModel } from "../../lib/model/compile.ts";
import type { RowInput } from "../../lib/model/input.ts";
import { enginesOf } from "../../lib/observe/engines.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { solveIn } from "../../lib/observe/solve_in.ts";
import { closedForm } from "../../lib/solve/closed_form.ts";
import { farSeries } from "../../lib/solve/linear_dilaton/far_series.ts";
import { double } from "../../lib/solve/arithmetic/double.ts";

const REPEATS = 15;

/** Median and spread of the time of f, milliseconds. */
function time(
  f: () => void,
): { readonly median: number; readonly low: number; readonly high: number } {
  for (let i = 0; i < 5; i++) f(); // warm
  const list = Array.from({ length: REPEATS }, () => {
    const t = performance.now();
    f();
    return performance.now() - t;
  }).sort((a, b) => a - b);
  return { median: list[REPEATS >> 1]!, low: list[0]!, high: list[REPEATS - 1]! };
}

let sink = 0; // keeps the engine from deleting the work

/** CGHS with kappa = 1, m = 10, tau = 0 by odex, from the same far point to just outside the throat. */
function byOdex(): void {
  const p = { kappa: 0.1, eps: 1, hp: 1, k: 0, delta: 1, m: 1 }, u0 = 5;
  const far = farSeries(double, p, u0, 12), E = Math.exp(u0) + far.F;
  const phi = -Math.log(E) / 2, s = 0.5 + far.v, X = Math.exp(u0 + 2 * far.w);
  const q = 2 * E - p.kappa, D = X - p.kappa * s * s;
  const dphi = -D / (s * q + Math.sqrt(s * s * q * q + p.kappa * D));
  const solver = new Solver(4);
  solver.absoluteTolerance = solver.relativeTolerance = 1e-12;
  const r = solver.solve(
    (_t: number, [f, df, rho, drho]: number[]) => {
      // (1) and (2) in u, divided by 4: a phi'' + kappa rho'' = one, 4 e phi'' + a rho'' = two
      const e = Math.exp(-2 * f!),
        g = Math.exp(2 * rho!),
        a = -2 * e,
        one = e * (g - 4 * df! * df!),
        two = -one;
      const det = a * a - 4 * p.kappa * e;
      return [-df!, -(one * a - p.kappa * two) / det, -drho!, -(two * a - 4 * e * one) / det];
    },
    -u0, // odex runs upwards: t = -u
    [phi, dphi, phi + u0 / 2 + far.w, s + dphi],
    1,
  );
  sink += r.y[0]!;
}

const cghs = await compileModel("cghs"), rst = await compileModel("rst");
closeAlgebra();
const throat: RowInput = {
  model: "cghs",
  state: "boulware",
  kappa: 1,
  lambda: 1,
  mass: 10,
  tolerance: 1e-10,
};
const family: RowInput = { ...throat, model: "rst" };
const fast = enginesOf(cghs).double(), wide = enginesOf(cghs).wide;
const rows = {
  "double, one throat (CGHS)": time(() => void solveIn(fast, throat)),
  "double-double, the same": time(() => void solveIn(wide, throat)),
  "row with bounds and inner end, the same": time(() => void computeRow(throat, cghs)),
  "row with bounds and inner end, RST": time(() => void computeRow(family, rst)),
  "odex at 1e-12, outside the throat only": time(byOdex),
  "closed form, 1,000 times (RST)": time(() => {
    for (let i = 0; i < 1000; i++) {
      sink +=
        closedForm({ a: 0.5, kappa: 1, lambda: 1, bathRatioMinusOne: -1, mass: 10 + i }).decisive
          .value;
    }
  }),
};
const unit = rows["double, one throat (CGHS)"].median;
console.log(
  `Deno ${Deno.version.deno}, ${navigator.hardwareConcurrency} cores; ratios to the first line`,
);
for (const [name, t] of Object.entries(rows)) {
  console.log(
    `${name.padEnd(42)} ${(t.median / unit).toFixed(2).padStart(8)}   ${t.median.toFixed(3)} ms (${
      t.low.toFixed(3)
    } to ${t.high.toFixed(3)})`,
  );
}
if (!Number.isFinite(sink)) throw new Error("a benchmark computed nothing");
