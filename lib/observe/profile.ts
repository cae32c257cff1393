/**
 * The profile of a row: geometry, stress tensor and residuals of the field equations along the solution.
 *
 * Densities are those of the two-dimensional stress tensor of N = 12 kappa scalars:
 * pressure (kappa/2 pi)(c^2/4 - rho'^2) e^{-2 rho}, energy density the same plus (kappa/pi) rho'' e^{-2 rho}
 * (from T_mn of the Polyakov action; S. M. Christensen, S. A. Fulling, Phys. Rev. D 15 (1977) 2088, for the
 * fixed background).
 *
 * @module
 */
import type { CompiledModel } from "../model/compile.ts";
import type { RowInput } from "../model/input.ts";
import type { DenseStep } from "../solve/engine.ts";
import { emitEvaluateDouble } from "../solve/series/emit_double.ts";
import { pointAt, properDistance } from "./dense.ts";
import type { Frame } from "./frame.ts";
import { type Profile, PROFILE_COLUMNS } from "./result.ts";

const POINTS = 8; // points of a step

/**
 * Residual of an equation relative to its largest term; second derivatives count at least as much as
 * `natural`, the product of first ones, below which their own round-off shows.
 */
function relative(terms: readonly number[], natural: number): number {
  const size = Math.max(...terms.map(Math.abs), Math.abs(natural));
  return size === 0 ? 0 : terms.reduce((a, b) => a + b, 0) / size;
}

/**
 * Tabulates a recorded run.
 *
 * @param record Steps in either direction.
 * @param locusStep Number of steps outside the locus (for runs that start at a horizon: 0).
 * @param frame From solver units and gauge to the row's.
 * @returns Columns from outside inwards.
 */
export function profileOf(
  record: readonly DenseStep[],
  locusStep: number,
  frame: Frame,
  input: RowInput,
  model: CompiledModel,
): Profile {
  const program = model.programs["action"]!, evaluate = emitEvaluateDouble(program);
  const names = Object.keys(program.outputs),
    out = new Float64Array(names.length),
    none = new Float64Array(0);
  const parameters = Float64Array.from(
    program.parameters,
    (n) => n === "kappa" ? frame.kappa : n === "pi" ? Math.PI : input.a!,
  );
  const outward = record.length > 0 && record[0]!.h > 0;
  const rows: number[][] = [], lengths: number[] = [];
  let length = 0, atLocus = outward ? 0 : NaN;
  record.forEach((step, i) => {
    if (i === locusStep && !outward) atLocus = length;
    for (let j = 0; j <= POINTS; j++) {
      const x = step.h * j / POINTS;
      if (step.form === "root" && step.t + x === 0) continue; // the locus itself: sigma has no slope in y
      if (j > 0) length += properDistance(step, step.h * (j - 1) / POINTS, x);
      if (j === POINTS && i < record.length - 1) continue; // the next step begins there
      const p = pointAt(step, x);
      evaluate(none, p.phi, parameters, out);
      const [Hp, Hpp, K, Kp, V, Vp] = out as unknown as [
        number,
        number,
        number,
        number,
        number,
        number,
      ];
      const g = Math.exp(2 * p.rho), { kappa } = frame, R = p.curvature ?? -2 * p.ddrho / g;
      const flux = p.flux ?? frame.quarterC2 - p.drho * p.drho,
        density = input.kappa / (2 * Math.PI) * frame.curvature;
      const row = [
        frame.sigma(p.sigma),
        0,
        frame.dilaton(p.phi),
        p.rho + frame.rho,
        Math.exp(2 * (p.rho + frame.rho)),
        R * frame.curvature,
        density * (flux / g - R),
        density * flux / g,
        relative(
          [Hpp * p.dphi * p.dphi, Hp * p.ddphi, kappa * p.ddrho, -g * V],
          Hp * p.dphi * p.drho,
        ),
        relative(
          [2 * K * p.ddphi, 2 * Hp * p.ddrho, -g * Vp, Kp * p.dphi * p.dphi],
          2 * K * p.dphi * p.drho,
        ),
        relative([2 * p.drho * Hp * p.dphi, K * p.dphi * p.dphi, -g * V, -kappa * flux], 0),
      ];
      if (row.every(Number.isFinite)) {
        rows.push(row);
        lengths.push(length);
      }
    }
  });
  if (Number.isNaN(atLocus)) atLocus = length;
  const order = rows.map((_, i) => i);
  if (outward) order.reverse();
  const distance = (i: number) =>
    (outward ? lengths[i]! + frame.inner : atLocus - lengths[i]!) * frame.length;
  return Object.fromEntries(PROFILE_COLUMNS.map((name, c) => [
    name,
    Float64Array.from(order, (i) => name === "proper_distance" ? distance(i) : rows[i]![c]!),
  ])) as unknown as Profile;
}
