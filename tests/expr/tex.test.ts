import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import process from "node:process";
import temml from "temml";
import { describe, expect, it } from "vitest";
import { escapeTex } from "../../lib/audit/tex_text.ts";
import { ledgerDocument, ledgerTex } from "../../lib/audit/ledger_tex.ts";
import { runClaims } from "../../lib/audit/run_claims.ts";
import { tex, texName } from "../../lib/expr/tex.ts";
import { randomTree } from "./random_tree.ts";
import { uniform } from "../../lib/expr/points.ts";

function found(): boolean {
  try {
    execFileSync("pdflatex", ["--version"], { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
}
// absent on a user's machine: skipped by name; in CI its absence is a failure
const withLatex = it.runIf(found() || process.env.CI === "true");

/** Runs pdflatex over files until the first error. */
function compile(files: Readonly<Record<string, string>>, main: string): string {
  const folder = mkdtempSync(join(tmpdir(), "tex-"));
  try {
    for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text);
    const options = ["-interaction=nonstopmode", "-halt-on-error", main];
    return execFileSync("pdflatex", options, { cwd: folder, encoding: "latin1", stdio: "pipe" });
  } catch (error) {
    return `FAILED ${(error as { stdout?: string }).stdout ?? error}`;
  } finally {
    rmSync(folder, { recursive: true });
  }
}

describe("tex", () => {
  it.each([
    ["-2*M/r", "-\\frac{2\\,M}{r}"],
    ["exp(-2*phi)*(a+b)^2", "e^{-2\\,\\phi}\\,(a + b)^{2}"],
    ["2*3^(1/2)", "2 \\cdot 3^{\\frac{1}{2}}"],
    ["(x/y)^2", "\\left(\\frac{x}{y}\\right)^{2}"],
    ["log1p(x)-expm1(y)", "\\log(1 + x) - \\left(e^{y} - 1\\right)"],
    ["d(phi, sigma)^2", "(\\partial_{\\sigma}\\phi)^{2}"],
    ["d(rho, xp, xm, xm)", "\\partial_{+}\\partial_{-}^{2}\\rho"],
    ["d(r*d(r, x), x)", "\\partial_{x}(r\\,\\partial_{x} r)"],
    ["d(d(f(x)", undefined],
  ])("typesets %s", (text, right) => {
    if (right === undefined) expect(() => tex(text)).toThrow(SyntaxError);
    else expect(tex(text)).toBe(right);
  });

  it.each([
    ["kappa", "\\kappa"],
    ["Omega_0", "\\Omega_{0}"],
    ["phi1_2", "{\\phi_{1}}_{2}"],
    ["M_ADM", "M_{\\mathrm{ADM}}"],
    ["E_pp", "E_{++}"],
    ["Tpm", "T_{+-}"],
    ["xm", "x^{-}"],
    ["energy", "\\mathrm{energy}"],
  ])("writes the name %s as %s", (name, right) => {
    expect(texName(name)).toBe(right);
  });

  it("is TeX that a strict reader takes, for 500 random trees", () => {
    const draw = uniform(3);
    for (let i = 0; i < 500; i++) {
      const text = tex(randomTree(draw, 6));
      expect(() => temml.renderToString(text, { throwOnError: true }), text).not.toThrow();
    }
  });

  withLatex("compiles by pdflatex, for 300 random trees", () => {
    const draw = uniform(4);
    const lines = Array.from({ length: 300 }, () => `$${tex(randomTree(draw, 6))}$\n`);
    const document = `\\documentclass{article}\\usepackage{amsmath}\\begin{document}\n${
      lines.join("\n")
    }\\end{document}\n`;
    expect(compile({ "a.tex": document }, "a.tex")).toMatch(/Output written on a\.pdf/);
  });
});

const NASTY = "50% of $x_1 & #2^{~\\n} <κ> „ünï‟ ∂ ² 中 \u0007 \\input{/etc/passwd}";

describe("The appendix of a ledger", () => {
  it("escapes every sign that has a meaning", () => {
    expect(escapeTex("a_b^c%")).toBe("a\\_b\\^{}c\\%");
    expect(escapeTex("\\input{x}")).toBe("$\\backslash$input\\{x\\}");
    expect(escapeTex("κ中")).toBe("$\\kappa$\\texttt{U+4E2D}");
  });

  withLatex("compiles without edits, whatever the claims say", async () => {
    const claims = [
      {
        id: "a",
        statement: NASTY,
        left: "rho",
        right: "2*rho",
        source: NASTY,
        convention: "kappa-24",
      },
      { id: "b", statement: "s", left: "E_ell", right: "0", on_shell: true },
      { id: "c.1", statement: "s", left: "log(-q)", right: "0", up_to_factor: true },
      { id: "d", statement: "s", left: "exp(-2*rho)*E_rho", right: "E_rho", up_to_factor: true },
    ];
    const file = { title: NASTY, setting: "static", model: "swave", constants: ["q"], claims };
    const ledger = await runClaims(JSON.stringify(file));
    expect(Object.values(ledger.counts)).toEqual([9, 0, 1, 1]);
    const log = compile(
      { "ledger.tex": ledgerTex(ledger), "document.tex": ledgerDocument("ledger.tex") },
      "document.tex",
    );
    expect(log).toMatch(/Output written on document\.pdf/);
    expect(log).not.toMatch(/Missing character/);
  });
});
