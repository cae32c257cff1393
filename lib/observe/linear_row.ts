/**
 * Rows of linear-dilaton models in the Boulware and thermal states: kind and numbers at the locus.
 *
 * Units of the solver: lambda = 1 and e^{-2 phi} divided by M0 = max(|m|, kappa), which shifts
 * u by ln M0 and m by kappa (tau^2 - k) ln(M0)/4.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Arithmetic } from "../solve/arithmetic/arithmetic.ts";
import type { Engine, Parameters } from "../solve/engine.ts";
import { bathExcess, type FarProblem } from "../solve/linear_dilaton/far_series.ts";
import { inward, type LinearEnd } from "../solve/linear_dilaton/inward.ts";
import { constants } from "../solve/series/evaluate.ts";
import { bare, failed, type Solution } from "./solution.ts";

/** Constants of a row in units lambda = 1, before scaling. */
export interface LinearConstants<T> {
  readonly kappa: T;
  readonly eps: T;
  readonly hp: T;
  readonly k: T;
  readonly delta: T;
  readonly own: Parameters<T>;
}

/** Constants of a row; `eps` = 1 - tau. */
export function linearConstants<T>(engine: Engine<T>, input: RowInput, eps: T): LinearConstants<T> {
  const A = engine.arithmetic;
  const own: Record<string, T> = input.a === undefined ? {} : { a: A.from(input.a) };
  const c = constants(A, engine.model.programs["slopes"]!, own);
  return { kappa: A.from(input.kappa), eps, hp: c["hp"]!, k: c["k"]!, delta: c["delta"]!, own };
}

/** x (1 - ln x), 0 at 0. */
function entropyLike<T>(A: Arithmetic<T>, x: T): T {
  return A.toNumber(x) > 0 ? A.mul(x, A.sub(A.from(1), A.log(x))) : A.from(0);
}

/**
 * Critical mass parameter of the solvable family, where min(e^u - beta u) + m meets the critical value:
 * E_c (1 - ln E_c) - beta (1 - ln beta), E_c = a kappa/2, beta = kappa (1 - tau^2)/4 (0 for tau >= 1).
 */
export function criticalMass<T>(A: Arithmetic<T>, c: LinearConstants<T>): T {
  const Ec = A.div(A.mul(c.kappa, c.hp), A.from(2));
  const beta = A.div(A.mul(c.kappa, A.mul(c.eps, A.sub(A.from(2), c.eps))), A.from(4));
  return A.sub(entropyLike(A, Ec), entropyLike(A, beta));
}

/** m = M/lambda of the row, and its distance from the critical value (solvable family only). */
export function massParameter<T>(
  engine: Engine<T>,
  input: RowInput,
  c: LinearConstants<T>,
): { readonly m: T; readonly above?: T } {
  const A = engine.arithmetic;
  const critical = engine.model.solvable ? criticalMass(A, c) : undefined;
  if (input.massAboveCritical !== undefined) {
    const above = A.from(input.massAboveCritical);
    return { m: A.add(critical!, above), above };
  }
  const m = A.div(A.from(input.mass!), A.from(input.lambda!));
  return critical === undefined ? { m } : { m, above: A.sub(m, critical) };
}

/** The problem in units M0, and M0. */
export function scaled<T>(
  A: Arithmetic<T>,
  c: LinearConstants<T>,
  m: T,
): { readonly p: FarProblem<T>; readonly M0: T } {
  const M0 = A.from(Math.max(Math.abs(A.toNumber(m)), A.toNumber(c.kappa)));
  const kappa = A.div(c.kappa, M0);
  const shift = A.div(A.mul(kappa, A.mul(bathExcess(A, c), A.log(M0))), A.from(4));
  return { p: { ...c, kappa, m: A.add(A.div(m, M0), shift) }, M0 };
}

/** Kind and locus of a Boulware or thermal row; `follow` receives the end of the run, for dense output. */
export function linearRow<T>(
  engine: Engine<T>,
  input: RowInput,
  follow?: (end: LinearEnd<T>, M0: T, p: FarProblem<T>) => void,
): Solution<T> {
  const A = engine.arithmetic, x = A.toNumber, { solvable } = engine.model;
  const eps = input.state === "boulware" ? A.from(1) : A.neg(A.from(input.bathRatioMinusOne!));
  const c = linearConstants(engine, input, eps), { m, above } = massParameter(engine, input, c);
  const lambda = A.from(input.lambda!), sign = x(eps);
  const computedMass = input.massAboveCritical === undefined ? {} : { mass: A.mul(m, lambda) };
  if (x(m) === 0 && x(bathExcess(A, c)) === 0) {
    return { ...bare<T>("vacuum"), numbers: computedMass } as Solution<T>;
  }
  const evidence: Record<string, T> = above === undefined ? {} : { mass_above_critical: above };
  const Ec = A.div(A.mul(c.kappa, c.hp), A.from(2));
  if (solvable && x(above!) === 0 && sign >= 0) {
    return exactlyCritical(A, { m, Ec, eps, lambda, computedMass });
  }
  const { p, M0 } = scaled(A, c, m), end = inward(engine, p, c.own);
  follow?.(end, M0, p);
  if (end.end === "gave-up") return failed(`step-limit: ${end.why}`);
  const two = A.from(2), dilaton = (E: T) => A.neg(A.div(A.log(A.mul(E, M0)), two));
  if (end.end === "locus") {
    return {
      outcome: "solved",
      kind: "naked-singularity",
      numbers: { ...computedMass, dilaton_locus: dilaton(end.Ep), lngtt: end.lngtt },
      exact: { curvature_locus: -Infinity }, // rho'' -> +infinity on the locus, R = -2 rho'' e^{-2 rho}
      evidence: { ...evidence, throat_condition: end.state },
    };
  }
  const o = end.at, condition = { ...evidence, throat_condition: o["state"]! };
  if (end.end === "zero") { // no critical locus (a = 0): E = 0, where R = -4 E_u^2/(E X) -> -infinity
    return {
      outcome: "solved",
      kind: "naked-singularity",
      numbers: computedMass,
      exact: {
        dilaton_locus: Infinity,
        minus_gtt_locus: Infinity,
        log10_minus_gtt_locus: Infinity,
        curvature_locus: -Infinity,
      },
      evidence: condition,
    };
  }
  const E = o["E"]!, lambda2 = A.mul(lambda, lambda);
  const R = end.end === "horizon" // R = 4 E/(E - E_p): X and phi_uu underflow together there
    ? A.div(A.mul(A.from(4), E), A.sub(E, o["Ep"]!))
    : o["curvature"]!;
  const curvature = A.mul(R, lambda2);
  const numbers = {
    ...computedMass,
    dilaton_locus: dilaton(E),
    curvature_locus: curvature,
    entropy_classical: A.mul(two, A.mul(E, M0)),
  };
  const separation = x(o["Ep"]!) > 0 ? A.div(A.sub(E, o["Ep"]!), o["Ep"]!) : undefined;
  const near = separation === undefined ? {} : { separation };
  if (end.end === "throat") {
    return {
      outcome: "solved",
      kind: "throat",
      numbers: { ...numbers, lngtt: o["lngtt_throat"]! },
      exact: {},
      evidence: condition,
      ...near,
    };
  }
  const T = A.div(lambda, A.mul(two, A.pi)); // regular horizons at tau = 1 exactly: c = 2 lambda
  return {
    outcome: "solved",
    kind: "horizon",
    numbers: { ...numbers, temperature_horizon: T },
    exact: { minus_gtt_locus: 0, log10_minus_gtt_locus: -Infinity },
    evidence: condition,
    ...near,
  };
}

/** The solvable family exactly at its critical mass (see the closed form of the family). */
function exactlyCritical<T>(
  A: Arithmetic<T>,
  c: {
    readonly m: T;
    readonly Ec: T;
    readonly eps: T;
    readonly lambda: T;
    readonly computedMass: { mass?: T };
  },
): Solution<T> {
  const x = A.toNumber, two = A.from(2), numbers = c.computedMass;
  if (x(c.eps) > 0 && x(c.Ec) > 0) return { ...bare<T>("marginal"), numbers } as Solution<T>;
  if (x(c.eps) > 0) { // E has a double zero: proper distance diverges, R -> -4 lambda^2
    return {
      outcome: "solved",
      kind: "semi-infinite-throat",
      numbers: { ...numbers, curvature_locus: A.mul(A.from(-4), A.mul(c.lambda, c.lambda)) },
      exact: {
        dilaton_locus: Infinity,
        minus_gtt_locus: Infinity,
        log10_minus_gtt_locus: Infinity,
      },
      evidence: {},
    };
  }
  return {
    outcome: "solved",
    kind: "singular-horizon",
    numbers: {
      ...numbers,
      dilaton_locus: A.neg(A.div(A.log(c.Ec), two)),
      temperature_horizon: A.div(c.lambda, A.mul(two, A.pi)),
      entropy_classical: A.mul(two, c.Ec),
    },
    exact: { minus_gtt_locus: 0, log10_minus_gtt_locus: -Infinity, curvature_locus: Infinity },
    evidence: {},
  };
}
