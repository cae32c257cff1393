import { describe, expect, it } from "vitest";
import {
  add,
  type Ball,
  div,
  exact,
  exp,
  expm1,
  log,
  log1p,
  mul,
  sub,
} from "../../../lib/solve/closed_form/ball.ts";
import { coolRoot, hotRoot, nakedRoot, throatRoot } from "../../../lib/solve/closed_form/root.ts";
import {
  expRemainder,
  expRemainderError,
  logRemainder,
  logRemainderError,
} from "../../../lib/solve/closed_form/remainder.ts";
import {
  type Big,
  big,
  expMinusLinear,
  nakedRoot as exactNakedRoot,
  throatRoot as exactThroatRoot,
  zMinusLog1p,
} from "../../reference/closed_form.ts";
import { uniform } from "../../reference/family_rows.ts";

const next = uniform(5);
const spread = (lo: number, hi: number) => lo * Math.exp(next() * Math.log(hi / lo));
/** A ball and a number in it, at its rim as often as inside. */
function sample(v: number, relative: number): [Ball, Big] {
  const e = Math.abs(v) * relative;
  const at = next() < 0.5 ? 1 : 2 * next() - 1;
  return [{ v, e }, big(v).add(big(e).mul(at))];
}
const holds = (b: Ball, x: Big) => big(b.v).sub(x).abs().lte(big(b.e).mul(1 + 1e-15));

describe("ball arithmetic", () => {
  it("every operation encloses the exact result of numbers in its arguments", () => {
    for (let i = 0; i < 2000; i++) {
      const wide = () => next() < 0.3 ? 0 : spread(1e-17, 0.2);
      const [a, x] = sample((next() < 0.5 ? -1 : 1) * spread(1e-6, 1e6), wide());
      const [b, y] = sample((next() < 0.5 ? -1 : 1) * spread(1e-6, 1e6), wide());
      expect(holds(add(a, b), x.add(y))).toBe(true);
      expect(holds(sub(a, b), x.sub(y))).toBe(true);
      expect(holds(mul(a, b), x.mul(y))).toBe(true);
      expect(holds(div(a, b), x.div(y))).toBe(true);
      const [c, z] = sample(spread(1e-10, 1e10), wide());
      expect(holds(log(c), z.ln())).toBe(true);
      expect(holds(log1p(c), z.add(1).ln())).toBe(true);
      const [d, t] = sample((next() < 0.5 ? -1 : 1) * spread(1e-8, 40), wide());
      expect(holds(exp(d), t.exp())).toBe(true);
      expect(holds(expm1(d), t.exp().sub(1))).toBe(true);
    }
  });

  it("exact results of exact numbers stay exact", () => {
    expect(mul(exact(0.375), exact(4))).toEqual({ v: 1.5, e: 0 });
    expect(add(exact(1), exact(-0.75))).toEqual({ v: 0.25, e: 0 });
    expect(div(exact(3), exact(0.5))).toEqual({ v: 6, e: 0 });
    expect(log(exact(1))).toEqual({ v: 0, e: 0 });
    expect(add(exact(1), exact(1e-20)).e).toBeGreaterThan(0);
    expect(mul(exact(0.1), exact(0.1)).e).toBeGreaterThan(0);
    expect(div(exact(1), exact(3)).e).toBeGreaterThan(0);
  });
});

describe("remainders of ln and exp", () => {
  it("lose no digit at small arguments", () => {
    for (let i = 0; i < 1000; i++) {
      const z = next() < 0.2 ? -spread(1e-12, 0.4) : spread(1e-150, 1e6);
      const value = logRemainder(z);
      expect(holds({ v: value, e: logRemainderError(z, value) }, zMinusLog1p(big(z)))).toBe(true);
      const v = spread(1e-150, 40);
      const rest = expRemainder(v);
      expect(holds({ v: rest, e: expRemainderError(v, rest) }, expMinusLinear(big(v)))).toBe(true);
    }
  });
});

describe("roots of the closed form", () => {
  it("enclose the exact roots, also for wide balls that touch zero", () => {
    for (let i = 0; i < 500; i++) {
      const width = next() < 0.5 ? 1e-16 : spread(1e-16, 0.999);
      const [delta, x] = sample(spread(1e-200, 1e5), width);
      expect(holds(throatRoot(delta), exactThroatRoot(x))).toBe(true);
      expect(holds(nakedRoot(delta), exactNakedRoot(x))).toBe(true);
    }
  });

  it("of e^y + q y + D and e^y - p y + D: the equation changes sign across the ball", () => {
    for (let i = 0; i < 500; i++) {
      const q = spread(1e-30, 1e10);
      const D = (next() < 0.5 ? -1 : 1) * spread(1e-30, 1e30);
      const at = (y: Big, slope: number) => y.exp().add(y.mul(big(slope))).add(big(D));
      const ends = (b: Ball) => [big(b.v).sub(big(b.e)), big(b.v).add(big(b.e))];
      const [low, high] = ends(hotRoot(exact(q), exact(D)));
      expect(at(low, q).lte(0) && at(high, q).gte(0)).toBe(true);
      if (D > 0) continue;
      const p = -D * spread(1e-30, 1e-7);
      const [left, right] = ends(coolRoot(exact(p), exact(D)));
      expect(at(left, -p).lte(0) && at(right, -p).gte(0)).toBe(true);
    }
  });
});
