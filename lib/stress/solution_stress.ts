/**
 * The tensor of conformal fields along a solved s-wave geometry: the derivatives come from the power series of the
 * solution, so that nothing is differenced.
 *
 * @module
 */
import { compileModel } from "../model/compile.ts";
import { anomalyOf } from "../model/content.ts";
import { enginesOf } from "../observe/engines.ts";
import { denseRun } from "../observe/inner_end.ts";
import { unitOf } from "../observe/spherical_row.ts";
import type { DenseStep } from "../solve/engine.ts";
import { type ConformalFields, quickTensor, type StressAt } from "./conformal_stress.ts";
import { type Derivatives, ORDER } from "./geometry.ts";

/** The tensor at one place of a solution, Planck units. */
export interface StressPlace extends StressAt<number> {
  /** Areal radius. */
  readonly radius: number;
  /** -g_tt; 1 at infinity. */
  readonly minusGtt: number;
}

const PLACES = 4; // in every step of the solution

/** Derivatives of orders 0 to 4 of a series at distance x into its step. */
function derivativesOf(step: DenseStep, name: string, x: number): number[] {
  const W = step.code.accuracy.order + 1, from = step.code.row[name]! * W, s = x / step.unit;
  const out: number[] = [];
  for (let k = 0, scale = 1; k <= ORDER; k++, scale /= step.unit) {
    let sum = 0;
    for (let n = W - 1; n >= k; n--) {
      let factor = step.table[from + n]!;
      for (let i = 0; i < k; i++) factor *= n - i;
      sum = sum * s + factor;
    }
    out.push(sum * scale);
  }
  return out;
}

/** Derivatives of r e^{-rho}. */
function opticalRadius(r: readonly number[], rho: readonly number[]): number[] {
  const e = [Math.exp(-rho[0]!)]; // e' = -rho' e
  const binomial = [[1], [1, 1], [1, 2, 1], [1, 3, 3, 1], [1, 4, 6, 4, 1]];
  for (let k = 1; k <= ORDER; k++) {
    e.push(-binomial[k - 1]!.reduce((sum, b, j) => sum + b * rho[j + 1]! * e[k - 1 - j]!, 0));
  }
  return binomial.map((row, k) => row.reduce((sum, b, j) => sum + b * r[j]! * e[k - j]!, 0));
}

/** Fields at a place of a step, in units of the run. */
export function fieldsAt(step: DenseStep, x: number): Derivatives<number> {
  const r = derivativesOf(step, "phi", x), s = derivativesOf(step, "rho", x);
  return { s, N: [1, 0, 0, 0, 0], a: opticalRadius(r, s) }; // sigma is the optical coordinate
}

/**
 * The tensor of conformal fields in the empty state along an s-wave solution in the Boulware state, from far out to the
 * throat and behind it.
 *
 * @param solution Mass and kappa of the s-wave model whose geometry is taken.
 * @param fields Content and scheme; the state is the empty one.
 * @returns Places from outside inwards, double precision without bounds.
 * @throws {RangeError} if the content is impossible.
 * @example Far out the solution is Schwarzschild's
 * ```ts
 * import { solutionStress } from "@backstamp/backstamp";
 * const content = { scalars: 1, weyl: 0, vectors: 0 };
 * const [first] = await solutionStress({ mass: 10, kappa: 1 }, { content, scheme: "zeta" });
 * if (!(first!.radius > 100 && first!.minusGtt < 1)) throw new Error();
 * ```
 */
export async function solutionStress(
  solution: { readonly mass: number; readonly kappa: number },
  fields: Omit<ConformalFields, "surfaceGravity">,
): Promise<StressPlace[]> {
  const tensor = quickTensor(anomalyOf(fields.content, fields.scheme));
  const record: DenseStep[] = [], { mass, kappa } = solution;
  const engine = enginesOf(await compileModel("swave")).double(record);
  denseRun(engine, { model: "swave", state: "boulware", mass, kappa, tolerance: 1e-10 }, () => {});
  const L = unitOf(kappa, mass), unit = 1 / (L * L) / (L * L);
  return record.filter((step) => step.code.program.independent === "sigma").flatMap((step) =>
    Array.from({ length: PLACES }, (_, i) => {
      const at = fieldsAt(step, step.h * i / PLACES), T = tensor(at);
      return {
        radius: at.a[0]! * Math.exp(at.s[0]!) * L,
        minusGtt: Math.exp(2 * at.s[0]!),
        energy: T.energy * unit,
        radial: T.radial * unit,
        tangential: T.tangential * unit,
      };
    })
  );
}
