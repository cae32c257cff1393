/**
 * Equations of a model in conformal gauge ds^2 = -e^{2 rho} dx^+ dx^-, derived from its action with a
 * metric that still has g_++ = p and g_-- = m: variation with respect to p and m, then set to 0, gives
 * the two constraints; rho gives the trace, phi the dilaton equation, psi its own.
 *
 * @module
 */
import { call, div, type Expr, mul, num, sub, substitute, sym } from "../expr/tree.ts";
import { type Action, GENERIC } from "./action.ts";
import type { Context } from "./claim.ts";
import { type Metric, ricciScalar } from "./curvature.ts";
import { Jets } from "./jets.ts";
import { solveLinear } from "./shell.ts";

/** Coordinates: xp = x^+, xm = x^-. */
export const LIGHT_CONE = ["xp", "xm"] as const;

/** What variation gives at p = m = 0; each vanishes. */
export interface LightConeEquations {
  readonly jets: Jets;
  readonly bindings: Readonly<Record<string, Expr>>;
  readonly equations: Readonly<Record<"p" | "m" | "rho" | "phi" | "psi", Expr>>;
}

/** Derives the equations in conformal gauge. */
export function lightConeEquations(action: Action = GENERIC): LightConeEquations {
  const jets = new Jets({
    coordinates: LIGHT_CONE,
    fields: ["phi", "rho", "psi", "p", "m"],
    ...(action.functions ? {} : { functions: { H: "phi", K: "phi", V: "phi" } }),
  });
  const bindings: Record<string, Expr> = { ...action.functions };
  const f = jets.read("-exp(2*rho)/2"), p = sym("p"), m = sym("m");
  const metric: Metric = [[p, f], [f, m]];
  const root = call("sqrt", sub(mul(f, f), mul(p, m)));
  const square = (x: string) =>
    div(
      jets.read(`m*d(${x},xp)^2 + p*d(${x},xm)^2 + exp(2*rho)*d(${x},xp)*d(${x},xm)`),
      sub(mul(p, m), mul(f, f)),
    );
  const lagrangian = mul(
    root,
    jets.read("H*R2 + K*phi2 + V - kappa*(2*psi*R2 + psi2)/4", {
      ...bindings,
      R2: ricciScalar(metric, LIGHT_CONE, jets),
      phi2: square("phi"),
      psi2: square("psi"),
    }),
  );
  const off = { p: num(0), m: num(0) };
  const vary = (field: string) => {
    // linear part in p and m first: nothing of higher order survives at p = m = 0
    if (field === "p" || field === "m") return jets.euler(lagrangian, field, off);
    return jets.euler(jets.at(lagrangian, off), field);
  };
  const equations = settled(action, jets, {
    p: vary("p"),
    m: vary("m"),
    rho: vary("rho"),
    phi: vary("phi"),
    psi: vary("psi"),
  });
  return { jets, bindings, equations };
}

/** The equations of a classical action have no kappa. */
function settled<T extends Readonly<Record<string, Expr>>>(action: Action, jets: Jets, all: T): T {
  if (!action.classical) return all;
  const off = (e: Expr) => jets.at(substitute(e, { kappa: num(0) }), {});
  return Object.fromEntries(Object.entries(all).map(([name, e]) => [name, off(e)])) as T;
}

/** The context of claims on shell in conformal gauge: mixed derivatives by the field equations. */
export function lightConeContext(action: Action = GENERIC): Context {
  const { jets, bindings, equations } = lightConeEquations(action);
  const psi = { name: "d(psi, xp, xm)", by: jets.read("-2*d(rho,xp,xm)") };
  const free = action.classical ? "phi" : "psi"; // what the constraints are solved for
  const no = (e: Expr) => substitute(e, { [psi.name]: psi.by });
  const rules = [
    ...solveLinear(
      [no(equations.rho), no(equations.phi)],
      ["d(phi, xp, xm)", "d(rho, xp, xm)"],
      jets,
    ),
    psi,
    ...solveLinear([equations.m], [`d(${free}, xp, xp)`], jets),
    ...solveLinear([equations.p], [`d(${free}, xm, xm)`], jets),
  ];
  return {
    jets,
    bindings: {
      ...bindings,
      R: jets.read("8*exp(-2*rho)*d(rho,xp,xm)"),
      E_pp: equations.m,
      E_mm: equations.p,
      E_rho: equations.rho,
      E_phi: equations.phi,
      E_psi: equations.psi,
    },
    rules,
    ranges: action.ranges,
  };
}
