/**
 * Follows a linear-dilaton solution inwards from its asymptotic region until its kind shows.
 *
 * @module
 */
import type { Engine } from "../engine.ts";
import { land, zeroBetween } from "../land.ts";
import type { Arithmetic } from "../arithmetic/arithmetic.ts";
import { type CriticalLocus, followToLocus } from "../naked.ts";
import { reach, type Walker } from "../series/walker.ts";
import { SETTINGS } from "../settings.ts";
import { type FarProblem, farSeries, farStart } from "./far_series.ts";
import type { Parameters } from "../engine.ts";

/** How a solution ends, in units where max(|m|, kappa) = 1; outputs of the u-form at the locus. */
export type LinearEnd<T> =
  | {
    readonly end: "throat" | "horizon" | "zero";
    readonly at: Readonly<Record<string, T>>;
    readonly steps: number;
    readonly walker: Walker<T>;
  }
  | {
    readonly end: "locus";
    readonly lngtt: T;
    readonly Ep: T;
    readonly sigma: T;
    readonly state: T;
    readonly steps: number;
  }
  | { readonly end: "gave-up"; readonly why: string; readonly steps: number };

/** e-folds of -g_tt before a throat from which on it is watched for. */
export const NEAR = 7;

/** Sizes below which the unknowns of the u-form need no relative accuracy. */
export function floorsOf(kappa: number): Readonly<Record<string, number>> {
  return { F: 1, w: 1e-6 * kappa, v: 1e-6 * kappa, gap: 1, lngtt: 1, E: 1e-3 };
}

/** Parameters of the u-form. */
export function parametersOf<T>(p: FarProblem<T>, own: Parameters<T>): Parameters<T> {
  return { kappa: p.kappa, eps: p.eps, ...own };
}

/**
 * Integrates inwards.
 *
 * @param engine Arithmetic and model.
 * @param p Constants, scaled.
 * @param own The model's own parameters.
 */
export function inward<T>(engine: Engine<T>, p: FarProblem<T>, own: Parameters<T>): LinearEnd<T> {
  const A = engine.arithmetic, x = A.toNumber, { solvable } = engine.model;
  const parameters = parametersOf(p, own), floors = floorsOf(x(p.kappa));
  const u0 = farStart(A, p, SETTINGS.far.linearDilaton);
  const far = farSeries(A, p, A.from(u0), engine.startTerms);
  let form = "outer", walker = engine.walker(form, parameters, floors, 1);
  walker.place(A.from(u0), solvable ? [far.F] : [far.F, far.w, far.v]);
  let tried = Infinity;
  for (let steps = 0; steps < SETTINGS.steps; steps++) {
    const o = walker.outputs(),
      E = x(o.E!),
      T = x(o.T!),
      X = x(o.X!),
      D = x(o.D!),
      ratio = x(o.eratio!);
    if (!(E > 0) || Number.isNaN(D)) {
      return { end: "gave-up", why: "the solution became singular", steps };
    }
    if (T === 0 && X < 1e-6 * A.epsilon * A.epsilon) {
      return { end: "horizon", at: o, steps, walker };
    }
    const Ep = x(o.Ep!), F = E - Math.exp(x(walker.time()));
    const falling = T > 0 || F < 0; // E may reach the critical locus
    // distances in u to the critical locus, (E - Ep)^2/(2 E D), and to a throat, ln(X/|T|)
    const locusFirst = T >= 0 || (E - Ep) * (E - Ep) < 0.3 * E * D * Math.log(X / -T);
    const toLocus = Ep > 0 && E - Ep < tried &&
      ((x(o.BS!) < 0.3 && (ratio > 1.5 || locusFirst)) || (T > 0 && E < 0.5) ||
        (F < 0 && ratio > 1 && E < Math.max(0.5, 4 * Ep)));
    if (toLocus) {
      const start = { phi: o.phi!, rho: o.rho!, chi: o.chi!, sigma: o.sigma! };
      const before = engine.recorded();
      const end = followToLocus(engine, start, criticalLocus(A, p, own, o.Ep!));
      if (end) {
        const { lngtt, sigma } = end;
        return { end: "locus", lngtt, sigma, Ep: o.Ep!, state: o.state!, steps: steps + end.steps };
      }
      engine.forget(before);
      tried = 0.7 * (E - Ep); // the dilaton turned: go on in u and look again later
    }
    const next = ratio > 0.5 ? "outer" : "inner";
    if (next !== form) {
      const from = walker;
      walker = engine.walker(next, parameters, floors, 1);
      walker.place(from.time(), from.state());
      form = next;
    }
    // ln(-T) has no series where T passes zero, so the gap to a throat is followed only where it is small
    const gap = T < 0 ? Math.log(X / -T) : Infinity, near = gap < NEAR;
    const followed = [
      ...(near ? ["gap"] : []),
      ...(falling || Ep === 0 ? ["E"] : []),
      ...(engine.dense ? (E > 1e-12 ? ["X", "lngtt"] : ["X"]) : []), // ln E has no series at E = 0
    ];
    const safe = walker.expand(followed);
    if (!(safe > 0)) return { end: "gave-up", why: "the step shrank to nothing", steps };
    let h = -Math.min(safe, T < 0 || X > 1e-30 ? 64 : 1e300);
    if (falling && safe > 64) h = -Math.min(-h, reach(walker, "E", E));
    if (falling && Ep > 0) { while (!(walker.series("E", h) >= 0.25 * E)) h /= 2; }
    if (!near) h = -Math.min(-h, gap / 2); // no step passes a throat unseen: X falls about as e^u
    const turns = near && walker.series("gap", h) <= 0;
    if (turns) h = zeroBetween((s) => walker.series("gap", s), h);
    // without a critical locus E falls to zero before it could turn, or it turns before
    const zero = Ep === 0 && walker.series("E", h) <= 0;
    if (zero || turns) {
      const t = walker.time(), state = walker.state(), before = engine.recorded();
      land(
        walker,
        zero ? "E" : "gap",
        zero ? h : 1.001 * h,
        followed,
        (s) => engine.taken(form, walker, s),
      );
      const at = walker.outputs();
      if (zero) engine.forget(before); // dense output ends short of ln E = -infinity
      if (zero || x(at.E!) > Ep) return { end: zero ? "zero" : "throat", at, steps, walker };
      engine.forget(before); // the zero lay beyond the critical locus: go on in smaller steps
      walker.place(t, state);
      h = -Math.min(walker.expand(followed), -h) / 4;
    }
    engine.taken(form, walker, h);
    walker.advance(h);
  }
  return { end: "gave-up", why: "the step budget is used up", steps: SETTINGS.steps };
}

/** The critical locus E = Ep and the forms' parameters there. */
function criticalLocus<T>(
  A: Arithmetic<T>,
  p: FarProblem<T>,
  own: Parameters<T>,
  Ep: T,
): CriticalLocus<T> {
  const tau = A.sub(A.from(1), p.eps);
  return {
    parameters: { kappa: p.kappa, c4: A.mul(p.kappa, A.mul(tau, tau)), e: A.from(-1), Ep, ...own },
    near: -Math.log(4 * A.toNumber(Ep)) / 2,
    y: (phi) => A.sqrt(A.sub(A.exp(A.mul(A.from(-2), phi)), Ep)),
  };
}
