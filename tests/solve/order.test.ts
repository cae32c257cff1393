import { describe, expect, it } from "vitest";
import { compileModel } from "../../lib/model/compile.ts";
import { type DoubleDouble, doubleDouble as A } from "../../lib/solve/arithmetic/double_double.ts";
import {
  doubleDoubleCode,
  DoubleDoubleWalker,
} from "../../lib/solve/series/double_double_walker.ts";

// RST without a bath, lambda = 1: E - (kappa/2) ln(E)/2 = e^u - kappa u/4 + m is the exact solution
// (Phys. Rev. D 46 (1992) 3444 with P = -1/4); F = E - e^u is the unknown of the form.
const KAPPA = A.ratio(1n, 8n), MASS = A.from(1);

/** F of the closed form at u, by Newton's method in double-double. */
function exactly(u: number): DoubleDouble {
  const eu = A.exp(A.from(u)), quarter = A.div(KAPPA, A.from(4));
  const right = A.add(A.sub(eu, A.mul(quarter, A.from(u))), MASS);
  let E = right;
  for (let i = 0; i < 8; i++) {
    const residual = A.sub(A.sub(E, A.mul(quarter, A.log(E))), right);
    E = A.sub(E, A.div(residual, A.sub(A.from(1), A.div(quarter, E))));
  }
  return A.sub(E, eu);
}

const program = (await compileModel("rst")).programs["outer"]!;

const PARTS = 16;

/** Largest error of F at the ends of sixteen equal parts of [-1/2, 5/2], walked inwards, `steps` steps a part. */
function errorOf(order: number, steps: number): number {
  const code = doubleDoubleCode(program, { order, tolerance: 1e-33 });
  const walker = new DoubleDoubleWalker(code, { kappa: KAPPA, eps: A.from(1) }, {}, 1);
  walker.place(A.from(2.5), [exactly(2.5)]);
  let worst = 0;
  for (let part = 1; part <= PARTS; part++) {
    for (let i = 0; i < steps; i++) {
      walker.expand([]);
      walker.advance(-3 / PARTS / steps); // exact in double precision, so the ends agree
    }
    const end = exactly(2.5 - 3 * part / PARTS);
    worst = Math.max(worst, Math.abs(A.sub(walker.state()[0]!, end).hi));
  }
  return worst;
}

describe("Equal Taylor steps along an RST solution", () => {
  for (const order of [8, 12, 16]) {
    it(`of order ${order} converge to the closed form with that order`, () => {
      const coarse = errorOf(order, 1), fine = errorOf(order, 2);
      expect(fine).toBeGreaterThan(1e-29); // truncation, not round-off of 2^-98, is what is measured
      expect(Math.abs(Math.log2(coarse / fine) - order)).toBeLessThan(0.2); // next order in a step of 3/16
    });
  }
});
