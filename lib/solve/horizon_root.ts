/**
 * Finds the horizon whose outward run has a given mass.
 *
 * @module
 */
import { SETTINGS } from "./settings.ts";

/** Result of a search for a horizon in double precision. */
export type HorizonRoot =
  | { readonly found: true; readonly at: number; readonly slope: number }
  | { readonly found: false; readonly least: number };

/**
 * The outermost root, to nine digits (the caller corrects it in its own arithmetic), of `excess` above `critical`. Further out the mass grows with the horizon; towards the
 * critical value it may turn, so the search walks in from outside until the excess changes sign.
 *
 * @param excess Mass at a horizon minus the wanted one; NaN where no far region was reached.
 * @param critical Value at which the critical locus lies.
 * @param guess First guess.
 */
export function horizonRoot(
  excess: (horizon: number) => number,
  critical: number,
  guess: number,
): HorizonRoot {
  let outer = Math.max(guess, critical * (1 + 1e-9) + 1e-300), fOuter = excess(outer);
  for (let i = 0; i < SETTINGS.rounds && !(fOuter > 0); i++) {
    if (fOuter === 0) break;
    outer = outer * 1.5;
    fOuter = excess(outer);
  }
  let inner = outer, fInner = fOuter, least = Infinity;
  for (let i = 1; i <= SETTINGS.rounds && fInner > 0; i++) {
    [outer, fOuter] = [inner, fInner];
    inner = critical + (inner - critical) * (i < 6 ? 0.75 : 0.5);
    if (!(inner > critical)) break;
    fInner = excess(inner);
    if (Number.isNaN(fInner)) break;
    least = Math.min(least, fInner);
    if (inner - critical < 1e-10 * critical) break;
  }
  if (!(fInner <= 0 && fOuter >= 0)) return { found: false, least };
  for (let i = 0; i < 100 && outer - inner > 1e-9 * outer && fInner !== fOuter; i++) {
    const secant = inner - fInner * (outer - inner) / (fOuter - fInner),
      middle = (inner + outer) / 2;
    const x = i % 3 < 2 && secant > inner && secant < outer ? secant : middle;
    const f = excess(x);
    if (f === 0) {
      inner = outer = x;
      break;
    }
    if (f > 0) [outer, fOuter] = [x, f];
    else [inner, fInner] = [x, f];
  }
  const at = (inner + outer) / 2, probe = Math.min(1e-4 * at, (at - critical) / 4);
  return { found: true, at, slope: (excess(at + probe) - excess(at - probe)) / (2 * probe) };
}
