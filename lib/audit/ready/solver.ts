/**
 * Audits of the solver's own equations: each form that the integrator uses, read from the same text, must
 * solve (1), (2) and (C) of its model's action.
 *
 * @module
 */
import { parse } from "../../expr/parse.ts";
import type { SystemText } from "../../expr/lower.ts";
import { div, type Expr, num, substitute, sym } from "../../expr/tree.ts";
import { CATALOGUE } from "../../model/catalogue/mod.ts";
import { inDilaton } from "../../model/form/dilaton.ts";
import { linearDilaton } from "../../model/form/linear_dilaton.ts";
import { spherical } from "../../model/form/spherical.ts";
import type { Audit } from "../audit.ts";
import { Jets } from "../jets.ts";
import type { Rule } from "../shell.ts";
import { functionsAt, threeEquations } from "./solutions.ts";

/** Lines of a system with every earlier line put in, and the rules for the unknowns' derivatives. */
function unfold(
  system: SystemText,
  known: Readonly<Record<string, Expr>>,
): { lines: Record<string, Expr>; rules: Rule[] } {
  const lines: Record<string, Expr> = { ...known };
  for (const [name, text] of system.let) lines[name] = substitute(parse(text), lines);
  const rules = Object.entries(system.derivative).map(([name, text]) => ({
    name: `d(${name}, ${system.independent})`,
    by: substitute(parse(text), lines),
  }));
  return { lines, rules };
}

interface Form {
  readonly title: string;
  readonly system: SystemText;
  /** Names bound before the lines of the system. */
  readonly known: Readonly<Record<string, Expr>>;
  /** Constants of the model. */
  readonly constants: Readonly<Record<string, Expr>>;
  /** d sigma per independent variable, as text. */
  readonly pace: string;
  readonly c: string;
  readonly ranges: Readonly<Record<string, readonly [number, number]>>;
}

function audit(model: string, form: Form): Audit {
  const { system } = form;
  const jets = new Jets({ coordinates: [system.independent], fields: system.unknowns });
  const { lines, rules } = unfold(system, form.known);
  const phi = lines["phi"] ?? sym("phi"), rho = lines["rho"] ?? sym("rho");
  const x = system.independent;
  return {
    name: `solver ${model} ${form.title}`,
    title: `Solver form of ${model}: ${form.title}`,
    context: {
      jets,
      bindings: {
        ...lines,
        ...functionsAt(model, phi, form.constants),
        phi,
        rho,
        pace: jets.read(form.pace, lines),
      },
      rules,
      ranges: form.ranges,
    },
    claims: threeEquations((e) => `(d(${e},${x})/pace)`, form.c, `lib/model/form, ${form.title}`),
  };
}

/** All solver forms of one catalogue model. */
export function solverAudits(name: keyof typeof CATALOGUE): Audit[] {
  const { family, parameters } = CATALOGUE[name];
  const linear = family === "linear-dilaton";
  const constants: Record<string, Expr> = linear ? { lambda: num(1) } : {};
  const f = functionsAt(name, sym("phi"), constants);
  const e = num(linear ? -1 : 1);
  const common = {
    constants,
    ranges: {
      phi: linear ? [-1.9, -0.9] : [1.6, 3.1],
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
      pi: [3, 3.2],
      m: [0.6, 1.2],
      b: [0.02, 0.2],
      om: [-0.5, 0.5],
      mu: [-0.5, 0.5],
      eta: [-0.4, 0.4],
    } as Record<string, readonly [number, number]>,
  };
  const dilaton: Form = {
    ...common,
    title: "dilaton as variable",
    system: inDilaton(parameters),
    known: { ...f, e },
    pace: "sigma_phi",
    c: "2*sqrt(c4/kappa)",
  };
  if (linear) {
    const slope = {
      cghs: ["0", "0"],
      rst: ["-1/2", "0"],
      bpp: ["-1", "1"],
      solvable: ["a-1", "1-2*a"],
    };
    const [h, k] = slope[name as keyof typeof slope].map((t) => parse(t)) as [Expr, Expr];
    const solvable = name !== "cghs";
    const jets = new Jets({ coordinates: [], fields: [] });
    const known = {
      h,
      k,
      hp: jets.at(parse("1+h"), { h }),
      hk: jets.at(parse("h+k"), { h, k }),
      delta: jets.at(parse("1+2*h+k"), { h, k }),
    };
    return [
      ...(["outer", "inner"] as const).map((region) =>
        audit(name, {
          ...common,
          title: `far form, ${region}`,
          system: linearDilaton(region, solvable, parameters),
          known,
          pace: "1/2",
          c: "2*(1-eps)",
        })
      ),
      audit(name, dilaton),
    ];
  }
  const known = { b: div(sym("kappa"), sym("pi")) };
  return [
    ...(["empty", "empty-negative", "bath"] as const).map((kind) =>
      audit(name, {
        ...common,
        title: `split form, ${kind}`,
        system: spherical(kind),
        known,
        pace: "1",
        c: kind === "bath" ? "(1+eta)/(2*m)" : "0",
        ranges: {
          ...common.ranges,
          rho: kind === "empty-negative" ? [0.3, 0.6] : [-0.9, -0.3],
          m: kind === "empty-negative" ? [-1.2, -0.6] : [0.6, 1.2],
        },
      })
    ),
    audit(name, dilaton),
  ];
}
