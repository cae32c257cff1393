/**
 * The way to a naked singularity: first with the dilaton as independent variable, then with the square
 * root of the distance from the critical locus, which ends exactly on it.
 *
 * @module
 */
import type { Engine, Parameters } from "./engine.ts";
import { SETTINGS } from "./settings.ts";

/** Where the dilaton form takes over. */
export interface DilatonStart<T> {
  readonly phi: T;
  readonly rho: T;
  readonly chi: T;
  readonly sigma: T;
}

/** How the family parametrises its critical locus. */
export interface CriticalLocus<T> {
  /** Parameters of the forms `dilaton` and `root`. */
  readonly parameters: Parameters<T>;
  /** Dilaton at which the root form takes over. */
  readonly near: number;
  /** y of the root form at dilaton phi. */
  readonly y: (phi: T) => T;
}

/** The solution on the critical locus. */
export interface NakedEnd<T> {
  /** ln(-g_tt). */
  readonly lngtt: T;
  readonly sigma: T;
  readonly steps: number;
}

/**
 * Follows a solution to the critical locus.
 *
 * @returns The end, or undefined if the dilaton turns before (there is a throat).
 */
export function followToLocus<T>(
  engine: Engine<T>,
  start: DilatonStart<T>,
  locus: CriticalLocus<T>,
): NakedEnd<T> | undefined {
  const A = engine.arithmetic, floors = { rho: 1, sigma: 1 };
  const walker = engine.walker("dilaton", locus.parameters, floors, 0.125);
  walker.place(start.phi, [start.rho, start.chi, start.sigma]);
  const direction = locus.near > A.toNumber(start.phi) ? 1 : -1;
  const inward = engine.model.family === "linear-dilaton" ? 1 : -1; // phi grows inwards, r shrinks
  let steps = 0, phi = start.phi;
  let state = [start.rho, start.chi, start.sigma];
  if (direction === inward) {
    while (direction * (locus.near - A.toNumber(walker.time())) > 0) {
      const safe = walker.expand([]), left = locus.near - A.toNumber(walker.time());
      if (!(safe > 1e-13 * Math.abs(left)) || ++steps > SETTINGS.steps) return undefined;
      // a radius shrinks at most fourfold a step: its relative rounding must stay small
      const most = inward < 0 ? Math.min(safe, 0.75 * A.toNumber(walker.time())) : safe;
      const h = most < Math.abs(left) ? direction * most : left;
      engine.taken("dilaton", walker, h);
      walker.advance(h);
      if (most >= Math.abs(left)) break;
    }
    const o = walker.outputs();
    phi = walker.time();
    state = [o.rho!, o.chi!, o.sigma!];
  }
  const root = engine.walker("root", locus.parameters, floors, 0.125);
  root.place(locus.y(phi), state);
  for (let left = A.toNumber(root.time()); left !== 0; left = A.toNumber(root.time())) {
    const safe = root.expand([]);
    if (!(safe > 1e-13 * Math.abs(left)) || ++steps > SETTINGS.steps) return undefined;
    const h = safe < Math.abs(left) ? -Math.sign(left) * safe : -left;
    engine.taken("root", root, h);
    root.advance(h);
  }
  const o = root.outputs();
  if (!Number.isFinite(A.toNumber(o.lngtt!))) return undefined;
  return { lngtt: o.lngtt!, sigma: o.sigma!, steps };
}
