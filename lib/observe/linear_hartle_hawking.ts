/**
 * Hartle-Hawking rows of linear-dilaton models: the state is found from a regular horizon.
 *
 * @module
 */
import type { RowInput } from "../model/input.ts";
import type { Engine } from "../solve/engine.ts";
import { type HorizonRoot, horizonRoot } from "../solve/horizon_root.ts";
import { outward } from "../solve/linear_dilaton/outward.ts";
import { SETTINGS } from "../solve/settings.ts";
import { type LinearConstants, linearConstants, massParameter } from "./linear_row.ts";
import { bare, failed, refused, type Solution } from "./solution.ts";

/** m and tau - 1 of the solution with e^{-2 phi} = Eh at the horizon. */
function fromHorizon<T>(engine: Engine<T>, c: LinearConstants<T>, Eh: T) {
  const A = engine.arithmetic, M0 = A.from(Math.max(A.toNumber(Eh), A.toNumber(c.kappa)));
  const kappa = A.div(c.kappa, M0);
  const far = outward(engine, { ...c, kappa, Eh: A.div(Eh, M0) }, c.own);
  if (!far) return undefined;
  // tau^2 - k with tau = 1 + excess; m is shifted by the unit M0
  const tau = A.add(A.from(1), far.excess), bath = A.sub(A.mul(tau, tau), c.k);
  const shift = A.div(A.mul(kappa, A.mul(bath, A.log(M0))), A.from(4));
  return { m: A.mul(M0, A.sub(far.m, shift)), excess: far.excess };
}

/**
 * The horizon of a given mass, in double precision; shared by all arithmetics as their first guess.
 *
 * @param engine Double-precision engine.
 */
export function linearHorizonGuess(
  engine: Engine<number>,
  input: RowInput,
): HorizonRoot | undefined {
  if (input.horizonDilaton !== undefined) return undefined;
  const c = linearConstants(engine, input, 0), { m } = massParameter(engine, input, c);
  const critical = c.kappa * (c.hp + Math.sqrt(c.delta)) / 2;
  return horizonRoot(
    (Eh) => (fromHorizon(engine, c, Eh)?.m ?? NaN) - m,
    critical,
    Math.max(m, 1.25 * critical, c.kappa / 8),
  );
}

/** Kind and numbers of a Hartle-Hawking row. */
export function linearHartleHawking<T>(
  engine: Engine<T>,
  input: RowInput,
  guess: HorizonRoot | undefined,
): Solution<T> {
  const A = engine.arithmetic, x = A.toNumber, two = A.from(2), { solvable } = engine.model;
  const lambda = A.from(input.lambda!), c = linearConstants(engine, input, A.from(0));
  const critical = A.div(A.mul(c.kappa, A.add(c.hp, A.sqrt(c.delta))), two);
  let Eh: T, m: T | undefined, excess: T, evidence: Record<string, T> = {};
  if (input.horizonDilaton !== undefined) {
    Eh = A.exp(A.mul(A.from(-2), A.from(input.horizonDilaton)));
    const distance = A.sub(Eh, critical);
    evidence = { horizon_above_critical: distance };
    if (x(distance) < 0) {
      return refused("below-critical: the horizon dilaton lies beyond the critical locus");
    }
    if (x(distance) === 0) return singular(A, lambda, Eh);
    const far = fromHorizon(engine, c, Eh);
    if (!far) return failed("step-limit: the asymptotic region was not reached from the horizon");
    ({ m, excess } = far);
  } else {
    const wanted = massParameter(engine, input, c);
    if (wanted.above !== undefined) {
      evidence = { mass_above_critical: wanted.above };
      if (x(wanted.m) === 0 && x(c.k) === 1) return bare("vacuum");
      if (x(wanted.above) === 0) {
        return singular(
          A,
          lambda,
          critical,
          input.mass === undefined ? A.mul(wanted.m, lambda) : undefined,
        );
      }
      if (x(wanted.above) < 0) {
        return refused(
          "below-critical: the mass is below the critical one, no regular horizon exists",
        );
      }
    }
    if (!guess?.found) {
      if (solvable) return failed("step-limit: no horizon of this mass was found");
      if (!(guess && guess.least < Infinity)) {
        return refused("below-critical: no regular horizon of this mass exists");
      }
      return refused("below-critical: the mass is below that of every regular horizon");
    }
    const root = refine(engine, c, wanted.m, guess);
    if (!root) return failed("step-limit: the horizon of this mass was not found to round-off");
    ({ Eh, excess } = root);
    if (input.mass === undefined) m = wanted.m;
  }
  const tau = A.add(A.from(1), excess), temperature = A.div(A.mul(lambda, tau), A.mul(two, A.pi));
  const q = A.sub(A.mul(two, Eh), A.mul(c.kappa, c.hp)), r = A.div(A.mul(c.kappa, c.delta), q);
  // R = -8 (phi_uu + w_uu) E/X with (kappa r - q) phi_uu = X, w_uu = r phi_uu; time rescaled: gauge invariant
  const R = A.div(A.mul(A.from(-8), A.mul(Eh, A.add(A.from(1), r))), A.sub(A.mul(c.kappa, r), q));
  return {
    outcome: "solved",
    kind: "horizon",
    numbers: {
      ...(m === undefined || input.mass !== undefined ? {} : { mass: A.mul(m, lambda) }),
      bath_ratio: tau,
      bath_ratio_minus_one: excess,
      dilaton_locus: input.horizonDilaton === undefined
        ? A.neg(A.div(A.log(Eh), two))
        : A.from(input.horizonDilaton),
      curvature_locus: A.mul(R, A.mul(lambda, lambda)),
      temperature_bath: temperature,
      temperature_horizon: temperature,
      entropy_classical: A.mul(two, Eh),
    },
    exact: { minus_gtt_locus: 0, log10_minus_gtt_locus: -Infinity },
    evidence,
    ...(x(critical) > 0 ? { separation: A.div(A.sub(Eh, critical), critical) } : {}),
  };
}

/**
 * Secant steps from the double root until the mass agrees to this arithmetic's round-off. Near the critical
 * mass the slope dm/dE_h vanishes at the root and round-off in m is magnified: the search may end there only
 * if its steps have come down to epsilon^0.6.
 */
function refine<T>(
  engine: Engine<T>,
  c: LinearConstants<T>,
  m: T,
  guess: Extract<HorizonRoot, { found: true }>,
) {
  const A = engine.arithmetic, x = A.toNumber, noise = Math.exp(0.6 * Math.log(A.epsilon));
  let Eh = A.from(guess.at), slope = guess.slope, before = Infinity;
  let far = fromHorizon(engine, c, Eh);
  for (let i = 0; far && i < SETTINGS.rounds; i++) {
    const excess = A.sub(far.m, m), step = A.div(excess, A.from(slope));
    const size = Math.abs(x(step)) / Math.abs(x(Eh));
    if (size <= A.epsilon || (size < noise && size > before / 2)) return { Eh, excess: far.excess };
    before = size;
    const next = A.sub(Eh, step), moved = fromHorizon(engine, c, next);
    if (moved) slope = x(A.div(A.sub(moved.m, far.m), A.neg(step)));
    [Eh, far] = [next, moved];
    if (!Number.isFinite(slope) || slope === 0) {
      return size < noise && far ? { Eh, excess: far.excess } : undefined;
    }
  }
  return undefined;
}

function singular<T>(A: Engine<T>["arithmetic"], lambda: T, Ec: T, mass?: T): Solution<T> {
  const temperature = A.div(lambda, A.mul(A.from(2), A.pi));
  return {
    outcome: "solved",
    kind: "singular-horizon",
    numbers: {
      ...(mass === undefined ? {} : { mass }),
      dilaton_locus: A.neg(A.div(A.log(Ec), A.from(2))),
      temperature_bath: temperature,
      temperature_horizon: temperature,
      entropy_classical: A.mul(A.from(2), Ec),
      bath_ratio: A.from(1),
      bath_ratio_minus_one: A.from(0),
    },
    exact: { minus_gtt_locus: 0, log10_minus_gtt_locus: -Infinity, curvature_locus: Infinity },
    evidence: {},
  };
}
