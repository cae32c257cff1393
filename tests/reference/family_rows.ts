/**
 * Seeded rows of the solvable family, log-uniform over the whole range of the tables, a fifth of them
 * within 1e-6 of a boundary between kinds.
 *
 * @module
 */

import type { RowInput } from "../../lib/model/input.ts";
import { type FamilyRow, familyValues } from "./closed_form.ts";

/** Numbers in [0, 1) of a seed: a 32-bit linear congruential generator with xor-shift output. */
export function uniform(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    const mixed = Math.imul(state ^ (state >>> 15), 0x2c1b3c6d);
    return ((mixed ^ (mixed >>> 13)) >>> 0) / 4294967296;
  };
}

/** `count` rows; every fifth lies next to a boundary between kinds. */
export function familyRows(count: number, seed: number): FamilyRow[] {
  const next = uniform(seed);
  const logUniform = (lo: number, hi: number) => lo * Math.exp(next() * Math.log(hi / lo));
  const sign = () => next() < 0.5 ? -1 : 1;
  const parameter = () => {
    const r = next();
    if (r < 0.4) return 0.5; // rst
    if (r < 0.55) return 0; // bpp
    if (r < 0.9) return 2 * next();
    return r < 0.95 ? 2 : logUniform(1e-9, 1);
  };
  const bath = () => next() < 0.1 ? 0 : Math.max(-1, sign() * logUniform(1e-12, 1));
  return Array.from({ length: count }, (_, i) => {
    const kappa = logUniform(1e-12, 1e6);
    const lambda = next() < 0.7 ? 1 : logUniform(1e-3, 1e3);
    const a = parameter();
    const r = next();
    const state = r < 0.3 ? "boulware" : r < 0.8 ? "thermal" : "hartle-hawking";
    const base = { a, kappa, lambda, state } as const;
    const row: FamilyRow = state === "thermal" ? { ...base, bathRatioMinusOne: bath() } : base;
    const byDilaton = state === "hartle-hawking" && next() < 0.5;
    if (i % 5 === 4) {
      const off = sign() * logUniform(1e-15, 1e-6);
      if (byDilaton && a > 0) {
        return { ...row, horizonDilaton: -Math.log((a * kappa) / 2 * (1 + off)) / 2 };
      }
      if (next() < 0.5) return { ...row, massAboveCritical: kappa * off };
      // not refused: it has zero distance or more
      const critical = familyValues({ ...row, massAboveCritical: 0 })!.mass.toNumber();
      return { ...row, mass: critical + lambda * kappa * off };
    }
    if (byDilaton) {
      return { ...row, horizonDilaton: -Math.log(kappa * logUniform(0.3, 1e60)) / 2 };
    }
    const mass = (next() < 0.15 ? -1 : 1) * kappa * logUniform(0.3, 1e60);
    if (next() < 0.2) return { ...row, massAboveCritical: mass };
    return { ...row, mass: lambda * mass };
  });
}

/** The row as the solver takes it; a = 1/2 and a = 0 under the names of their models. */
export function familyInput(row: FamilyRow, tolerance = 1e-10): RowInput {
  const { a, ...rest } = row;
  if (a === 0.5) return { model: "rst", tolerance, ...rest };
  if (a === 0) return { model: "bpp", tolerance, ...rest };
  return { model: "solvable", a, tolerance, ...rest };
}
