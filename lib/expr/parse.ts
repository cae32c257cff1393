/**
 * The one grammar of expressions (the same for catalogue models, solver forms and users' files):
 *
 * ```text
 * sum     = ["-"] product { ("+" | "-") product }
 * product = power { ("*" | "/") power }
 * power   = atom [ "^" exponent ]          exponent = atom | "-" is only allowed inside brackets
 * atom    = number | name | function "(" sum ")" | "(" sum ")"
 * number  = digits [ "." digits ] [ ("e" | "E") [sign] digits ]      read as an exact rational
 * d       = "d(" sum { "," name } ")"                                in audits: derivative of sum
 * name    = letter { letter | digit | "_" }                          ASCII only
 * ```
 *
 * `-x^2` is -(x^2). Limits are counted, never timed: length, depth, nodes, exponents.
 *
 * @module
 */
import {
  add,
  call,
  div,
  type Expr,
  type FunctionName,
  FUNCTIONS,
  mul,
  neg,
  num,
  pow,
  sub,
  sym,
} from "./tree.ts";

/** Counted limits of one expression text. */
export const LIMITS = {
  /** characters of one expression */
  length: 65_536,
  /** brackets within brackets */
  depth: 100,
  /** nodes of the tree */
  nodes: 5_000,
  /** magnitude of an exact exponent */
  exponent: 64n,
  /** names in one derivative */
  derivatives: 8,
  /** digits of a literal, and the magnitude of its decimal exponent */
  digits: 400,
  /** magnitude of numerator and denominator of an exact constant, also of a folded one */
  constant: 10n ** 1000n,
} as const;

const FORBIDDEN = new Set(["constructor", "prototype", "toString", "valueOf", "hasOwnProperty"]);

interface Token {
  readonly text: string;
  readonly at: number;
  readonly kind: "number" | "name" | "mark";
}

function fail(text: string, at: number, must: string, got: string): never {
  const shown = text.length > 60 ? `${text.slice(0, 57)}...` : text;
  throw new SyntaxError(
    `Cannot read the expression "${shown}" at character ${
      at + 1
    } as ${must}: current text is ${got}`,
  );
}

/** Takes the derivative of an expression with respect to names, one after the other. */
export type Derivation = (e: Expr, names: readonly string[]) => Expr;

function tokens(text: string, commas: boolean): Token[] {
  const out: Token[] = [];
  const number = "(\\d+(?:\\.\\d+)?(?:[eE][+-]?\\d+)?)", name = "([A-Za-z][A-Za-z0-9_]*)";
  const pattern = new RegExp(`\\s+|${number}|${name}|([-+*/^()${commas ? "," : ""}])`, "y");
  while (pattern.lastIndex < text.length) {
    const at = pattern.lastIndex;
    const m = pattern.exec(text);
    if (!m) {
      fail(
        text,
        at,
        "only numbers, names, + - * / ^ and brackets are allowed",
        JSON.stringify(text[at]),
      );
    }
    if (m[1] !== undefined) out.push({ text: m[1], at, kind: "number" });
    else if (m[2] !== undefined) out.push({ text: m[2], at, kind: "name" });
    else if (m[3] !== undefined) out.push({ text: m[3], at, kind: "mark" });
  }
  return out;
}

function literal(text: string, t: Token): Expr {
  const [mantissa, exponent = "0"] = t.text.split(/[eE]/) as [string, string?];
  const [whole, fraction = ""] = mantissa.split(".") as [string, string?];
  const shift = Number(exponent) - fraction.length;
  if (whole.length + fraction.length > LIMITS.digits || Math.abs(shift) > LIMITS.digits) {
    fail(text, t.at, `a number may have at most ${LIMITS.digits} digits`, t.text.slice(0, 20));
  }
  const p = BigInt(whole + fraction);
  return shift >= 0 ? num(p * 10n ** BigInt(shift)) : num(p, 10n ** BigInt(-shift));
}

/**
 * Reads one expression.
 *
 * @param text Plain mathematical notation, see the grammar of this module.
 * @param derivation What `d(sum, name, ...)` means; without it there are no derivatives in the text.
 * @returns The tree; exact constants are folded, nothing else is changed.
 * @throws {SyntaxError} if the text is not an expression or passes a limit; the message has the character.
 * @example Powers bind tighter than a sign
 * ```ts
 * import { isNum, parse } from "@backstamp/backstamp";
 * if (!isNum(parse("-2^2 + 8/2"), 0)) throw new Error("not zero");
 * ```
 */
export function parse(text: string, derivation?: Derivation): Expr {
  if (text.length > LIMITS.length) {
    fail(text, 0, `it may have at most ${LIMITS.length} characters`, `${text.length} characters`);
  }
  const list = tokens(text, derivation !== undefined);
  let i = 0, nodes = 0, depth = 0;
  const peek = () => list[i]?.text;
  const count = (e: Expr): Expr => {
    if (++nodes > LIMITS.nodes) fail(text, 0, `it may have at most ${LIMITS.nodes} nodes`, "more");
    const big = LIMITS.constant;
    if (e.kind === "num" && (e.p > big || e.p < -big || e.q > big)) {
      fail(text, 0, "an exact constant may have at most 1000 digits", "more");
    }
    return e;
  };
  const expect = (mark: string) => {
    const t = list[i];
    if (t?.text !== mark) {
      fail(text, t?.at ?? text.length, `"${mark}" must follow`, t ? `"${t.text}"` : "the end");
    }
    i++;
  };
  const sum = (): Expr => {
    if (++depth > LIMITS.depth) {
      fail(text, list[i]?.at ?? 0, `brackets may nest at most ${LIMITS.depth} deep`, "deeper");
    }
    let left: Expr;
    if (peek() === "-") {
      i++;
      left = count(neg(product()));
    } else left = product();
    for (let t = peek(); t === "+" || t === "-"; t = peek()) {
      i++;
      const right = product();
      left = count(t === "+" ? add(left, right) : sub(left, right));
    }
    depth--;
    return left;
  };
  const product = (): Expr => {
    let left = power();
    for (let t = peek(); t === "*" || t === "/"; t = peek()) {
      const at = list[i++]!.at;
      const right = power();
      if (t === "/" && right.kind === "num" && right.p === 0n) {
        fail(text, at, "a divisor must not be 0", "0");
      }
      left = count(t === "*" ? mul(left, right) : div(left, right));
    }
    return left;
  };
  const power = (): Expr => {
    const base = atom();
    if (peek() !== "^") return base;
    const at = list[i++]!.at;
    const exponent = atom();
    if (peek() === "^") fail(text, list[i]!.at, "a power of a power needs brackets", '"^"');
    if (exponent.kind === "num") {
      const { p, q } = exponent;
      if (p > LIMITS.exponent * q || p < -LIMITS.exponent * q || q > LIMITS.exponent) {
        fail(
          text,
          at,
          `an exponent must lie within ${LIMITS.exponent} and have a denominator up to that`,
          `${p}/${q}`,
        );
      }
      if (base.kind === "num" && base.p === 0n && p < 0n) {
        fail(text, at, "0 has no negative power", "0");
      }
    }
    return count(pow(base, exponent));
  };
  const atom = (): Expr => {
    const t = list[i++];
    if (!t) fail(text, text.length, "a number, a name or a bracket must follow", "the end");
    if (t.kind === "number") return count(literal(text, t));
    if (t.text === "(") {
      const inner = sum();
      expect(")");
      return inner;
    }
    if (t.kind !== "name") {
      fail(text, t.at, "a number, a name or a bracket must follow", `"${t.text}"`);
    }
    if ((FUNCTIONS as readonly string[]).includes(t.text)) {
      expect("(");
      const inner = sum();
      expect(")");
      return count(call(t.text as FunctionName, inner));
    }
    if (derivation && t.text === "d" && peek() === "(") return derivative(derivation);
    if (FORBIDDEN.has(t.text)) fail(text, t.at, "this word is reserved", t.text);
    if (peek() === "(") {
      fail(text, t.at, `a function must be one of ${FUNCTIONS.join(", ")}`, t.text);
    }
    return count(sym(t.text));
  };
  const derivative = (take: Derivation): Expr => {
    expect("(");
    const inner = sum(), by: string[] = [];
    for (expect(","); by.length < LIMITS.derivatives; i++) {
      const t = list[i++];
      if (t?.kind !== "name") {
        fail(text, t?.at ?? text.length, "a name must follow", t ? `"${t.text}"` : "the end");
      }
      by.push(t.text);
      if (peek() !== ",") break;
    }
    expect(")");
    return count(take(inner, by));
  };
  const out = sum();
  const rest = list[i];
  if (rest) fail(text, rest.at, "the expression must end here", `"${rest.text}"`);
  return out;
}
