/**
 * Typesets expressions for LaTeX (amsmath): Greek letters by their names, fractions and roots, derivatives
 * as partial derivatives.
 *
 * @module
 */
import type { Expr } from "./tree.ts";
import { derivativeOf, written } from "./written.ts";

const SUM = 1, PRODUCT = 2, POWER = 3, ATOM = 4;

const GREEK = new Set(
  ("alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi pi rho sigma tau upsilon phi " +
    "chi psi omega Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega ell hbar").split(" "),
);
const SIGNS: Readonly<Record<string, string>> = { pp: "++", mm: "--", pm: "+-", p: "+", m: "-" };
const COORDINATE: Readonly<Record<string, string>> = { xp: "x^{+}", xm: "x^{-}" };

function letters(part: string): string {
  if (GREEK.has(part)) return `\\${part}`;
  const [, base, digits] = /^([A-Za-z]+?)(\d+)$/.exec(part) ?? [];
  if (base) return `${letters(base)}_{${digits}}`;
  return /^[A-Za-z]$|^\d+$/.test(part) ? part : `\\mathrm{${part}}`;
}

/**
 * A name as TeX: Greek where it spells a Greek letter, what follows an underscore as an index.
 *
 * @param name A name of the grammar.
 * @example Greek with an index
 * ```ts
 * import { texName } from "@backstamp/backstamp";
 * if (texName("kappa_eff") !== "\\kappa_{\\mathrm{eff}}") throw new Error(texName("kappa_eff"));
 * ```
 */
export function texName(name: string): string {
  if (Object.hasOwn(COORDINATE, name)) return COORDINATE[name]!;
  const component = /^([A-Z])(pp|mm|pm)$/.exec(name);
  if (component) return `${component[1]}_{${SIGNS[component[2]!]}}`;
  const [base, ...rest] = name.split("_").filter((part) => part !== "") as [string, ...string[]];
  const indices = rest.map((part) =>
    ["pp", "mm", "pm"].includes(part) ? SIGNS[part] : letters(part)
  );
  const head = letters(base);
  if (indices.length === 0) return head;
  return head.includes("_{")
    ? `{${head}}_{${indices.join(",")}}`
    : `${head}_{${indices.join(",")}}`;
}

function partial(by: readonly string[]): string {
  let out = "";
  for (let i = 0, n = 1; i < by.length; i += n) {
    for (n = 1; by[i + n] === by[i];) n++;
    const index = by[i] === "xp" ? "+" : by[i] === "xm" ? "-" : texName(by[i]!);
    out += `\\partial_{${index}}${n > 1 ? `^{${n}}` : ""}`;
  }
  return out;
}

function nameTex(name: string): string {
  const d = derivativeOf(name);
  if (!d) return texName(name);
  const inner = written(d.inner);
  const shown = inner.kind === "sym" && !derivativeOf(inner.name)
    ? texName(inner.name)
    : brackets(texTree(inner));
  return `${partial(d.by)}${shown.startsWith("\\") || shown.startsWith("(") ? "" : " "}${shown}`;
}

const brackets = (tex: string) =>
  /\\frac|\\sqrt|\^\{/.test(tex) ? `\\left(${tex}\\right)` : `(${tex})`;

function level(e: Expr): number {
  switch (e.kind) {
    case "add":
    case "sub":
    case "neg":
      return SUM;
    case "mul":
      return PRODUCT;
    case "div":
      return POWER; // a fraction needs no brackets in a product, but does under an exponent
    case "pow":
      return POWER;
    case "num":
      return e.p < 0n ? SUM : e.q === 1n ? ATOM : POWER;
    case "sym":
      return derivativeOf(e.name) || COORDINATE[e.name] ? POWER : ATOM;
    case "call":
      return e.fn === "sqrt" ? ATOM : e.fn === "sqrt1pm1" || e.fn === "expm1" ? SUM : POWER;
  }
}

/** What joins two factors: digits that would run together get a dot. */
function times(left: string, right: string): string {
  if (/^[\d]/.test(right)) return `${left} \\cdot ${right}`;
  return `${left}\\,${right}`;
}

function texTree(e: Expr): string {
  const at = (x: Expr, least: number) => level(x) < least ? brackets(texTree(x)) : texTree(x);
  switch (e.kind) {
    case "num": {
      const p = e.p < 0n ? -e.p : e.p, sign = e.p < 0n ? "-" : "";
      return e.q === 1n ? `${sign}${p}` : `${sign}\\frac{${p}}{${e.q}}`;
    }
    case "sym":
      return nameTex(e.name);
    case "neg":
      return `-${at(e.a, PRODUCT)}`;
    case "add":
      return `${texTree(e.a)} + ${at(e.b, PRODUCT)}`;
    case "sub":
      return `${texTree(e.a)} - ${at(e.b, PRODUCT)}`;
    case "mul":
      return times(at(e.a, PRODUCT), at(e.b, PRODUCT));
    case "div":
      return `\\frac{${texTree(e.a)}}{${texTree(e.b)}}`;
    case "pow":
      return `${at(e.a, ATOM)}^{${texTree(e.b)}}`;
    case "call":
      switch (e.fn) {
        case "exp":
          return `e^{${texTree(e.a)}}`;
        case "expm1":
          return `e^{${texTree(e.a)}} - 1`;
        case "sqrt":
          return `\\sqrt{${texTree(e.a)}}`;
        case "sqrt1pm1":
          return `\\sqrt{1 + ${at(e.a, PRODUCT)}} - 1`;
        case "log":
          return `\\log${brackets(texTree(e.a))}`;
        case "log1p":
          return `\\log${brackets(`1 + ${at(e.a, PRODUCT)}`)}`;
      }
  }
}

/**
 * An expression as TeX, in its author's form.
 *
 * @param e A tree, or a text in the grammar of expressions; in a text `d(e, x)` is a derivative and is kept.
 * @returns TeX for math mode; needs amsmath.
 * @throws {SyntaxError} if a text is not an expression.
 * @example A field equation
 * ```ts
 * import { tex } from "@backstamp/backstamp";
 * const text = tex("exp(2*rho)*V - kappa*d(rho, sigma, sigma)");
 * if (text !== "e^{2\\,\\rho}\\,V - \\kappa\\,\\partial_{\\sigma}^{2}\\rho") throw new Error(text);
 * ```
 */
export function tex(e: Expr | string): string {
  return texTree(typeof e === "string" ? written(e) : e);
}
