/**
 * Audits of the Polyakov stress tensor: trace anomaly, conservation in both gauges, regularity of the
 * Hartle-Hawking state and of its mirror constant at a horizon, Boulware at infinity, and the three
 * states on the two-dimensional Schwarzschild metric.
 *
 * @module
 */
import { num } from "../../expr/tree.ts";
import { GENERIC } from "../action.ts";
import type { Audit } from "../audit.ts";
import type { Claim, Context } from "../claim.ts";
import { Jets } from "../jets.ts";
import { lightConeEquations } from "../light_cone.ts";

/** Trace anomaly and conservation in light-cone gauge, from the Polyakov action alone. */
export function anomalyAudit(): Audit {
  const none = { H: num(0), K: num(0), V: num(0) };
  const { jets, equations } = lightConeEquations({ ...GENERIC, functions: none });
  const kappa = { kappa: jets.read("N/12") };
  const put = (text: string) => jets.read(text, kappa);
  const T = (x: string) =>
    put(`-kappa/(2*pi)*(d(psi,${x},${x}) - 2*d(rho,${x})*d(psi,${x}) - d(psi,${x})^2/2)`);
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    onShell: true,
    source: "Polyakov action; Christensen & Fulling 1977",
  });
  return {
    name: "trace anomaly",
    title: "Trace anomaly and conservation of the Polyakov stress tensor",
    context: {
      jets,
      bindings: {
        R: jets.read("8*exp(-2*rho)*d(rho,xp,xm)"),
        E: jets.at(equations.rho, {}),
        ...kappa,
        Tpp: T("xp"),
        Tmm: T("xm"),
        Tpm: put("-kappa/pi*d(rho,xp,xm)"),
      },
      rules: [
        { name: "d(psi, xp, xm)", by: jets.read("-2*d(rho,xp,xm)") },
        { name: "kappa", by: kappa.kappa },
      ],
      ranges: { rho: [-0.8, 0.9] },
    },
    claims: [
      claim("trace-anomaly", "T = N R/24 pi", "E/(2*pi)*2*exp(-2*rho)", "N*R/(24*pi)"),
      claim("trace-component", "T = 2 g^{+-} T_{+-}", "-4*exp(-2*rho)*Tpm", "kappa*R/(2*pi)"),
      claim("conservation-plus", "nabla T = 0", "d(Tpp,xm) + d(Tpm,xp)", "2*d(rho,xp)*Tpm"),
      claim("conservation-minus", "nabla T = 0", "d(Tmm,xp) + d(Tpm,xm)", "2*d(rho,xm)*Tpm"),
    ],
  };
}

const PRESSURE = "N/(96*pi)*(c^2 - d(g,x)^2)/g";
const ENERGY = "N/(96*pi)*((c^2 - d(g,x)^2)/g + 4*d(g,x,x))";

/** Static tensor in ds^2 = -g dt^2 + dx^2/g. */
export function staticTensorAudit(): Audit {
  const jets = new Jets({ coordinates: ["x"], fields: ["g"] });
  const source = "N (c^2 - g'^2)/(96 pi g) and its partner; derived from psi' = c - 2 rho'";
  return {
    name: "static tensor",
    title: "Conservation and trace of the static Polyakov tensor",
    context: {
      jets,
      bindings: { pressure: jets.read(PRESSURE), energy: jets.read(ENERGY) },
      rules: [],
      ranges: {},
    },
    claims: [
      {
        id: "conservation-static",
        statement: "p' + (g'/2g)(p + epsilon) = 0",
        left: "d(pressure,x)",
        right: "-d(g,x)/(2*g)*(pressure + energy)",
        source,
      },
      {
        id: "trace-static",
        statement: "p - epsilon = N R/24 pi, R = -g''",
        left: "pressure - energy",
        right: "-N*d(g,x,x)/(24*pi)",
        source,
      },
      {
        id: "pressure-state",
        statement: "pressure from the state psi' = c - 2 rho'",
        left: "pressure",
        right: "N/(96*pi*g)*((c - d(g,x))^2 + 2*d(g,x)*(c - d(g,x)))",
        source,
      },
    ],
  };
}

/** Hartle-Hawking and its mirror constant at a horizon g = 2 q x + s x^2/2 + j x^3/6. */
export function horizonAudit(): Audit {
  const jets = new Jets({ coordinates: ["x"], fields: [] });
  const g = jets.read("2*q*x + s*x^2/2 + j*x^3/6");
  const tensor = (c: string) => ({ g, c: jets.read(c) });
  const k = "(2*q + s*x/2 + j*x^2/6)";
  const regular = `-N/(96*pi)*(4*q*s + (s^2 + 2*q*j)*x + s*j*x^2 + j^2*x^3/4)/${k}`;
  const source = "expansion at the horizon, own derivation";
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    source,
  });
  return {
    name: "horizon",
    title: "Regularity of the Hartle-Hawking state at the horizon",
    context: {
      jets,
      bindings: {
        g,
        pressure: jets.read(PRESSURE, tensor("2*q")),
        mirror: jets.read(PRESSURE, tensor("-2*q")),
        energy: jets.read(ENERGY, tensor("2*q")),
      },
      rules: [],
      ranges: { x: [0.01, 0.4] },
    },
    claims: [
      claim("pressure-regular", "c = 2q: pressure regular at x = 0", "pressure", regular),
      claim("mirror-regular", "c = -2q: the same", "mirror", regular),
      claim(
        "infalling-regular",
        "(epsilon + p)/g, what an infalling observer meets, is regular",
        "(energy + pressure)/g",
        `N/(96*pi)*(4*q*j + 2/3*s*j*x + j^2*x^2/6)/${k}^2`,
      ),
      claim(
        "auxiliary-regular",
        "c = 2q: psi is regular",
        "(2*q - d(g,x))/g",
        `-(s + j*x/2)/${k}`,
      ),
      claim(
        "auxiliary-mirror",
        "c = -2q: psi diverges logarithmically, and the tensor does not see it",
        "(-2*q - d(g,x))/g + 2/x",
        `-j*x/(6*${k})`,
      ),
    ],
  };
}

/** Boulware state far away, on the classical holes. */
export function boulwareAudit(): Audit {
  const jets = new Jets({ coordinates: ["r", "u"], fields: [] });
  const context: Context = {
    jets,
    bindings: {
      f: jets.read("1 - 2*M/r"),
      g: jets.read("1/(1 + m*exp(-u))"),
    },
    rules: [],
    ranges: { r: [6, 9], M: [0.3, 1.4] },
  };
  const source = "static tensor with c = 0, own derivation";
  return {
    name: "boulware",
    title: "The Boulware state vanishes at infinity",
    context,
    claims: [
      {
        id: "boulware-schwarzschild",
        statement: "pressure on f = 1 - 2M/r falls like r^-4",
        left: "-N/(96*pi)*d(f,r)^2/f",
        right: "-N/(24*pi)*M^2/r^4/(1 - 2*M/r)",
        source,
      },
      {
        id: "boulware-linear-dilaton",
        statement: "pressure on g = 1/(1 + m e^{-u}) falls like e^{-2u}",
        left: "-N/(96*pi)*(2*lambda*d(g,u)/g)^2/g",
        right: "-N/(24*pi)*lambda^2*m^2*exp(-2*u)/(1 + m*exp(-u))",
        source,
      },
    ],
  };
}

/** Boulware, Hartle-Hawking and Unruh on the two-dimensional Schwarzschild metric, one scalar. */
export function schwarzschildAudit(): Audit {
  const jets = new Jets({ coordinates: ["r"], fields: [] });
  const f = jets.read("1 - 2*M/r"), rho = jets.read("log(1 - 2*M/r)/2");
  const null_ = jets.read("-1/(12*pi)*((f*d(rho,r)/2)^2 - f*d(f*d(rho,r),r)/4)", { f, rho });
  const source = "Christensen & Fulling 1977; Davies, Fulling & Unruh 1976";
  const claim = (id: string, statement: string, left: string, right: string): Claim => ({
    id,
    statement,
    left,
    right,
    source,
  });
  return {
    name: "schwarzschild",
    title: "Three states on the two-dimensional Schwarzschild metric",
    context: {
      jets,
      bindings: { f, rho, Tvv: null_, thermal: jets.read("1/(768*pi*M^2)") },
      rules: [],
      ranges: { r: [6, 9], M: [0.3, 1.4] },
    },
    claims: [
      claim(
        "schwarzschild-boulware",
        "T_uu = T_vv in the Boulware state",
        "Tvv",
        "(3*M^2/(2*r^4) - M/r^3)/(24*pi)",
      ),
      claim(
        "schwarzschild-mixed",
        "T_uv in every state",
        "1/(48*pi)*f*d(f*d(rho,r),r)",
        "-(M/r^3)*(1 - 2*M/r)/(24*pi)",
      ),
      claim(
        "schwarzschild-hartle-hawking",
        "T_vv + 1/(768 pi M^2) vanishes twice at the horizon",
        "Tvv + thermal",
        "(1 - 2*M/r)^2*(1 + 4*M/r + 12*M^2/r^2)/(768*pi*M^2)",
      ),
      claim(
        "schwarzschild-unruh",
        "flux of the Unruh state: the Hawking temperature's pi T^2/12",
        "Tvv + thermal - Tvv",
        "pi/12*(1/(8*pi*M))^2",
      ),
    ],
  };
}
