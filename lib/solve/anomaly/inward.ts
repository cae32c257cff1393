/**
 * From far out to the minimal sphere, with the leading tensor of the anomaly as source; see
 * `lib/model/form/minimal_sphere.ts` for symbols.
 *
 * @module
 */
import { SETTINGS } from "../settings.ts";
import type { Walker } from "../series/walker.ts";

/** The sphere, lengths in units of M. */
export interface SphereEnd<T> {
  /** ln(R/M). */
  readonly L: T;
  readonly psi: T;
  /** ln(alpha R). */
  readonly u: T;
}

const LEFT_OUT = 1e-36; // relative size of the source where the run starts from vacuum
const FARTHEST = 1e-3; // alpha R at the start, at most

/** Where the run starts: the source is of relative size e^{lng} (alpha R)^6 far out. */
export function startOf(lng: number): number {
  return Math.min(Math.log(FARTHEST), (Math.log(LEFT_OUT) - lng) / 6);
}

/**
 * Runs to the minimal sphere.
 *
 * @param walker Over the closure.
 * @param u Start, see {@linkcode startOf}.
 * @returns The sphere, or undefined if the run gave up.
 */
export function inward<T>(walker: Walker<T>, u: number): SphereEnd<T> | undefined {
  const A = walker.arithmetic, one = A.from(1), start = A.from(u), y = A.exp(start);
  // Schwarzschild: p = sqrt(1 + y^2) - y, R = 2/(1 - p^2) = 1/(y p), psi = ln p
  const lnp = A.neg(A.log(A.add(y, A.sqrt(A.add(one, A.mul(y, y))))));
  walker.place(start, [A.neg(A.add(start, lnp)), lnp]);
  for (let i = 0; i < SETTINGS.steps; i++) {
    const step = walker.expand(["gap"]), gap = A.toNumber(walker.outputs()["gap"]!);
    if (!(step > 0)) return undefined;
    const [L, psi] = walker.state() as [T, T], now = walker.time();
    // gap = 2 L - 4 u - lng is known to the rounding of its terms, the largest of which is 4 u or lng
    const size = 2 * Math.abs(A.toNumber(L)) + 8 * Math.abs(A.toNumber(now)) + 1;
    if (Math.abs(gap) <= 16 * A.epsilon * size) return { L, psi, u: now };
    const newton = -gap / walker.slope("gap");
    walker.advance(Math.abs(newton) < step ? newton : Math.sign(newton) * step);
  }
  return undefined;
}
