/**
 * Audits of closed-form static solutions: the solvable family, and Jackiw-Teitelboim gravity with a bath.
 *
 * @module
 */
import { type Expr, num, substitute, sym } from "../../expr/tree.ts";
import { actionOf } from "../action.ts";
import type { Audit } from "../audit.ts";
import type { Claim, Context } from "../claim.ts";
import { Jets } from "../jets.ts";

/** Equations (1), (2), (C) as claims; `D` writes a derivative along sigma, `c` is the state constant. */
export function threeEquations(D: (text: string) => string, c: string, source: string): Claim[] {
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    onShell: true,
    source,
  });
  return [
    claim(
      "solves-1",
      "equation (1)",
      `${D(D("H"))} + kappa*${D(D("rho"))}`,
      "exp(2*rho)*V",
    ),
    claim(
      "solves-2",
      "equation (2)",
      `2*K*${D(D("phi"))} + 2*H_phi*${D(D("rho"))}`,
      `exp(2*rho)*V_phi - K_phi*${D("phi")}^2`,
    ),
    claim(
      "solves-constraint",
      "constraint (C)",
      `2*${D("rho")}*${D("H")} + K*${D("phi")}^2 - exp(2*rho)*V`,
      `kappa*((${c})^2/4 - ${D("rho")}^2)`,
    ),
  ];
}

/** H, K, V and their derivatives of a catalogue model at a given dilaton. */
export function functionsAt(
  name: string,
  phi: Expr,
  constants: Readonly<Record<string, Expr>> = {},
): Record<string, Expr> {
  const { H, K, V } = actionOf(name).functions!, jets = new Jets({ coordinates: [], fields: [] });
  const set = (e: Expr) => substitute(substitute(e, constants), { phi });
  return {
    H: set(H),
    K: set(K),
    V: set(V),
    H_phi: set(jets.partial(H, "phi")),
    K_phi: set(jets.partial(K, "phi")),
    V_phi: set(jets.partial(V, "phi")),
  };
}

/** e^{-2 phi} + a kappa phi = e^u + kappa (tau^2 - 1) u/4 + m, rho = phi + sigma, u = 2 sigma, lambda = 1. */
export function closedFormAudit(): Audit {
  const jets = new Jets({ coordinates: ["sigma"], fields: ["phi"] });
  const slope = jets.read(
    "(2*exp(2*sigma) + kappa*(tau^2-1)/2)/(a*kappa - 2*exp(-2*phi))",
  );
  const context: Context = {
    jets,
    bindings: {
      ...functionsAt("solvable", sym("phi"), { lambda: num(1) }),
      rho: jets.read("phi + sigma"),
    },
    rules: [{ name: "d(phi, sigma)", by: slope }],
    ranges: { sigma: [-1.1, 1.2], phi: [-1.3, 0.8], a: [0, 2], tau: [0, 2] },
  };
  return {
    name: "closed form",
    title: "Closed-form static solution of the solvable family",
    context,
    claims: [
      {
        id: "implicit",
        statement: "the rule for phi' is the derivative of the closed form",
        left: "d(exp(-2*phi) + a*kappa*phi, sigma)",
        right: "d(exp(2*sigma) + kappa*(tau^2-1)*sigma/2 + m, sigma)",
        onShell: true,
        source: "hep-th/9512187",
      },
      ...threeEquations((e) => `d(${e},sigma)`, "2*tau", "hep-th/9512187; own derivation"),
    ],
  };
}

/** JT, L = 1: g = x^2 - xh^2, X = x/xh, phi = alpha x + (kappa/2)[(1 - tau^2) X arccoth X + tau^2]. */
export function jtBathAudit(): Audit {
  const jets = new Jets({ coordinates: ["x"], fields: [] });
  const g = jets.read("x^2 - xh^2");
  const phi = jets.read(
    "alpha*x + kappa/2*((1-tau^2)*x/xh*log((x+xh)/(x-xh))/2 + tau^2)",
  );
  return {
    name: "jt bath",
    title: "Jackiw-Teitelboim solution with a bath",
    context: {
      jets,
      bindings: {
        ...functionsAt("jt", phi, { L: num(1) }),
        phi,
        g,
        rho: jets.read("log(g)/2", { g }),
      },
      rules: [],
      ranges: { x: [1.6, 3.1], xh: [0.4, 1.3], tau: [0, 2] },
    },
    claims: threeEquations((e) => `(g*d(${e},x))`, "2*tau*xh", "1402.6334; own derivation")
      .map((c) => ({ ...c, onShell: false })),
  };
}
