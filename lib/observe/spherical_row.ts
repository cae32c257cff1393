/**
 * Rows of spherically reduced gravity: kind and numbers at the locus. Lengths of the solver in units of
 * the larger of |M| and sqrt(kappa/pi).
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Arithmetic } from "../solve/arithmetic/arithmetic.ts";
import type { Engine } from "../solve/engine.ts";
import { type HorizonRoot, horizonRoot } from "../solve/horizon_root.ts";
import { inward, type SphericalEnd, type SphericalProblem } from "../solve/spherical/inward.ts";
import { outward } from "../solve/spherical/outward.ts";
import { bare, failed, refused, type Solution } from "./solution.ts";

/** Unit of length of a row. */
export function unitOf(kappa: number, size: number): number {
  return Math.max(Math.abs(size), Math.sqrt(kappa / Math.PI));
}

function area<T>(A: Arithmetic<T>, r: T): T {
  return A.mul(A.pi, A.mul(r, r)); // 2 H = pi r^2, a quarter of the area
}

/** Temperature at the wall of a bath with ratio 1 + eta: tau/(8 pi M sqrt(1 - 2M/r_w)). */
function wallTemperature<T>(A: Arithmetic<T>, M: T, rw: T, eta: T): T {
  const redshift = A.sqrt(A.sub(A.from(1), A.div(A.mul(A.from(2), M), rw)));
  return A.div(A.add(A.from(1), eta), A.mul(A.from(8), A.mul(A.pi, A.mul(M, redshift))));
}

/** Boulware (no wall) and thermal (wall) rows; `follow` receives the end of the run, for dense output. */
export function sphericalRow<T>(
  engine: Engine<T>,
  input: RowInput,
  follow?: (end: SphericalEnd<T>, unit: number, p: SphericalProblem<T>) => void,
): Solution<T> {
  const A = engine.arithmetic, x = A.toNumber, M = A.from(input.mass!);
  if (x(M) === 0) return bare("vacuum");
  const unit = unitOf(input.kappa, input.mass!), L = A.from(unit), L2 = A.mul(L, L);
  const kappa = A.div(A.from(input.kappa), L2), b = A.div(kappa, A.pi), m = A.div(M, L);
  const bath = input.wallRadius === undefined
    ? undefined
    : { eta: A.from(input.bathRatioMinusOne!), rw: A.div(A.from(input.wallRadius), L) };
  const problem = { kappa, b, m, ...bath }, end = inward(engine, problem);
  follow?.(end, unit, problem);
  if (end.end === "gave-up") return failed(`step-limit: ${end.why}`);
  const temperature: { temperature_bath?: T } = input.wallRadius === undefined
    ? {}
    : { temperature_bath: wallTemperature(A, M, A.from(input.wallRadius), bath!.eta) };
  // time of the solver to proper time at the wall: -g_tt = e^{2 rho}/(1 - 2M/r_w)
  const redshift = bath ? A.log1p(A.neg(A.div(A.mul(A.from(2), m), bath.rw))) : A.from(0);
  if (end.end === "locus") {
    return {
      outcome: "solved",
      kind: "naked-singularity",
      numbers: {
        ...temperature,
        dilaton_locus: A.mul(A.sqrt(b), L),
        lngtt: A.sub(end.lngtt, redshift),
      },
      exact: { curvature_locus: -Infinity }, // rho'' -> +infinity on the locus, R = -2 rho'' e^{-2 rho}
      evidence: { throat_condition: end.state },
    };
  }
  const o = end.at, r = o["r"]!;
  return {
    outcome: "solved",
    kind: "throat",
    numbers: {
      ...temperature,
      dilaton_locus: A.mul(r, L),
      lngtt: A.sub(o["lngtt_throat"]!, redshift),
      curvature_locus: A.div(o["curvature"]!, L2),
      entropy_classical: A.mul(area(A, r), L2),
    },
    exact: {},
    evidence: { throat_condition: o["state"]! },
    separation: A.div(A.sub(A.mul(r, r), b), b),
  };
}

/** 2M - r_h in units of b, and tau - 1, of the solution with horizon radius rh; lengths in units of `unit`. */
function fromHorizon<T>(engine: Engine<T>, input: RowInput, rh: T, unit: number) {
  const A = engine.arithmetic, L = A.from(unit), kappa = A.div(A.from(input.kappa), A.mul(L, L));
  return outward(engine, {
    b: A.div(kappa, A.pi),
    rh,
    rw: A.div(A.from(input.wallRadius!), L),
    kappa,
  });
}

/** The horizon of a given mass, as zeta = (r_h - 2M)/b in double precision; shared as first guess. */
export function sphericalHorizonGuess(
  engine: Engine<number>,
  input: RowInput,
): HorizonRoot | undefined {
  if (input.horizonDilaton !== undefined) return undefined;
  const unit = unitOf(input.kappa, input.mass!), m = input.mass! / unit;
  const b = input.kappa / (unit * unit) / Math.PI, rw = input.wallRadius! / unit;
  const delta = (rh: number) => rh < rw ? fromHorizon(engine, input, rh, unit)?.delta ?? NaN : NaN;
  let zeta = 0; // r_h = 2m + b zeta and delta(r_h) = -zeta: a contraction with factor of order b/m^2
  for (let i = 0; i < 60; i++) {
    const next = -delta(2 * m + b * zeta);
    if (Math.abs(next - zeta) <= 4e-16 * Math.abs(next)) return { found: true, at: next, slope: 1 };
    if (!Number.isFinite(next) || !((2 * m + b * next) > 1.2 * Math.sqrt(b))) break;
    zeta = next;
  }
  const root = horizonRoot((rh) => rh + b * delta(rh) - 2 * m, Math.sqrt(b), 2 * m);
  return root.found ? { found: true, at: (root.at - 2 * m) / b, slope: root.slope } : root;
}

/** Hartle-Hawking rows: the bath is the one of the regular horizon. */
export function sphericalHartleHawking<T>(
  engine: Engine<T>,
  input: RowInput,
  guess: HorizonRoot | undefined,
): Solution<T> {
  const A = engine.arithmetic, x = A.toNumber, two = A.from(2);
  const unit = unitOf(input.kappa, input.horizonDilaton ?? input.mass!),
    L = A.from(unit),
    L2 = A.mul(L, L);
  const b = A.div(A.div(A.from(input.kappa), L2), A.pi);
  let rh: T, far;
  if (input.horizonDilaton !== undefined) {
    rh = A.div(A.from(input.horizonDilaton), L);
    if (!(x(A.sub(A.mul(rh, rh), b)) > 0)) {
      return refused("below-critical: the horizon radius is not above the critical one");
    }
    far = fromHorizon(engine, input, rh, unit);
  } else {
    if (!guess?.found) {
      return refused("below-critical: no regular horizon of this mass exists inside the wall");
    }
    const twoM = A.mul(two, A.div(A.from(input.mass!), L));
    let zeta = A.from(guess.at);
    rh = A.add(twoM, A.mul(b, zeta));
    far = fromHorizon(engine, input, rh, unit);
    for (let i = 0; far && i < 12; i++) {
      const step = A.div(A.add(zeta, far.delta), A.from(guess.slope));
      if (Math.abs(x(step)) <= 4 * A.epsilon * Math.abs(x(zeta))) break;
      zeta = A.sub(zeta, step);
      rh = A.add(twoM, A.mul(b, zeta));
      far = fromHorizon(engine, input, rh, unit);
    }
  }
  if (!far) return failed("step-limit: the wall was not reached from the horizon");
  const M = input.horizonDilaton === undefined
    ? A.from(input.mass!)
    : A.mul(A.div(A.add(rh, A.mul(b, far.delta)), two), L);
  const radius = A.mul(rh, L);
  // surface gravity 1/(2 r_h) in the horizon gauge, clocks at the wall run at e^{rho_w}
  const temperature = A.div(
    A.exp(A.div(A.neg(far.lngWall), two)),
    A.mul(A.from(4), A.mul(A.pi, radius)),
  );
  return {
    outcome: "solved",
    kind: "horizon",
    numbers: {
      ...(input.mass === undefined ? { mass: M } : {}),
      bath_ratio: A.add(A.from(1), far.excess),
      bath_ratio_minus_one: far.excess,
      dilaton_locus: radius,
      curvature_locus: A.div(two, A.mul(L2, A.sub(A.mul(rh, rh), b))), // R = 2/(r_h^2 - b)
      temperature_bath: temperature,
      temperature_horizon: temperature,
      entropy_classical: A.mul(area(A, rh), L2),
    },
    exact: { minus_gtt_locus: 0, log10_minus_gtt_locus: -Infinity },
    evidence: { horizon_above_critical: A.sub(A.mul(rh, rh), b) },
    separation: A.div(A.sub(A.mul(rh, rh), b), b),
  };
}
