/**
 * A ledger as an appendix for LaTeX: a fragment for `\input`, and a document around it that compiles as it is.
 *
 * @module
 */
import { tex, texName } from "../expr/tex.ts";
import type { Convention } from "./conventions.ts";
import type { DerivedEquation, Ledger, LedgerPart, LedgerStep } from "./ledger.ts";
import { escapeTex } from "./tex_text.ts";

const math = (text: string) => `$\\displaystyle ${text}$`;

function verdictText(step: LedgerStep): string {
  const { evidence: e } = step;
  const points = `${e.points} points, ${e.digits} digits, seed ${e.seed}`;
  switch (step.verdict) {
    case "proved":
      return `\\textbf{Proved} (${
        escapeTex(step.algorithm)
      }; residual ${e.residual} at ${points}).`;
    case "holds-numerically":
      return `\\textbf{Holds numerically} (residual ${e.residual} at ${points}; algebra undecided).`;
    case "refuted":
      return `\\textbf{Refuted}: at ${point(e.at!)} the left side is ${math(number(e.left!))}, ` +
        `the right side ${math(number(e.right!))}.`;
    case "undecided":
      return `\\textbf{Undecided}: ${escapeTex(step.why)}.`;
  }
}

function number(text: string): string {
  const [mantissa, exponent] = text.split("e");
  return exponent === undefined ? mantissa! : `${mantissa}\\cdot 10^{${Number(exponent)}}`;
}

const point = (at: Readonly<Record<string, string>>) =>
  Object.entries(at).map(([name, value]) => `$${tex(name)} = ${number(value)}$`).join(", ");

function stepTex(step: LedgerStep, home: string): string {
  const relation = step.up_to_factor ? "\\propto" : "=";
  const modes = [
    ...(step.on_shell ? ["on shell"] : []),
    ...(step.convention === home ? [] : [`convention ${escapeTex(step.convention)}`]),
  ];
  return [
    `\\item \\textsf{${escapeTex(step.id)}}${modes.length ? ` (${modes.join(", ")})` : ""}: ` +
    `${escapeTex(step.statement)}${step.source ? ` [${escapeTex(step.source)}]` : ""}.\\\\*`,
    `${math(`${tex(step.left)} ${relation} ${tex(step.right)}`)}\\\\*`,
    verdictText(step) +
    (step.factor ? ` Factor: ${math(tex(step.factor))}.` : "") +
    (step.repair ? ` Repair: \\texttt{${escapeTex(step.repair)}}.` : ""),
  ].join("\n");
}

function derivedTex({ name, statement, expression }: DerivedEquation): string {
  return `\\item ${escapeTex(statement)}: ` +
    math(`${texName(name)} = ${tex(expression)} = 0`);
}

function partTex(part: LedgerPart, home: string): string {
  const derived = part.derived.length === 0 ? [] : [
    "Derived equations:",
    "\\begin{itemize}",
    ...part.derived.map(derivedTex),
    "\\end{itemize}",
  ];
  return [
    `\\subsection*{${escapeTex(part.title)}}`,
    ...derived,
    "\\begin{enumerate}",
    ...part.steps.map((step) => stepTex(step, home)),
    "\\end{enumerate}",
    `Derivatives that two differentiators agree on: ${part.derivatives}.`,
  ].join("\n");
}

function conventionsTex(list: readonly Convention[]): string {
  const flat = (text: string) => `$${text.replaceAll("*", "\\,").replaceAll("pi", "\\pi ")}$`;
  const row = (c: Convention) =>
    [
      escapeTex(c.name),
      ...[c.kappa, c.prefactor, c.curvature, c.mass, c.flux].map(flat),
    ].join(" & ");
  return [
    "\\begin{center}",
    "\\begin{tabular}{lccccc}",
    "\\hline",
    "convention & $\\kappa$ & prefactor & $R$ on a sphere & mass & flux \\\\",
    "\\hline",
    ...list.map((c) => `${row(c)} \\\\`),
    "\\hline",
    "\\end{tabular}",
    "\\end{center}",
    ...(list.length > 1 ? ["Counterexamples and factors are given in the first convention."] : []),
  ].join("\n");
}

/**
 * The appendix as a fragment; needs amsmath.
 *
 * @param ledger A ledger.
 */
export function ledgerTex(ledger: Ledger): string {
  const { counts } = ledger, home = ledger.conventions[0]!.name;
  const versions = Object.entries(ledger.versions).map(([name, v]) => `${name} ${v}`).join(", ");
  const tally = `Proved: ${counts.proved}; holding numerically: ${counts["holds-numerically"]}; ` +
    `refuted: ${counts.refuted}; undecided: ${counts.undecided}.`;
  return [
    `\\section*{${escapeTex(ledger.title)}}`,
    "{\\raggedright\\sloppy",
    `${tally} Programs: ${escapeTex(versions)}.`,
    ...(ledger.input ? [`Claims file: SHA-256 {\\small\\texttt{${ledger.input}}}.`] : []),
    "",
    conventionsTex(ledger.conventions),
    ...ledger.parts.map((part) => partTex(part, home)),
    "\\par}",
    "",
  ].join("\n");
}

/**
 * A document around the fragment.
 *
 * @param fragment File name of the fragment.
 */
export function ledgerDocument(fragment: string): string {
  return [
    "\\documentclass[a4paper]{article}",
    "\\usepackage{amsmath}",
    "\\begin{document}",
    `\\input{${fragment}}`,
    "\\end{document}",
    "",
  ].join("\n");
}
