/**
 * Writes an expression tree as text of the one grammar; `parse(print(e))` is `e` again for every tree
 * made by the builders. Negative numbers and exponents stand in brackets, so that other readers of
 * mathematical text (in which `x^-2*y` may mean x^(-2*y)) cannot misread the result.
 *
 * @module
 */
import type { Expr } from "./tree.ts";

const SUM = 1, PRODUCT = 2, POWER = 3, ATOM = 4;

function level(e: Expr): number {
  switch (e.kind) {
    case "add":
    case "sub":
    case "neg":
      return SUM;
    case "mul":
    case "div":
      return PRODUCT;
    case "pow":
      return POWER;
    case "num":
      return e.p < 0n ? SUM : e.q === 1n ? ATOM : PRODUCT;
    default:
      return ATOM;
  }
}

/**
 * The text of `e`.
 *
 * @param e An expression.
 * @returns Plain mathematical notation in the grammar of `parse`.
 * @example A negative exponent is bracketed
 * ```ts
 * import { parse, print } from "@backstamp/backstamp";
 * if (print(parse("y^(-2)*z")) !== "y^(-2)*z") throw new Error("not bracketed");
 * ```
 */
export function print(e: Expr): string {
  const at = (x: Expr, least: number): string => level(x) < least ? `(${print(x)})` : print(x);
  switch (e.kind) {
    case "num":
      return e.q === 1n ? String(e.p) : `${e.p}/${e.q}`;
    case "sym":
      return e.name;
    case "neg":
      return `-${at(e.a, PRODUCT)}`;
    case "add":
      return `${print(e.a)} + ${at(e.b, PRODUCT)}`;
    case "sub":
      return `${print(e.a)} - ${at(e.b, PRODUCT)}`;
    case "mul":
      return `${at(e.a, PRODUCT)}*${at(e.b, POWER)}`;
    case "div":
      return `${at(e.a, PRODUCT)}/${at(e.b, POWER)}`;
    case "pow":
      return `${at(e.a, ATOM)}^${at(e.b, ATOM)}`;
    case "call":
      return `${e.fn}(${print(e.a)})`;
  }
}
