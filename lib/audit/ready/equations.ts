/**
 * Audit of the field equations of an action: static (1), (2), (C), the conformal-gauge equations with
 * both constraints, and the reparametrisation (Noether) identity of the reduced action.
 *
 * @module
 */
import type { Action } from "../action.ts";
import type { Audit } from "../audit.ts";
import { lightConeContext } from "../light_cone.ts";
import { staticContext, staticEquations } from "../static.ts";

/** Static equations, constraint, their consistency, and the Noether identity. */
export function staticAudit(action: Action): Audit {
  const context = staticContext(action), { variations } = staticEquations(action);
  const source = `variation of the action; ${action.source}`;
  return {
    name: `static ${action.name}`,
    title: `Static equations of ${action.name}`,
    derived: {
      E_rho: "variation of the conformal factor",
      E_phi: "variation of the dilaton",
      E_ell: "variation of the lapse: the constraint",
    },
    context: {
      ...context,
      bindings: {
        ...context.bindings,
        v_rho: variations.rho,
        v_phi: variations.phi,
        v_psi: variations.psi,
        v_ell: variations.ell,
      },
    },
    claims: [
      {
        id: "equation-1",
        statement: "variation of the conformal factor gives equation (1)",
        left: "E_rho",
        right: "2*exp(2*rho)*V - 2*d(H,sigma,sigma) - 2*kappa*d(rho,sigma,sigma)",
        source,
      },
      {
        id: "equation-2",
        statement: "variation of the dilaton gives equation (2)",
        left: "E_phi",
        right: "exp(2*rho)*d(V,phi) - d(K,phi)*d(phi,sigma)^2 - 2*K*d(phi,sigma,sigma) " +
          "- 2*d(H,phi)*d(rho,sigma,sigma)",
        source,
      },
      {
        id: "constraint",
        statement: "variation of the lapse gives the constraint (C)",
        left: "E_ell",
        right: "kappa*c^2/4 - kappa*d(rho,sigma)^2 + exp(2*rho)*V - 2*d(rho,sigma)*d(H,sigma) " +
          "- K*d(phi,sigma)^2",
        source,
      },
      {
        id: "trace",
        statement: "box H - V = kappa R/2",
        left: "exp(-2*rho)*d(H,sigma,sigma) - V",
        right: "kappa*R/2",
        onShell: true,
        source,
      },
      {
        id: "dilaton",
        statement: "H_phi R - 2 div(K grad phi) + K_phi (grad phi)^2 + V_phi = 0",
        left: "d(H,phi)*R - 2*exp(-2*rho)*d(K*d(phi,sigma),sigma)",
        right: "-d(K,phi)*exp(-2*rho)*d(phi,sigma)^2 - d(V,phi)",
        onShell: true,
        source,
      },
      {
        id: "constraint-kept",
        statement: "the constraint is constant along sigma by (1) and (2)",
        left: "d(2*d(rho,sigma)*d(H,sigma) + K*d(phi,sigma)^2, sigma)",
        right: "d(exp(2*rho)*V, sigma) - kappa*d(d(rho,sigma)^2, sigma)",
        onShell: true,
        source,
      },
      {
        id: "noether",
        statement: "reparametrisation identity of the reduced action",
        left: "d(rho,sigma)*v_rho + d(phi,sigma)*v_phi + d(psi,sigma)*v_psi",
        right: "d(v_ell,sigma)",
        source: "Noether's second theorem",
      },
    ],
  };
}

/** Equations in conformal gauge ds^2 = -e^{2 rho} dx^+ dx^-. */
export function lightConeAudit(action: Action): Audit {
  const source = `variation of the action; ${action.source}`;
  const side = (x: "xp" | "xm") =>
    `2*exp(-2*rho)*(d(H,${x},${x}) - 2*d(rho,${x})*d(H,${x}) - K*d(phi,${x})^2) - kappa*exp(-2*rho)*` +
    `(d(psi,${x},${x}) - 2*d(rho,${x})*d(psi,${x}) - d(psi,${x})^2/2)`;
  return {
    name: `light-cone ${action.name}`,
    title: `Equations of ${action.name} in conformal gauge`,
    derived: {
      E_rho: "variation of the conformal factor",
      E_phi: "variation of the dilaton",
      E_psi: "variation of the auxiliary field",
      E_pp: "constraint along x+",
      E_mm: "constraint along x-",
    },
    context: lightConeContext(action),
    claims: [
      {
        id: "constraint-plus",
        statement: "constraint in the x+ direction",
        left: "E_pp",
        right: side("xp"),
        source,
      },
      {
        id: "constraint-minus",
        statement: "constraint in the x- direction",
        left: "E_mm",
        right: side("xm"),
        source,
      },
      {
        id: "conformal-factor",
        statement: "variation of the conformal factor",
        left: "E_rho",
        right: "4*d(H,xp,xm) - 2*kappa*d(psi,xp,xm) + exp(2*rho)*V",
        source,
      },
      {
        id: "dilaton-light-cone",
        statement: "variation of the dilaton",
        left: "E_phi",
        right: "4*K*d(phi,xp,xm) + 2*d(K,phi)*d(phi,xp)*d(phi,xm) + 4*d(H,phi)*d(rho,xp,xm) " +
          "+ exp(2*rho)*d(V,phi)/2",
        source,
      },
      {
        id: "auxiliary",
        statement: "box psi = R",
        left: "E_psi",
        right: "-kappa*d(psi,xp,xm) - kappa*exp(2*rho)*R/4",
        source,
      },
      {
        id: "trace-light-cone",
        statement: "box H - V = kappa R/2",
        left: "-4*exp(-2*rho)*d(H,xp,xm) - V",
        right: "kappa*R/2",
        onShell: true,
        source,
      },
    ],
  };
}
