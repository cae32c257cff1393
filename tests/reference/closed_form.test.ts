import { describe, expect, it } from "vitest";
import {
  type Big,
  big,
  dilatonFunction,
  familyValues,
  lambertW,
  nakedRoot,
  omegaRoot,
  throatRoot,
} from "./closed_form.ts";

/** Eighth-order central differences of f at x: value, first and second derivative. */
function jet(f: (x: Big) => Big, x: Big): [Big, Big, Big] {
  // step 1e-12: truncation h^8 = 1e-96 and rounding 1e-110/h^2 = 1e-86 both lie below 1e-80
  const h = big(1).div("1e12");
  const at = (k: number) => f(x.add(h.mul(k)));
  const [p1, m1, p2, m2, p3, m3, p4, m4] = [1, -1, 2, -2, 3, -3, 4, -4].map(at);
  const f0 = f(x);
  const first = p1.sub(m1).mul(672).sub(p2.sub(m2).mul(168)).add(p3.sub(m3).mul(32))
    .sub(p4.sub(m4).mul(3)).div(h.mul(840));
  const second = p1.add(m1).mul(8064).sub(p2.add(m2).mul(1008)).add(p3.add(m3).mul(128))
    .sub(p4.add(m4).mul(9)).sub(f0.mul(14350)).div(h.mul(h).mul(5040));
  return [f0, first, second];
}

/** Residuals of (1), (2), (C) relative to their largest term, and R, at u = 2 sigma (lambda = 1). */
function residuals(a: number, kappa: number, m: number, eps: number, u: Big) {
  const k = big(kappa);
  const E = (x: Big) => dilatonFunction(a, kappa, m, eps, x);
  const phi = (x: Big) => E(x).ln().div(-2);
  const H = (x: Big) => E(x).add(k.mul(a - 1).mul(phi(x)));
  const rho = (x: Big) => phi(x).add(x.div(2));
  // d/d sigma = 2 d/du
  const prime = (f: (x: Big) => Big) => {
    const [f0, f1, f2] = jet(f, u);
    return { f0, f1: f1.mul(2), f2: f2.mul(4) };
  };
  const [h, p, r] = [prime(H), prime(phi), prime(rho)];
  const e = E(u);
  const g = r.f0.mul(2).exp();
  const K = e.mul(4).add(k.mul(1 - 2 * a));
  const Hphi = e.mul(-2).add(k.mul(a - 1));
  const V = e.mul(4);
  const Vphi = e.mul(-8);
  const Kphi = e.mul(-8);
  const relative = (...terms: Big[]) => {
    const sum = terms.reduce((s, t) => s.add(t));
    const size = terms.reduce((s, t) => t.abs().gt(s) ? t.abs() : s, big(0));
    return sum.abs().div(size).toNumber();
  };
  const c2 = big(1).add(eps).pow(2).mul(4);
  return {
    one: relative(h.f2, k.mul(r.f2), g.mul(V).neg()),
    two: relative(
      K.mul(p.f2).mul(2),
      Hphi.mul(r.f2).mul(2),
      g.mul(Vphi).neg(),
      Kphi.mul(p.f1).mul(p.f1),
    ),
    constraint: relative(
      r.f1.mul(h.f1).mul(2),
      K.mul(p.f1).mul(p.f1),
      g.mul(V).neg(),
      k.mul(c2).div(-4),
      k.mul(r.f1).mul(r.f1),
    ),
    curvature: r.f2.mul(-2).div(g),
    slope: p.f1,
  };
}

/** Relative difference as a double. */
const apart = (x: Big, y: Big) => x.sub(y).abs().div(y.abs()).toNumber();

describe("closed forms of the solvable family in many digits", () => {
  const rows = [
    { a: 0.5, kappa: 1, m: 1, eps: -1 },
    { a: 0.5, kappa: 0.75, m: -3, eps: 0.5 },
    { a: 0, kappa: 2, m: 1.5, eps: -0.25 },
    { a: 0.25, kappa: 1, m: 5, eps: 0 },
    { a: 1, kappa: 3, m: 7, eps: -0.5 },
    { a: 2, kappa: 0.5, m: 40, eps: 1 },
  ];
  it.each(rows)(
    "field equations (1), (2) and the constraint hold to 60 digits off the locus: %o",
    ({ a, kappa, m, eps }) => {
      for (const u of ["0.7", "2.5", "4"]) {
        // all these points lie outside the locus
        const r = residuals(a, kappa, m, eps, big(1).mul(u).add(m < 0 ? 1.5 : 0));
        // differences are good to 1e-80 (see jet)
        expect(r.one).toBeLessThan(1e-60);
        expect(r.two).toBeLessThan(1e-60);
        expect(r.constraint).toBeLessThan(1e-60);
      }
    },
  );

  it("curvature at a throat is 4 E/(E - E_c), found here by differentiating the profile", () => {
    for (const { a, kappa, m, eps } of rows.filter((r) => r.eps < 0)) {
      const values = familyValues({
        a,
        kappa,
        lambda: 1,
        state: "thermal",
        bathRatioMinusOne: eps,
        mass: m,
      })!;
      expect(values.kind).toBe("throat");
      // e^u = P at the throat
      const u = big(kappa).mul(-eps * (2 + eps)).div(4).ln();
      const r = residuals(a, kappa, m, eps, u);
      expect(r.slope.abs().toNumber()).toBeLessThan(1e-60);
      expect(apart(r.curvature, values.curvature!)).toBeLessThan(1e-60);
    }
  });

  it("curvature tends to 4 E/(E - E_c) at a horizon as e^u", () => {
    const values = familyValues({
      a: 0.25,
      kappa: 1,
      lambda: 1,
      state: "hartle-hawking",
      mass: 5,
    })!;
    const r = residuals(0.25, 1, 5, 0, big(-60));
    expect(values.kind).toBe("horizon");
    // corrections are of order e^-60 = 9e-27
    expect(apart(r.curvature, values.curvature!)).toBeLessThan(1e-25);
  });

  it("curvature tends to minus infinity at naked ends and plus infinity at the singular horizon", () => {
    for (const a of [0, 0.5, 1.5]) {
      const row = { a, kappa: 1, lambda: 1, state: "thermal" as const, bathRatioMinusOne: 0.5 };
      const values = familyValues({ ...row, mass: 1 })!;
      expect(values.kind).toBe("naked-singularity");
      expect(values.curvature!.toString()).toBe("-Infinity");
      const u = a === 0
        ? omegaRoot(big(-3.2).sub(big(0.3125).ln())).add(big(0.3125).ln())
        : values.lnMinusGtt!.add(big(a / 2).ln());
      const near = [1e-6, 1e-10, 1e-14].map((du) =>
        residualsCurvature(a, 1, 1, 0.5, u.add(du), du)
      );
      expect(near[0]).toBeLessThan(-10);
      expect(near[1]).toBeLessThan(10 * near[0]);
      expect(near[2]).toBeLessThan(10 * near[1]);
    }
    // kappa = 4, a = 1/2: E_c = 1 and the critical mass is exactly 1
    const singular = familyValues({
      a: 0.5,
      kappa: 4,
      lambda: 1,
      state: "hartle-hawking",
      mass: 1,
    })!;
    expect(singular.kind).toBe("singular-horizon");
    expect(singular.curvature!.toString()).toBe("Infinity");
    const at = [-20, -40].map((u) => residuals(0.5, 4, 1, 0, big(u)).curvature.toNumber());
    // R ~ e^(-u/2): a factor e^10 = 2.2e4
    expect(at[0]).toBeGreaterThan(0);
    expect(at[1] / at[0]).toBeGreaterThan(2e4);
  });

  it("a semi-infinite throat of a = 0 has R = -4 lambda^2 in the limit", () => {
    const values = familyValues({
      a: 0,
      kappa: 4,
      lambda: 3,
      state: "boulware",
      massAboveCritical: 0,
    })!;
    expect(values.kind).toBe("semi-infinite-throat");
    expect(values.curvature!.toNumber()).toBe(-36);
    // kappa = 4: P = 1, throat at u = 0, m = -1; E = v^2/2 there, so v = 1e-3 is near
    const r = residuals(0, 4, -1, -1, big(1e-3));
    expect(r.curvature.toNumber() + 4).toBeCloseTo(0, 2); // next order is v
  });

  it("Newton's roots agree with Lambert's W on both branches", () => {
    for (const delta of [1e-8, 1e-3, 0.5, 3, 100]) {
      const w = lambertW(-1, big(delta).add(1).neg().exp().neg());
      expect(apart(throatRoot(big(delta)), w.neg().sub(1))).toBeLessThan(1e-60);
      expect(apart(nakedRoot(big(delta)), w.neg().sub(1).sub(big(delta)))).toBeLessThan(1e-60);
    }
    for (const l of [-50, -1, 0.1, 2, 80]) {
      const w = lambertW(0, big(l).exp());
      expect(apart(omegaRoot(big(l)).exp(), w)).toBeLessThan(1e-60);
    }
  });

  it("the linear dilaton is the vacuum, and equality with the critical mass is recognised", () => {
    const kind = (row: Parameters<typeof familyValues>[0]) => familyValues(row)?.kind;
    const one = { kappa: 1, lambda: 1 };
    expect(kind({ ...one, a: 0.5, state: "boulware", mass: 0 })).toBe("vacuum");
    expect(kind({ ...one, a: 0.375, state: "thermal", bathRatioMinusOne: -0.5, mass: 0 }))
      .toBe("vacuum");
    // a = 1, kappa = 1: E_c = 1/2, P = 1/4, E_c ln E_c = P ln P, so the critical mass is 1/4
    expect(kind({ ...one, a: 1, state: "boulware", mass: 0.25 })).toBe("marginal");
    expect(kind({ ...one, a: 1, state: "boulware", mass: 0.2500001 })).toBe("throat");
    expect(kind({ ...one, a: 1, state: "boulware", mass: 0.2499999 })).toBe("naked-singularity");
    expect(kind({ ...one, a: 1, state: "hartle-hawking", horizonDilaton: 3 })).toBeUndefined();
  });

  it("horizon dilaton and mass lead to the same horizon", () => {
    const from = familyValues({
      a: 1.5,
      kappa: 2,
      lambda: 3,
      state: "hartle-hawking",
      horizonDilaton: -1.25,
    })!;
    const e = big(2.5).exp();
    expect(apart(from.entropyClassical!, e.mul(2))).toBeLessThan(1e-60);
    // m = E + a kappa phi, M = lambda m
    expect(apart(from.mass, e.sub(3.75).mul(3))).toBeLessThan(1e-60);
    const z = throatRoot(from.massAboveCritical.div(1.5)); // E_c = 3/2
    expect(apart(z.add(1).mul(1.5), e)).toBeLessThan(1e-60);
  });

  it("throats of RST have the values of an independent 60-digit computation", () => {
    // own computation, no published source
    const table = [
      { eps: -1, m: 1, v: [-0.275276523050164, 0.144157704688610, 4.67375826354158] },
      { eps: -0.5, m: 10, v: [-1.20361570638937, 0.0168870563601478, 4.09213890714467] },
    ];
    for (const { eps, m, v } of table) {
      const got = familyValues({
        a: 0.5,
        kappa: 1,
        lambda: 1,
        state: "thermal",
        bathRatioMinusOne: eps,
        mass: m,
      })!;
      // printed to 15 digits
      expect(Math.abs(got.dilaton!.toNumber() / v[0] - 1)).toBeLessThan(2e-14);
      expect(Math.abs(got.minusGtt!.toNumber() / v[1] - 1)).toBeLessThan(2e-14);
      expect(Math.abs(got.curvature!.toNumber() / v[2] - 1)).toBeLessThan(2e-14);
    }
  });
});

/** Curvature near a singular end, by differences on the scale du of the distance to it. */
function residualsCurvature(
  a: number,
  kappa: number,
  m: number,
  eps: number,
  u: Big,
  du: number,
): number {
  const E = (x: Big) => dilatonFunction(a, kappa, m, eps, x);
  const rho = (x: Big) => E(x).ln().div(-2).add(x.div(2));
  const h = big(du).div(1000);
  const second = rho(u.add(h)).add(rho(u.sub(h))).sub(rho(u).mul(2)).div(h.mul(h));
  return second.mul(-8).div(rho(u).mul(2).exp()).toNumber();
}
