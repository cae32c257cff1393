/**
 * Audits of model geometry: the Killing vector epsilon^{mn} d_n phi, the Liouville form of the solvable
 * family, and the spherical reduction of four-dimensional gravity.
 *
 * @module
 */
import { type Expr, num, substitute, sym } from "../../expr/tree.ts";
import { actionOf, classical, GENERIC } from "../action.ts";
import type { Audit } from "../audit.ts";
import type { Claim } from "../claim.ts";
import { type Metric, ricciScalar } from "../curvature.ts";
import { Jets } from "../jets.ts";
import { LIGHT_CONE, lightConeContext } from "../light_cone.ts";
import { staticContext } from "../static.ts";

/** Where epsilon^{mn} d_n phi is a Killing vector: H'' = K and no stress along the light cone. */
export function killingAudit(): Audit {
  const context = lightConeContext(GENERIC);
  const T = "(-kappa/(2*pi)*(d(psi,xp,xp) - 2*d(rho,xp)*d(psi,xp) - d(psi,xp)^2/2))";
  return {
    name: "killing",
    title: "The vector epsilon^{mn} d_n phi",
    context,
    claims: [{
      id: "killing-equation",
      statement: "nabla_+ xi_+ of xi = epsilon d phi, from the ++ constraint of any model",
      left: "d(H,phi)*(d(phi,xp,xp) - 2*d(rho,xp)*d(phi,xp))",
      right: `(K - d(H,phi,phi))*d(phi,xp)^2 - pi*${T}`,
      onShell: true,
      source: "own derivation",
    }],
  };
}

/** The condition H'' = K, model by model, and the static form of the Killing equation. */
export function killingModelAudit(name: string): Audit {
  const action = classical(actionOf(name));
  const context = staticContext(action);
  // equation (1) less the constraint: V is eliminated
  const rules = [{
    name: "d(phi, sigma, sigma)",
    by: context.jets.read(
      "(2*d(rho,sigma)*d(H,phi)*d(phi,sigma) + K*d(phi,sigma)^2 - d(H,phi,phi)*d(phi,sigma)^2)/d(H,phi)",
      context.bindings,
    ),
  }];
  return {
    name: `killing ${name}`,
    title: `Killing vector of classical ${name}`,
    context: { ...context, rules },
    claims: [
      {
        id: "condition",
        statement: "H'' = K",
        left: "d(H,phi,phi)",
        right: "K",
        source: "own derivation",
      },
      {
        id: "killing-static",
        statement: "e^{-2 rho} phi' is constant on classical solutions",
        left: "d(phi,sigma,sigma)",
        right: "2*d(rho,sigma)*d(phi,sigma)",
        onShell: true,
        source: "equation (1) less the constraint",
      },
    ],
  };
}

/** Liouville form of the solvable family, in its parameter a. */
export function liouvilleAudit(): Audit {
  const context = lightConeContext(actionOf("solvable"));
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    source: "hep-th/9512187; RST, Phys. Rev. D 46 (1992) 3444 at a = 1/2",
  });
  return {
    name: "liouville",
    title: "Liouville form of the solvable family",
    context: {
      ...context,
      bindings: {
        ...context.bindings,
        Omega: context.jets.read("(exp(-2*phi) + a*kappa*phi)/sqrt(kappa)"),
        chi: context.jets.read("(exp(-2*phi) + kappa*rho + kappa*(a-1)*phi)/sqrt(kappa)"),
      },
    },
    claims: [
      claim(
        "kinetic",
        "the kinetic terms are diagonal in Omega and chi",
        "d(Omega,xp)*d(Omega,xm) - d(chi,xp)*d(chi,xm)",
        "-K*d(phi,xp)*d(phi,xm) - kappa*d(rho,xp)*d(rho,xm) " +
          "- d(H,phi)*(d(phi,xp)*d(rho,xm) + d(phi,xm)*d(rho,xp))",
      ),
      claim(
        "exponent",
        "the potential is that of Liouville",
        "chi - Omega",
        "sqrt(kappa)*(rho - phi)",
      ),
      {
        ...claim("free", "rho - phi is free", "d(rho,xp,xm)", "d(phi,xp,xm)"),
        onShell: true,
      },
      {
        ...claim(
          "liouville",
          "Omega obeys Liouville's equation with source e^{2(rho-phi)}",
          "d(Omega,xp,xm)",
          "-lambda^2*exp(2*rho - 2*phi)/sqrt(kappa)",
        ),
        onShell: true,
      },
    ],
  };
}

/** The s-wave model from the Einstein-Hilbert action in four dimensions, r^2 R term by term. */
export function reductionAudit(): Audit {
  const coordinates = [...LIGHT_CONE, "y", "w"]; // y = cos theta, w the azimuth
  const jets = new Jets({ coordinates: LIGHT_CONE, fields: ["rho", "r"] });
  const four = new Jets({ coordinates, fields: [] });
  // only rho and r depend on xp, xm; y enters explicitly
  four.total = (e: Expr, x: string) =>
    LIGHT_CONE.includes(x as "xp") ? jets.total(e, x) : jets.partial(e, x);
  const zero = num(0), f = jets.read("-exp(2*rho)/2");
  const metric: Metric = [
    [zero, f, zero, zero],
    [f, zero, zero, zero],
    [zero, zero, jets.read("r^2/(1-y^2)"), zero],
    [zero, zero, zero, jets.read("r^2*(1-y^2)")],
  ];
  const swave = actionOf("swave").functions!;
  const at = { phi: sym("r") };
  const source = "Einstein-Hilbert action, G = 1";
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    source,
  });
  return {
    name: "reduction",
    title: "Spherical reduction of the Einstein-Hilbert action",
    context: {
      jets,
      bindings: {
        R4: ricciScalar(metric, coordinates, four),
        R2: jets.read("8*exp(-2*rho)*d(rho,xp,xm)"),
        boxr: jets.read("-4*exp(-2*rho)*d(r,xp,xm)"),
        gradr2: jets.read("-4*exp(-2*rho)*d(r,xp)*d(r,xm)"),
        root: jets.read("exp(2*rho)/2"),
        H: substitute(swave.H, at),
        K: substitute(swave.K, at),
        V: substitute(swave.V, at),
      },
      rules: [],
      ranges: { rho: [-0.8, 0.9], r: [0.6, 3.1], y: [-0.9, 0.9] },
    },
    claims: [
      claim(
        "ricci-four",
        "the four-dimensional Ricci scalar",
        "R4",
        "R2 - 4*boxr/r - 2*gradr2/r^2 + 2/r^2",
      ),
      claim(
        "by-parts",
        "sqrt(-g) r box r is a total derivative less sqrt(-g) (grad r)^2",
        "root*r*boxr",
        "-d(r*d(r,xm),xp) - d(r*d(r,xp),xm) - root*gradr2",
      ),
      claim("curvature-term", "r^2 R/4 is H R/(2 pi)", "r^2*R2/4", "H*R2/(2*pi)"),
      claim(
        "gradient-term",
        "(grad r)^2/2 is K (grad phi)^2/(2 pi)",
        "gradr2/2",
        "K*gradr2/(2*pi)",
      ),
      claim("potential-term", "1/2 is V/(2 pi)", "1/2", "V/(2*pi)"),
      claim(
        "reduced-action",
        "4 pi r^2 R4/(16 pi) is the action of the s-wave model up to a total derivative",
        "root*r^2*R4/4",
        "root*(H*R2 + K*gradr2 + V)/(2*pi) + (d(r*d(r,xm),xp) + d(r*d(r,xp),xm))",
      ),
    ],
  };
}
