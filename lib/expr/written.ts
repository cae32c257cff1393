/**
 * A text as it is written: names stay names, and a derivative `d(e, x)` stays one, as a name node that reads
 * `d(e, x)`. For printing, typesetting and changing claims without working them out.
 *
 * @module
 */
import { parse } from "./parse.ts";
import { print } from "./print.ts";
import { type Expr, sym } from "./tree.ts";

/**
 * Reads a text without taking its derivatives.
 *
 * @param text In the grammar of expressions with `d(e, x, ...)`.
 * @throws {SyntaxError} if the text is not an expression.
 */
export function written(text: string): Expr {
  return parse(text, (e, by) => sym(`d(${[print(e), ...by].join(", ")})`));
}

/** What a name node of {@linkcode written} differentiates and by what; undefined for a plain name. */
export function derivativeOf(name: string): { inner: string; by: readonly string[] } | undefined {
  if (!name.startsWith("d(")) return undefined;
  const by: string[] = [];
  let inner = name.slice(2, -1);
  for (let m; (m = /^(.*), (\w+)$/s.exec(inner)) && balanced(m[1]!);) {
    inner = m[1]!;
    by.unshift(m[2]!);
  }
  return { inner, by };
}

function balanced(text: string): boolean {
  let depth = 0;
  for (const c of text) depth += c === "(" ? 1 : c === ")" ? -1 : 0;
  return depth === 0;
}
