/**
 * Audits of the solver's own equations: each form that the integrator uses, read from the same text, must
 * solve (1), (2) and (C) of its model's action.
 *
 * @module
 */
import { parse } from "../../expr/parse.ts";
import { print } from "../../expr/print.ts";
import { type Expr, substitute, sym } from "../../expr/tree.ts";
import type { CATALOGUE } from "../../model/catalogue/mod.ts";
import type { Audit } from "../audit.ts";
import type { Claim } from "../claim.ts";
import { Jets } from "../jets.ts";
import type { Rule } from "../shell.ts";
import { type Form, formsOf } from "./forms.ts";
import { functionsAt, threeEquations } from "./solutions.ts";

/** Lines of a form with every earlier line put in, and the rules for the unknowns' derivatives. */
function unfold({ system, known }: Form): { lines: Record<string, Expr>; rules: Rule[] } {
  const lines: Record<string, Expr> = { ...known };
  for (const [name, text] of system.let) lines[name] = substitute(parse(text), lines);
  const rules = Object.entries(system.derivative)
    .filter(([name]) => system.unknowns.includes(name))
    .map(([name, text]) => ({
      name: `d(${name}, ${system.independent})`,
      by: substitute(parse(text), lines),
    }));
  return { lines, rules };
}

/** The unknowns come back from the names of the chart: nothing is left out by using these. */
function chartClaims({ chart }: Form): Claim[] {
  if (!chart) return [];
  const there = Object.fromEntries(
    Object.entries(chart.names).map(([name, text]) => [name, parse(text)]),
  );
  return Object.entries(chart.unknowns).map(([name, text]) => {
    const logarithm = text.includes("log("); // exp is one to one: without it the claim is rational
    const side = (e: string) => logarithm ? `exp(2*(${e}))` : e;
    return {
      id: `chart-${name}`,
      statement: `${name} comes back from the names in which the form is rational`,
      left: side(name),
      right: side(print(substitute(parse(text), there))),
      source: "own derivation",
    };
  });
}

function audit(model: string, form: Form): Audit {
  const { system, chart } = form, x = system.independent;
  const jets = new Jets({ coordinates: [x], fields: system.unknowns });
  const { lines, rules } = unfold(form);
  const phi = lines["phi"] ?? sym("phi"), rho = lines["rho"] ?? sym("rho");
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
      rules: [
        ...rules,
        ...Object.entries(chart?.unknowns ?? {}).map(([name, text]) => ({
          name,
          by: substitute(parse(text), form.known),
        })),
      ],
      ranges: form.ranges,
    },
    claims: [
      ...threeEquations((e) => `(d(${e},${x})/pace)`, form.c, `lib/model/form, ${form.title}`),
      ...chartClaims(form),
    ],
  };
}

/** Audits of all forms in which the solver integrates one catalogue model. */
export function solverAudits(name: keyof typeof CATALOGUE): Audit[] {
  return formsOf(name).map((form) => audit(name, form));
}
