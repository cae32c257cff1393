/**
 * Follows a solution of spherical gravity inwards, from infinity or from a cavity wall, until its kind
 * shows.
 *
 * @module
 */
import type { Engine, Parameters } from "../engine.ts";
import { land } from "../land.ts";
import { followToLocus } from "../naked.ts";
import { reach, type Walker } from "../series/walker.ts";
import { SETTINGS } from "../settings.ts";
import { NEAR } from "../linear_dilaton/inward.ts";
import { farSeries } from "./far_series.ts";
import { type Cavity, wallData } from "./wall.ts";

/** How a solution ends, in units of the larger of |m| and sqrt b. */
export type SphericalEnd<T> =
  | {
    readonly end: "throat";
    readonly at: Readonly<Record<string, T>>;
    readonly form: string;
    readonly walker: Walker<T>;
    readonly steps: number;
  }
  | {
    readonly end: "locus";
    readonly lngtt: T;
    readonly sigma: T;
    readonly state: T;
    readonly steps: number;
  }
  | { readonly end: "gave-up"; readonly why: string; readonly steps: number };

/** Sizes below which the unknowns of the split form need no relative accuracy. */
export const FLOORS = { rho: 1, mu: 1e-2, om: 1e-2, gap: 1, r: 1e-3 } as const;

/** A hole alone (Boulware) or in a cavity, in units where the larger of |m| and sqrt b is 1. */
export type SphericalProblem<T> =
  | { readonly b: T; readonly m: T; readonly kappa: T }
  | (Cavity<T> & { readonly kappa: T });

/** Integrates inwards. */
export function inward<T>(engine: Engine<T>, p: SphericalProblem<T>): SphericalEnd<T> {
  const A = engine.arithmetic, x = A.toNumber, bath = "rw" in p, negative = x(p.m) < 0;
  const form = bath ? "bath" : negative ? "negative" : "empty";
  const parameters: Parameters<T> = { ...p, pi: A.pi };
  const walker = engine.walker(form, parameters, FLOORS, 1);
  const r0 = SETTINGS.far.spherical;
  const start = bath ? wallData(A, p) : farSeries(A, p, r0, 2 * engine.startTerms);
  walker.place(A.from(bath ? 0 : r0), [start.rho, start.mu, start.om]);
  const rootB = Math.sqrt(x(p.b));
  let tried = Infinity;
  for (let steps = 0; steps < SETTINGS.steps; steps++) {
    const o = walker.outputs(), r = x(o.r!), T = x(o.T!), D = x(o.D!);
    if (!(r > rootB) || Number.isNaN(D)) {
      return { end: "gave-up", why: "the solution became singular", steps };
    }
    const falling = T > 0 || negative; // r may reach the critical locus
    const close = r < (negative ? Math.max(0.5, 4 * rootB) : 1.2 * rootB);
    if ((close || (T > 0 && r < x(p.m))) && r < tried) {
      const half = bath ? A.div(A.add(A.from(1), p.eta), A.mul(A.from(4), p.m)) : A.from(0);
      const before = engine.recorded();
      const end = followToLocus(engine, {
        phi: o.r!,
        rho: o.rho!,
        chi: o.chi!,
        sigma: walker.time(),
      }, {
        parameters: { ...parameters, c4: A.mul(p.kappa, A.mul(half, half)), e: A.from(1) },
        near: 2 * rootB,
        y: (phi) => A.sqrt(A.sub(phi, A.sqrt(p.b))),
      });
      if (end) {
        return {
          end: "locus",
          lngtt: end.lngtt,
          sigma: end.sigma,
          state: o.state!,
          steps: steps + end.steps,
        };
      }
      engine.forget(before);
      tried = rootB + 0.8 * (r - rootB);
    }
    // ln(-T) has no series where T passes zero, so the gap to a throat is followed only where it is small
    const gap = T < 0 && !negative ? x(o.lngtt!) - Math.log(-T) : Infinity, near = gap < NEAR;
    const followed = [
      ...(near ? ["gap"] : []),
      ...(falling ? ["r"] : []),
      ...(engine.dense ? ["g", "r"] : []),
    ];
    const safe = walker.expand(followed);
    if (!(safe > 0)) return { end: "gave-up", why: "the step shrank to nothing", steps };
    let h = -safe;
    if (falling && safe > 64) h = -Math.min(-h, reach(walker, "r", r));
    if (falling) { while (!(walker.series("r", h) >= 0.5 * r)) h /= 2; }
    if (!near && gap < Infinity) h = -Math.min(-h, gap / (2 * Math.abs(walker.slope("lngtt"))));
    if (near && walker.series("gap", h) <= 0) {
      land(walker, "gap", h, followed, (s) => engine.taken(form, walker, s));
      return { end: "throat", at: walker.outputs(), form, walker, steps };
    }
    engine.taken(form, walker, h);
    walker.advance(h);
  }
  return { end: "gave-up", why: "the step budget is used up", steps: SETTINGS.steps };
}
