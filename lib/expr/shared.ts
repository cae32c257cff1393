/**
 * Trees in which equal parts are one and the same node, so that whoever walks them with a memory does each part
 * once.
 *
 * @module
 */
import { type Expr, parts, rebuild } from "./tree.ts";

const done = new WeakMap<Expr, Expr>();

/**
 * The same tree with equal parts shared.
 *
 * @param e An expression.
 */
export function shared(e: Expr): Expr {
  const before = done.get(e);
  if (before) return before;
  const index = new Map<string, Expr>(),
    number = new Map<Expr, number>(),
    seen = new Map<Expr, Expr>();
  const walk = (x: Expr): Expr => {
    const known = seen.get(x);
    if (known) return known;
    const list = parts(x).map(walk);
    const own = x.kind === "num"
      ? `${x.p}/${x.q}`
      : x.kind === "sym"
      ? x.name
      : x.kind === "call"
      ? x.fn
      : "";
    const key = `${x.kind} ${own} ${list.map((part) => number.get(part)).join()}`;
    let out = index.get(key);
    if (!out) {
      const same = parts(x).every((part, i) => part === list[i]);
      let i = 0;
      out = same ? x : rebuild(x, () => list[i++]!);
      index.set(key, out);
      number.set(out, number.size);
    }
    seen.set(x, out);
    return out;
  };
  const out = walk(e);
  done.set(e, out);
  return out;
}
