/**
 * The action of a model, from which everything else is derived:
 *
 * S = (1/2 pi) Int sqrt(-g) [H R + K (grad phi)^2 + V - (kappa/4)(2 psi R + (grad psi)^2)],
 *
 * the last two terms being the local form of the non-local Polyakov term (box psi = R). Signature (-,+).
 *
 * @module
 */
import { parse } from "../expr/parse.ts";
import { add, type Expr, mul, num, substitute, sym } from "../expr/tree.ts";
import { CATALOGUE } from "../model/catalogue/mod.ts";
import type { Ranges } from "../expr/points.ts";

/** The functions of an action as trees, or unspecified. */
export interface Action {
  /** Name shown in ledgers. */
  readonly name: string;
  /** H, K, V over phi, kappa and parameters; absent for unspecified functions of phi. */
  readonly functions?: { readonly H: Expr; readonly K: Expr; readonly V: Expr };
  /** Where the action comes from. */
  readonly source: string;
  /** Ranges of phi and the parameters. */
  readonly ranges: Ranges;
  /** Whether the quantum part is left out. @default false */
  readonly classical?: boolean;
}

/** H, K and V left open: what is proved of it holds for every model. */
export const GENERIC: Action = {
  name: "any H, K, V",
  source: "the framework of this library",
  ranges: { phi: [-0.7, 0.9], rho: [-0.8, 0.9] },
};

/** Jackiw-Teitelboim gravity (C. Teitelboim 1983, R. Jackiw 1985; A. Almheiri & J. Polchinski 1402.6334). */
export const JT: Action = {
  name: "jt",
  functions: { H: parse("phi"), K: num(0), V: parse("2*phi/L^2") },
  source: "1402.6334",
  ranges: { phi: [0.3, 2.3], rho: [-0.8, 0.9] },
};

/**
 * The action of a catalogue model.
 *
 * @param name Name in the catalogue.
 * @throws {RangeError} if there is no such model.
 */
export function actionOf(name: string): Action {
  if (name === "jt") return JT;
  if (!Object.hasOwn(CATALOGUE, name)) {
    throw new RangeError(
      `Cannot audit the model as its name must be one of ${
        [...Object.keys(CATALOGUE), "jt"].join(", ")
      }: current value is ${name}`,
    );
  }
  const { classical, counterterm, source, family } = CATALOGUE[name as keyof typeof CATALOGUE];
  const one = (c: string, k: string) => add(parse(c), mul(sym("kappa"), parse(k)));
  return {
    name,
    functions: {
      H: one(classical.H, counterterm.H),
      K: one(classical.K, counterterm.K),
      V: parse(classical.V),
    },
    source,
    ranges: {
      phi: family === "spherical" ? [0.6, 3.1] : [-1.3, 0.8],
      rho: [-0.8, 0.9],
      a: [0, 2],
    },
  };
}

/** The action without its quantum part: kappa = 0. */
export function classical(action: Action): Action {
  const off = (e: Expr) => substitute(e, { kappa: num(0) });
  const f = action.functions;
  return {
    ...action,
    classical: true,
    name: `${action.name}, kappa = 0`,
    ...(f ? { functions: { H: off(f.H), K: off(f.K), V: off(f.V) } } : {}),
  };
}
