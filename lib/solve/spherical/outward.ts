/**
 * Hartle-Hawking solutions of spherical gravity: outwards from a regular horizon r_h to the cavity wall.
 *
 * In the gauge where the surface gravity is 1/(2 r_h) the bath form with m = r_h/2, eta = 0 starts at
 * om = mu = g r_h/(r_h^2 - b), g = e^{2 rho}, to first order in g. At the wall, with 2M = r_h + b delta,
 *
 *     delta = om - r_w (2 dp + b dp^2/g),   tau = (2M/r_h) sqrt(1 + b (om - delta)/(r_w g))
 *
 * so that mass and bath ratio keep all digits of what matter adds (derived here).
 *
 * @module
 */
import type { Engine } from "../engine.ts";
import { land } from "../land.ts";
import { SETTINGS } from "../settings.ts";
import { FLOORS } from "./inward.ts";

/** What the wall tells, in the unit of length of the problem. */
export interface WallResult<T> {
  /** (2M - r_h)/b. */
  readonly delta: T;
  /** Bath ratio minus one. */
  readonly excess: T;
  /** ln e^{2 rho} at the wall in the horizon gauge. */
  readonly lngWall: T;
  /** rho at the inner end of the run. */
  readonly rhoStart: number;
  readonly steps: number;
}

/** Integrates outwards; undefined if the wall was not reached. */
export function outward<T>(
  engine: Engine<T>,
  p: { readonly b: T; readonly rh: T; readonly rw: T; readonly kappa: T },
): WallResult<T> | undefined {
  const A = engine.arithmetic, x = A.toNumber, two = A.from(2);
  const m = A.div(p.rh, two), d = A.sub(A.mul(p.rh, p.rh), p.b);
  const relative = x(d) / (x(p.rh) * x(p.rh)); // distance from the critical radius
  const ln0 = Math.log(A.epsilon) * 0.75 + 2 * Math.log(Math.min(1, relative));
  const g0 = A.exp(A.from(ln0)), first = A.div(A.mul(g0, p.rh), d);
  const parameters = { b: p.b, m, eta: A.from(0), rw: p.rw, pi: A.pi, kappa: p.kappa };
  let form = "bath", walker = engine.walker(form, parameters, FLOORS, x(p.rh));
  walker.place(A.from(0), [A.from(ln0 / 2), first, first]);
  const followed = engine.dense ? ["wall", "g"] : ["wall"];
  for (let steps = 0; steps < SETTINGS.steps; steps++) {
    const o = walker.outputs();
    if (!(x(o.r!) > 0) || !Number.isFinite(x(o.D!))) return undefined;
    if (form === "bath" && x(p.b) * x(o.om!) < -x(m)) { // the gas weighs half the hole
      const from = walker, [rho, mu] = from.state();
      form = "heavy";
      walker = engine.walker(form, parameters, FLOORS, x(p.rh));
      walker.place(from.time(), [rho!, mu!, o.r!]);
    }
    const safe = walker.expand(followed);
    if (!(safe > 0)) return undefined;
    if (walker.series("wall", safe) < 0) {
      engine.taken(form, walker, safe);
      walker.advance(safe);
      continue;
    }
    land(walker, "wall", safe, followed, (h) => engine.taken(form, walker, h));
    const at = walker.outputs(), om = at.om!, g = at.g!, dp = at.dp!;
    if (!(x(at.p!) > 0)) return undefined;
    const delta = A.sub(
      om,
      A.mul(p.rw, A.add(A.mul(two, dp), A.div(A.mul(p.b, A.mul(dp, dp)), g))),
    );
    const scaled = A.div(A.mul(p.b, A.sub(om, delta)), A.mul(p.rw, g));
    const log = A.add(A.log1p(A.div(A.mul(p.b, delta), p.rh)), A.div(A.log1p(scaled), two));
    return { delta, excess: A.expm1(log), lngWall: at.lngtt!, rhoStart: ln0 / 2, steps };
  }
  return undefined;
}
