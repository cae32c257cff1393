/**
 * Hartle-Hawking solutions of linear-dilaton models: outwards from a regular horizon.
 *
 * In the gauge tau = 1 (time rescaled so that the surface gravity is lambda) the u-form starts at a
 * horizon E = E_h with w = 0 and, to first order in X = e^u,
 *
 *     v = s1 X,   s1 = kappa delta/(q (kappa^2 delta/q - q)),   q = 2 E_h - kappa (h+1)
 *     E = E_h + e1 X,   e1 = (1 - kappa s1)/(1 - kappa (h+1)/(2 E_h))
 *
 * (derived here from the u-form). Far out the solution is matched to the asymptotic series, which gives
 * m, the rescaling alpha of time (the bath ratio) and the shift of u.
 *
 * @module
 */
import type { Engine, Parameters } from "../engine.ts";
import { SETTINGS } from "../settings.ts";
import { farSeries } from "./far_series.ts";
import { floorsOf } from "./inward.ts";

/** Constants of a horizon problem, in units where max(E_h, kappa) = 1. */
export interface HorizonProblem<T> {
  readonly kappa: T;
  readonly hp: T;
  readonly k: T;
  readonly delta: T;
  /** e^{-2 phi} at the horizon. */
  readonly Eh: T;
}

/** What the far region tells. */
export interface HorizonResult<T> {
  readonly m: T;
  /** Bath ratio minus one, without cancellation. */
  readonly excess: T;
  readonly steps: number;
  /** Far end of the run in the asymptotic gauge. */
  readonly uFar: T;
  /** The same point in the gauge of the run. */
  readonly uRun: T;
  /** rho at the inner end of the run. */
  readonly rhoStart: number;
}

/**
 * Integrates outwards and matches.
 *
 * @returns m and tau - 1, or undefined if the far region was not reached.
 */
export function outward<T>(
  engine: Engine<T>,
  p: HorizonProblem<T>,
  own: Parameters<T>,
): HorizonResult<T> | undefined {
  const A = engine.arithmetic,
    x = A.toNumber,
    one = A.from(1),
    zero = A.from(0),
    { solvable } = engine.model;
  const parameters = { kappa: p.kappa, eps: zero, ...own };
  const q = A.sub(A.mul(A.from(2), p.Eh), A.mul(p.kappa, p.hp));
  const kd = A.mul(p.kappa, p.delta);
  const s1 = A.div(kd, A.sub(A.mul(p.kappa, kd), A.mul(q, q)));
  const e1 = A.div(A.mul(A.mul(A.from(2), p.Eh), A.sub(one, A.mul(p.kappa, s1))), q);
  const critical = x(p.Eh) - x(p.kappa) * (x(p.hp) + Math.sqrt(x(p.delta))) / 2;
  const size = Math.min(x(p.Eh), critical, critical * critical / (x(p.kappa) + 1e-300)); // first-order data hold for X far below
  const u0 = Math.floor(Math.log(size) + Math.log(A.epsilon) * 0.75);
  const X0 = A.exp(A.from(u0));
  const F0 = A.add(p.Eh, A.mul(A.sub(e1, one), X0)), v0 = A.mul(s1, X0);
  let form = "inner", walker = engine.walker(form, parameters, floorsOf(0), 1);
  walker.place(A.from(u0), solvable ? [F0] : [F0, v0, v0]);
  const scale = Math.max(x(p.Eh), x(p.kappa) * (1 + Math.abs(x(p.hp)) + Math.abs(x(p.k)) + 1));
  const end = 16 * SETTINGS.far.linearDilaton * scale;
  let steps = 0;
  for (;;) {
    const o = walker.outputs();
    if (x(o.X!) >= end) break;
    if (!(x(o.E!) > 0) || !Number.isFinite(x(o.D!)) || ++steps > SETTINGS.steps) return undefined;
    const next = x(o.eratio!) > 0.5 ? "outer" : "inner";
    if (next !== form) {
      const from = walker;
      walker = engine.walker(next, parameters, floorsOf(0), 1);
      walker.place(from.time(), from.state());
      form = next;
    }
    const safe = walker.expand(engine.dense ? ["E", "X", "lngtt"] : ["E"]),
      left = Math.log(end / x(o.X!)) + 0.125;
    if (!(safe > 0)) return undefined;
    const h = Math.min(safe, Math.max(left, 0.125));
    engine.taken(form, walker, h);
    walker.advance(h);
  }
  const state = walker.state(), uFar = walker.time();
  const F = state[0]!, w = state[1] ?? zero, v = state[2] ?? zero;
  const matched = match(engine, p, { u: uFar, F, w, v });
  return matched && { ...matched, steps, uRun: uFar, rhoStart: (u0 - Math.log(x(p.Eh))) / 2 };
}

/** Unknown (m, tau - 1, u) from (E, s, X): a contraction, since w and v are of second order in 1/E. */
function match<T>(
  engine: Engine<T>,
  p: HorizonProblem<T>,
  far: { readonly u: T; readonly F: T; readonly w: T; readonly v: T },
): Pick<HorizonResult<T>, "m" | "excess" | "uFar"> | undefined {
  const A = engine.arithmetic, x = A.toNumber, one = A.from(1), two = A.from(2);
  const s = A.add(A.div(one, two), far.v);
  let excess = A.neg(A.div(far.v, s)); // as if w were already linear
  let shift = A.add(A.mul(two, A.log1p(excess)), A.mul(two, far.w)); // u_asymptotic - u
  let m = A.sub(far.F, A.mul(A.exp(far.u), A.expm1(shift)));
  // the series runs to the same accuracy as a start at SETTINGS.far, here 16 times farther out
  const { linearDilaton } = SETTINGS.far;
  const terms =
    Math.ceil(engine.startTerms * Math.log(linearDilaton) / Math.log(16 * linearDilaton)) + 1;
  let before = Infinity;
  for (let round = 0; round < SETTINGS.rounds; round++) {
    const u = A.add(far.u, shift);
    const point = farSeries(
      A,
      { kappa: p.kappa, eps: A.neg(excess), hp: p.hp, k: p.k, delta: p.delta, m },
      u,
      terms,
    );
    // F_asymptotic = E - e^u = F - e^u_horizon (e^shift - 1)
    const target = A.sub(far.F, A.mul(A.exp(far.u), A.expm1(shift)));
    const dm = A.sub(target, point.F);
    const newExcess = A.div(A.sub(point.v, far.v), s);
    const newShift = A.add(A.mul(two, A.log1p(newExcess)), A.mul(two, A.sub(far.w, point.w)));
    const change = Math.abs(x(dm)) + Math.abs(x(A.sub(newExcess, excess))) * x(A.exp(far.u));
    m = A.add(m, dm);
    [excess, shift] = [newExcess, newShift];
    if (!Number.isFinite(change)) return undefined;
    if (round > 1 && !(change < before / 2)) break; // contracts by about 1/2000 until round-off is reached
    before = change;
  }
  return { m, excess, uFar: A.add(far.u, shift) };
}
