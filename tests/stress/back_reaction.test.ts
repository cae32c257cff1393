import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { precise } from "../../lib/expr/precise.ts";
import { backReaction } from "../../lib/stress/back_reaction.ts";

const UNIT = "pi^2/90/(8*pi*M)^4", POLE = "(4-6*M/r)^2*(2*M/r)^6";
/** Page's tensor of the conformal scalar, Phys. Rev. D 25 (1982) 1499. */
const HOT = {
  energy: `${UNIT}*(3*(1-${POLE})/(1-2*M/r)^2-72*(2*M/r)^6)`,
  pressure: `${UNIT}*((1-${POLE})/(1-2*M/r)^2+24*(2*M/r)^6)`,
};
/** The same without its gas: the empty state. */
const EMPTY = {
  energy: `0-${UNIT}*(3*${POLE}/(1-2*M/r)^2+72*(2*M/r)^6)`,
  pressure: `${UNIT}*(24*(2*M/r)^6-${POLE}/(1-2*M/r)^2)`,
};

describe("First-order back-reaction", () => {
  it("gives York's mass function within its bounds", async () => {
    // Phys. Rev. D 31 (1985) 775, rederived; w = 2M/r, horizon held at 2M
    const york = parse(
      "M*(w^(-3)/3+w^(-2)+3/w-4*log(w)-5*w-3*w^2+11*w^3-22/3)/(3840*pi*M^2)",
    );
    const { evaluate, big } = await precise(40);
    for (const M of [1, 0.01, 1e30]) {
      const hole = backReaction(HOT, M, 2 * M);
      for (const w of [0.99, 0.5, 0.1, 1e-3]) {
        const r = 2 * M / w, { m } = hole.at(r);
        const exact = evaluate(york, {
          M: big(M.toPrecision(60)),
          w: big((2 * M).toPrecision(60)).div(big(r.toPrecision(60))),
        });
        expect(Number(exact.minus(big(m.value.toPrecision(60))).abs()), `M = ${M}, w = ${w}`)
          .toBeLessThanOrEqual(
            m.error!,
          );
      }
    }
  });

  it("of the empty state falls off like r^-3 and grows like 1/(r - 2M)^2 at the horizon", () => {
    const M = 1e10, hole = backReaction(EMPTY, M, Infinity);
    // leading tensor -h (acceleration)^4 diag(-3,1,1,1), h = 1/(1440 pi^2): relative change -pi h/(8 M^2 d^2), d = 1-2M/r
    for (const fraction of [0.1, 1e-3]) {
      const leading = Math.sqrt(1 / (11520 * Math.PI * fraction)) / M;
      // next term: of relative order d ln d
      expect(hole.reaches(fraction)! / leading).toBeCloseTo(1, 7);
    }
    expect(hole.at(1e7 * M).m.value / hole.at(1e6 * M).m.value).toBeCloseTo(1e-3, 7);
  });

  it("fails before the horizon in the empty state, and far outside it in the regular one", () => {
    expect(backReaction(EMPTY, 10, Infinity).reaches(0.1)).toBeGreaterThan(0);
    // the gas of the regular state gravitates far out
    expect(backReaction(HOT, 10, 20).reaches(10)).toBeGreaterThan(1000);
  });

  it("is additive in the source and independent of the start up to a constant", () => {
    const both = {
      energy: `${EMPTY.energy}+3*${UNIT}/(1-2*M/r)^2`,
      pressure: `${EMPTY.pressure}+${UNIT}/(1-2*M/r)^2`,
    };
    const a = backReaction(both, 1, 2), b = backReaction(HOT, 1, 2), c = backReaction(HOT, 1, 5);
    expect(a.at(7).m.value).toBeCloseTo(b.at(7).m.value, 15);
    const parts = [c.at(7).psi, b.at(5).psi, b.at(7).psi];
    expect(Math.abs(parts[0]!.value + parts[1]!.value - parts[2]!.value)).toBeLessThan(
      parts.reduce((sum, { error }) => sum + error!, 2 ** -52 * parts[2]!.value),
    );
  });

  it("shifts the temperature by what Page's energy at the horizon takes off, and by the redshift to the clock", () => {
    const M = 3,
      unit = Math.PI ** 2 / 90 / (8 * Math.PI * M) ** 4,
      hole = backReaction(HOT, M, 2 * M);
    for (const r of [6.5, 20]) {
      // -g_tt at r and the surface gravity (1 - 8 pi r_h^2 epsilon)/(4 M), epsilon = -36 units, to first order
      const expected = 32 * Math.PI * M ** 2 * 36 * unit - hole.at(r).relative.value / 2;
      expect(hole.temperatureShift(r).value / expected).toBeCloseTo(1, 13);
    }
    expect(() => backReaction(HOT, 1, 5).temperatureShift(7)).toThrow("must be the horizon");
  });

  it("refuses a start inside the hole, names it does not know, and a pole on the way", () => {
    expect(() => backReaction(HOT, 1, 1)).toThrow("the start at 2M or outside");
    expect(() => backReaction(HOT, 0, 1)).toThrow("M must be positive");
    expect(() => backReaction({ energy: "q", pressure: "0" }, 1, 3)).toThrow("it holds q");
    expect(() => backReaction(EMPTY, 1, 2).at(3)).toThrow("must be regular on the way");
  });
});
