/**
 * Static equations of a model, derived from its action in the gauge
 * ds^2 = e^{2 rho} (-dt^2 + ell^2 dsigma^2): variation with respect to the conformal factor rho, the
 * dilaton phi, the auxiliary field psi and the lapse ell, which is then set to 1 (the constraint).
 *
 * sqrt(-g) R = -2 (rho'/ell)', prime = d/dsigma; the quantum state enters as psi' = c - 2 rho'.
 *
 * @module
 */
import { type Expr, num, substitute } from "../expr/tree.ts";
import { type Action, GENERIC } from "./action.ts";
import type { Context } from "./claim.ts";
import { Jets } from "./jets.ts";
import { onShell, type Rule, solveLinear } from "./shell.ts";

const LAGRANGIAN = "-2*H*d(d(rho,sigma)/ell,sigma) + K*d(phi,sigma)^2/ell + ell*exp(2*rho)*V " +
  "+ kappa*psi*d(d(rho,sigma)/ell,sigma) - kappa*d(psi,sigma)^2/(4*ell)";

/** What variation gives, at ell = 1; each vanishes. */
export interface StaticEquations {
  readonly jets: Jets;
  /** The Lagrangian, ell still free. */
  readonly lagrangian: Expr;
  readonly bindings: Readonly<Record<string, Expr>>;
  /** Variations by field, psi' still free. */
  readonly variations: Readonly<Record<"rho" | "phi" | "psi" | "ell", Expr>>;
  /** Variations with psi' = c - 2 rho'. */
  readonly equations: Readonly<Record<"rho" | "phi" | "psi" | "ell", Expr>>;
}

/** Derives the static equations of an action. */
export function staticEquations(action: Action = GENERIC): StaticEquations {
  const jets = new Jets({
    coordinates: ["sigma"],
    fields: ["phi", "rho", "psi", "ell"],
    ...(action.functions ? {} : { functions: { H: "phi", K: "phi", V: "phi" } }),
  });
  const bindings: Record<string, Expr> = { ...action.functions };
  const lagrangian = jets.read(LAGRANGIAN, bindings);
  const vary = (field: string) => jets.euler(lagrangian, field, { ell: num(1) });
  const variations = { rho: vary("rho"), phi: vary("phi"), psi: vary("psi"), ell: vary("ell") };
  const state = [{ name: "d(psi, sigma)", by: jets.read("c - 2*d(rho,sigma)") }];
  const put = (e: Expr) => jets.at(onShell(e, state, jets), {});
  const { rho, phi, psi, ell } = variations;
  const kappa: Readonly<Record<string, Expr>> = action.classical ? { kappa: num(0) } : {};
  const last = (e: Expr) => jets.at(substitute(put(e), kappa), {});
  const equations = { rho: last(rho), phi: last(phi), psi: last(psi), ell: last(ell) };
  return { jets, lagrangian, bindings, variations, equations };
}

/**
 * The context of claims about static solutions: rules for phi'', rho'' and psi' and, where `constraint`
 * is asked for, for c, which the constraint gives as a square root (for rho' if kappa = 0).
 */
export function staticContext(
  action: Action = GENERIC,
  options: { readonly constraint?: boolean } = {},
): Context {
  const { jets, bindings, equations } = staticEquations(action);
  const second = solveLinear(
    [equations.rho, equations.phi],
    ["d(phi, sigma, sigma)", "d(rho, sigma, sigma)"],
    jets,
  );
  const rules: Rule[] = [...second, {
    name: "d(psi, sigma)",
    by: jets.read("c - 2*d(rho,sigma)"),
  }];
  if (options.constraint && action.classical) {
    rules.push(...solveLinear([equations.ell], ["d(rho, sigma)"], jets));
  } else if (options.constraint) {
    // kappa c^2/4 is the only place of c in the constraint
    const zero = substitute(equations.ell, { c: num(0) });
    rules.push({
      name: "c",
      by: jets.read("sqrt(-4*rest/kappa)", { rest: zero }),
    });
  }
  return {
    jets,
    bindings: {
      ...bindings,
      R: jets.read("-2*d(rho,sigma,sigma)*exp(-2*rho)"),
      E_rho: equations.rho,
      E_phi: equations.phi,
      E_psi: equations.psi,
      E_ell: equations.ell,
    },
    rules,
    ranges: action.ranges,
  };
}
