/**
 * The solver's forms as an audit reads them: the text that the integrator uses, what its free names stand
 * for, and ranges inside the domain.
 *
 * @module
 */
import { derive } from "../../expr/derive.ts";
import type { SystemText } from "../../expr/lower.ts";
import { normalForm } from "../../expr/normal.ts";
import { parse } from "../../expr/parse.ts";
import type { Ranges } from "../../expr/points.ts";
import { div, type Expr, num, substitute, sym } from "../../expr/tree.ts";
import { CATALOGUE } from "../../model/catalogue/mod.ts";
import { inDilaton, inRoot } from "../../model/form/dilaton.ts";
import { linearDilaton } from "../../model/form/linear_dilaton.ts";
import { spherical, type Surroundings } from "../../model/form/spherical.ts";
import { functionsAt } from "./solutions.ts";

type Named<T> = Readonly<Record<string, T>>;
type Name = keyof typeof CATALOGUE;

/** One form of the static equations of one model. */
export interface Form {
  /** Which form, in words. */
  readonly title: string;
  readonly system: SystemText;
  /** Names bound before the lines of the system. */
  readonly known: Named<Expr>;
  /** Values of the model's constants. */
  readonly constants: Named<Expr>;
  /** d sigma per independent variable, as text. */
  readonly pace: string;
  /** The state constant, as text. */
  readonly c: string;
  readonly ranges: Ranges;
  /**
   * Other names in which the form is rational, where it is not as it stands: the unknowns in terms of them,
   * and them in terms of the unknowns and lines.
   */
  readonly chart?: { readonly unknowns: Named<string>; readonly names: Named<string> };
}

const RANGES = {
  kappa: [0.1, 0.6],
  rho: [-0.8, 0.9],
  chi: [0.3, 1.3],
  a: [0.1, 1.9],
  u: [0.9, 1.9],
  F: [-0.3, 0.9],
  eps: [0.1, 0.9],
  y: [0.9, 1.6],
  v: [-0.2, 0.3],
  w: [-0.2, 0.2],
  m: [0.6, 1.2],
  b: [0.02, 0.2],
  om: [-0.5, 0.5],
  mu: [-0.5, 0.5],
  eta: [-0.4, 0.4],
} satisfies Ranges;

/** The far form of CGHS: S is the square root, e the exponential of u. */
const FAR: Form["chart"] = {
  unknowns: {
    F: "Q - exp(u)",
    w: "(log((S^2-(1+2*v-(1+2*v)*kappa/(2*Q))^2)*Q^2/kappa " +
      "+ kappa*(eps/2+v)*(1-eps/2+v)) - u)/2",
  },
  names: { Q: "E", S: "1+Sm" },
};

function split(kind: Surroundings): Form["chart"] {
  const heavy = kind === "heavy-bath", bath = heavy || kind === "bath";
  const ch = bath ? "(1+eta)/(4*m)" : "0", m0 = bath ? "m-b/(4*m)" : "m";
  const g = `(S^2-(x*k)^2-b*((${ch})^2-k^2))`;
  return {
    unknowns: {
      rho: `log(${g})/2`,
      mu: `((x^2-b)*k-(${m0}))/b`,
      ...(heavy ? { r: "x" } : { om: `(x*(1-${g})-2*m)/b` }),
    },
    names: { x: "r", k: "q", S: "sqrt(rq^2+D)" },
  };
}

function dilatonForms(name: Name, known: Named<Expr>, phi: Expr): Form[] {
  const { family, parameters } = CATALOGUE[name], linear = family === "linear-dilaton";
  const constants: Record<string, Expr> = linear ? { lambda: num(1) } : {};
  const solvable = linear && name !== "cghs", e = num(linear ? -1 : 1);
  const common = { constants, c: "2*sqrt(c4/kappa)" };
  return [
    {
      ...common,
      title: "dilaton as variable",
      system: inDilaton(parameters),
      known: { ...functionsAt(name, sym("phi"), constants), e },
      pace: "sigma_phi",
      ranges: { ...RANGES, phi: linear ? [-1.9, -0.9] : [1.6, 3.1] },
    },
    {
      ...common,
      title: "root of the distance to the critical locus as variable",
      system: inRoot(family, solvable, parameters),
      known: { ...functionsAt(name, phi, constants), ...known, e },
      pace: "sigma_phi*phi_y",
      ranges: RANGES,
    },
  ];
}

function linearForms(name: Name): Form[] {
  const { counterterm, parameters } = CATALOGUE[name], constants = { lambda: num(1) };
  const h = normalForm(derive(parse(counterterm.H), "phi")), k = parse(counterterm.K);
  const set = (text: string) => normalForm(substitute(parse(text), { h, k }));
  const known = { h, k, hp: set("1+h"), hk: set("h+k"), delta: set("1+2*h+k") };
  const solvable = name !== "cghs"; // delta vanishes
  const Ep = normalForm(substitute(parse("kappa*(hp+sqrt(delta))/2"), known));
  const far = (region: "outer" | "inner"): Form => ({
    constants,
    title: `far form, ${region}`,
    system: linearDilaton(region, solvable, parameters),
    known,
    pace: "1/2",
    c: "2*(1-eps)",
    ranges: { ...RANGES, S: [1.5, 1.7], Q: [2.3, 4.1] },
    ...(solvable ? {} : { chart: FAR! }),
  });
  const phi = substitute(parse("-log(Ep+y^2)/2"), { Ep });
  return [far("outer"), far("inner"), ...dilatonForms(name, { ...known, Ep }, phi)];
}

function sphericalForms(name: Name): Form[] {
  const b = div(sym("kappa"), sym("pi"));
  const far = (kind: Surroundings): Form => {
    const bath = kind === "bath" || kind === "heavy-bath", inwards = kind === "empty-negative";
    return {
      constants: {},
      title: `split form, ${kind}`,
      system: spherical(kind),
      known: { b },
      pace: "1",
      c: bath ? "(1+eta)/(2*m)" : "0",
      ranges: {
        ...RANGES,
        rho: inwards ? [0.3, 0.6] : [-0.9, -0.3],
        m: inwards ? [-1.2, -0.6] : [0.6, 1.2],
        r: [2.3, 3.1],
        x: [2.3, 3.1],
        k: inwards ? [-0.11, -0.06] : [0.06, 0.11],
        S: [0.8, 0.9],
      },
      chart: split(kind)!,
    };
  };
  return [
    ...(["empty", "empty-negative", "bath", "heavy-bath"] as const).map(far),
    ...dilatonForms(name, { b }, substitute(parse("sqrt(b)+y^2"), { b })),
  ];
}

/**
 * All forms in which the solver integrates a catalogue model.
 *
 * @param name Name in the catalogue.
 */
export function formsOf(name: Name): Form[] {
  return CATALOGUE[name].family === "linear-dilaton" ? linearForms(name) : sphericalForms(name);
}
