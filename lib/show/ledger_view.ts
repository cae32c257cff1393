/**
 * A ledger as an object that shows itself: derived equations, claims with verdicts and evidence.
 *
 * @module
 */
import { type Ledger, type LedgerPart, type LedgerStep, ledgerText } from "../audit/ledger.ts";
import { ledgerTex } from "../audit/ledger_tex.ts";
import { sha256 } from "../batch/stamp.ts";
import { tex, texName } from "../expr/tex.ts";
import { escapeXml, SHORT_STAMP } from "./figure.ts";
import { mathMl } from "./math.ts";
import { DISPLAY, type Displayable, displayable, limited } from "./notebook/display.ts";
import type { MimeBundle } from "./notebook/document.ts";

/** What speaks for a verdict, in one line. */
function evidenceText({ verdict, algorithm, evidence: e, why }: LedgerStep): string {
  if (verdict === "undecided") return why;
  if (verdict === "refuted") {
    const at = Object.entries(e.at!).map(([name, value]) =>
      `${name} = ${Number(value).toFixed(4)}`
    );
    return `left ${e.left}, right ${e.right} at ${at.join(", ")}`;
  }
  const how = algorithm ? `${algorithm}; ` : "";
  return `${how}residual ${e.residual} at ${e.points} points, ${e.digits} digits`;
}

/** What is claimed modulo the equations, up to a factor, in another convention. */
function modeText(step: LedgerStep, home: string): string {
  return [
    step.on_shell ? "on shell" : "",
    step.up_to_factor ? "up to a factor" : "",
    step.convention === home ? "" : step.convention,
  ].filter((text) => text !== "").join(", ");
}

const formula = (s: LedgerStep) =>
  mathMl(`${tex(s.left)} ${s.up_to_factor ? "\\propto" : "="} ${tex(s.right)}`);
const cell = (html: string) => `<td style="text-align:left">${html}</td>`;

function stepRow(s: LedgerStep, home: string): string {
  const note = s.repair ? `repair: ${s.repair}` : s.factor ? `factor: ${s.factor}` : "";
  const evidence = [evidenceText(s), note].filter((text) => text !== "").join("; ");
  return `<tr>${
    [
      escapeXml(s.id),
      escapeXml(s.statement),
      formula(s),
      escapeXml(modeText(s, home)),
      `<strong>${s.verdict}</strong>`,
      escapeXml(evidence),
    ].map(cell).join("")
  }</tr>`;
}

const HEAD = ["Claim", "Statement", "Equation", "Claimed", "Verdict", "Evidence"];

function stepsHtml({ title, steps }: LedgerPart, home: string): string {
  const head = HEAD.map((text) => `<th style="text-align:left">${text}</th>`).join("");
  return `<h4>${escapeXml(title)}</h4><table><thead><tr>${head}</tr></thead><tbody>` +
    `${steps.map((s) => stepRow(s, home)).join("")}</tbody></table>`;
}

function stepsText({ title, steps }: LedgerPart): string {
  const lines = steps.map((s) =>
    `${s.verdict.padEnd(17)}  ${s.id}: ${s.left} = ${s.right}` +
    `${s.repair ? `; repair: ${s.repair}` : ""}`
  );
  return [title, ...lines].join("\n");
}

/** A judged audit; shows itself as a table of claims in a notebook. */
export class LedgerView implements Displayable {
  /** The ledger, plain data. */
  readonly ledger: Ledger;

  /**
   * A view of a ledger.
   *
   * @param ledger The ledger, plain data.
   */
  constructor(ledger: Ledger) {
    this.ledger = ledger;
  }

  /** SHA-256 of the text of the ledger. */
  get stamp(): string {
    return sha256(ledgerText(this.ledger));
  }

  /** The appendix in LaTeX, a fragment for `\input`. */
  tex(): string {
    return ledgerTex(this.ledger);
  }

  /**
   * The equations that were derived from the action.
   *
   * @returns a list that shows itself as formulas
   */
  derived(): Displayable {
    const parts = this.ledger.parts.filter((part) => part.derived.length > 0);
    const html = parts.map(({ title, derived }) =>
      `<h4>${escapeXml(title)}</h4>` +
      derived.map(({ name, statement, expression }) =>
        `<p>${escapeXml(statement)}: ${mathMl(`${texName(name)} = ${tex(expression)} = 0`)}</p>`
      ).join("")
    );
    const plain = parts.flatMap(({ title, derived }) => [
      title,
      ...derived.map(({ name, expression }) => `${name} = ${expression} = 0`),
    ]);
    return displayable({ "text/html": html.join("\n"), "text/plain": plain.join("\n") });
  }

  /** The claims, part by part, and the tally. */
  [DISPLAY](): MimeBundle {
    const { parts, counts, conventions } = this.ledger, home = conventions[0]!.name;
    const tally = Object.entries(counts).map(([name, n]) => `${name}: ${n}`).join(", ");
    const foot = `${tally}; ledger ${this.stamp.slice(0, SHORT_STAMP)}`;
    return limited({
      "text/html": `${parts.map((part) => stepsHtml(part, home)).join("\n")}<p>${foot}</p>`,
      "text/plain": [...parts.map(stepsText), foot].join("\n\n"),
    });
  }
}
