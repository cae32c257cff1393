/**
 * Points along a recorded run: values and derivatives with respect to sigma from the power series.
 *
 * @module
 */
import type { DenseStep } from "../solve/engine.ts";

/** One point of a solution, in solver units. */
export interface Point {
  readonly sigma: number;
  readonly phi: number;
  readonly rho: number;
  /** phi', phi'', rho', rho'' with ' = d/dsigma, by differentiating the dense output. */
  readonly dphi: number;
  readonly ddphi: number;
  readonly drho: number;
  readonly ddrho: number;
  /** c^2/4 - rho'^2 without cancellation, where the form has it. */
  readonly flux?: number;
  /** R of the two-dimensional metric, where the form has it without differentiation. */
  readonly curvature?: number;
  /** e^rho |d sigma/dt|: proper distance per unit of the step's variable. */
  readonly stretch: number;
}

function jet(step: DenseStep, name: string, x: number): readonly [number, number, number] {
  const W = step.code.accuracy.order + 1, from = step.code.row[name]! * W, s = x / step.unit;
  let f = 0, d = 0, dd = 0;
  for (let k = W - 1; k >= 0; k--) {
    dd = dd * s + d;
    d = d * s + f;
    f = f * s + step.table[from + k]!;
  }
  return [f, d / step.unit, 2 * dd / (step.unit * step.unit)];
}

/** The point at distance x into a step. */
export function pointAt(step: DenseStep, x: number): Point {
  const [phi, phi1, phi2] = jet(step, "phi", x), [rho, rho1, rho2] = jet(step, "rho", x);
  const [sigma, s1, s2] = jet(step, "sigma", x);
  return {
    sigma,
    phi,
    rho,
    dphi: phi1 / s1,
    ddphi: (phi2 - phi1 / s1 * s2) / (s1 * s1),
    drho: rho1 / s1,
    ddrho: (rho2 - rho1 / s1 * s2) / (s1 * s1),
    ...("flux" in step.code.row ? { flux: jet(step, "flux", x)[0] } : {}),
    ...("curvature" in step.code.row ? { curvature: jet(step, "curvature", x)[0] } : {}),
    stretch: jet(step, "erho", x)[0] * Math.abs(s1),
  };
}

// Nodes and weights of the 5-point Gauss-Legendre rule on [-1, 1] (Abramowitz & Stegun, table 25.4).
const NODES = [-0.906179845938664, -0.5384693101056831, 0, 0.5384693101056831, 0.906179845938664];
const WEIGHTS = [
  0.23692688505618908,
  0.47862867049936647,
  0.5688888888888889,
  0.47862867049936647,
  0.23692688505618908,
];

/** Proper distance between distances x and y into a step. */
export function properDistance(step: DenseStep, x: number, y: number): number {
  const half = Math.abs(y - x) / 2, middle = (x + y) / 2;
  let sum = 0;
  NODES.forEach((n, i) => {
    const t = middle + n * (y - x) / 2, s1 = jet(step, "sigma", t)[1];
    sum += WEIGHTS[i]! * jet(step, "erho", t)[0] * Math.abs(s1);
  });
  return sum * half;
}
