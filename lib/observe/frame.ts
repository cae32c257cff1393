/**
 * From the units and gauge of a run to those of its row.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Engine } from "../solve/engine.ts";
import { outward as linearOutward } from "../solve/linear_dilaton/outward.ts";
import { outward as sphericalOutward } from "../solve/spherical/outward.ts";
import { linearConstants, massParameter } from "./linear_row.ts";
import { unitOf } from "./spherical_row.ts";

/** Linear maps from solver values to row values. */
export interface Frame {
  /** kappa in solver units. */
  readonly kappa: number;
  /** c^2/4 in solver units. */
  readonly quarterC2: number;
  readonly sigma: (sigma: number) => number;
  readonly dilaton: (phi: number) => number;
  /** Added to rho. */
  readonly rho: number;
  /** Factor of curvatures and densities. */
  readonly curvature: number;
  /** Factor of proper distances. */
  readonly length: number;
  /** Proper distance from the horizon to the inner edge of an outward run, solver units. */
  readonly inner: number;
}

function linear(
  kappa: number,
  M0: number,
  lambda: number,
  u: (solver: number) => number,
  rho: number,
  inner: number,
  tau: number,
): Frame {
  const ln = Math.log(M0);
  return {
    kappa,
    quarterC2: tau * tau, // c = 2 lambda tau
    sigma: (s) => (u(2 * s) + ln) / (2 * lambda),
    dilaton: (phi) => phi - ln / 2,
    rho,
    curvature: lambda * lambda,
    length: 1 / lambda,
    inner,
  };
}

function spherical(
  kappa: number,
  L: number,
  lnRedshift: number,
  inner: number,
  halfC: number,
): Frame {
  return {
    kappa,
    quarterC2: halfC * halfC,
    sigma: (s) => s * L * Math.exp(lnRedshift / 2),
    dilaton: (r) => r * L,
    rho: -lnRedshift / 2,
    curvature: 1 / (L * L),
    length: L,
    inner,
  };
}

/** The frame of a Boulware or thermal row. */
export function inwardFrame(engine: Engine<number>, input: RowInput): Frame {
  if (engine.model.family === "linear-dilaton") {
    const eps = input.state === "boulware" ? 1 : -input.bathRatioMinusOne!;
    const { m } = massParameter(engine, input, linearConstants(engine, input, eps));
    const M0 = Math.max(Math.abs(m), input.kappa);
    return linear(input.kappa / M0, M0, input.lambda!, (u) => u, 0, 0, 1 - eps);
  }
  const L = unitOf(input.kappa, input.mass!);
  const redshift = input.wallRadius === undefined
    ? 0
    : Math.log1p(-2 * input.mass! / input.wallRadius);
  const halfC = input.wallRadius === undefined
    ? 0
    : (1 + input.bathRatioMinusOne!) / (4 * input.mass! / L);
  return spherical(input.kappa / (L * L), L, redshift, 0, halfC);
}

/**
 * Repeats the outward run of a Hartle-Hawking row on a dense engine.
 *
 * @param horizon e^{-2 phi} or the areal radius at the horizon.
 * @returns Its frame, or undefined if the run failed.
 */
export function outwardFrame(
  engine: Engine<number>,
  input: RowInput,
  horizon: number,
): Frame | undefined {
  if (engine.model.family === "linear-dilaton") {
    const c = linearConstants(engine, input, 0),
      M0 = Math.max(horizon, input.kappa),
      kappa = input.kappa / M0;
    const far = linearOutward(engine, { ...c, kappa, Eh: horizon / M0 }, c.own);
    if (!far) return undefined;
    const alpha = 1 + far.excess, inner = Math.exp(far.rhoStart); // surface gravity lambda = 1 in this gauge
    return linear(
      kappa,
      M0,
      input.lambda!,
      (u) => far.uFar + (u - far.uRun) / alpha,
      Math.log1p(far.excess),
      inner,
      1,
    );
  }
  const L = unitOf(input.kappa, horizon), kappa = input.kappa / (L * L), rh = horizon / L;
  const far = sphericalOutward(engine, {
    b: kappa / Math.PI,
    rh,
    rw: input.wallRadius! / L,
    kappa,
  });
  return far && spherical(kappa, L, far.lngWall, Math.exp(far.rhoStart) * 2 * rh, 1 / (2 * rh));
}
