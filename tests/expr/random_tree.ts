import * as t from "../../lib/expr/tree.ts";

/** A random tree over three names. */
export function randomTree(draw: () => number, depth: number): t.Expr {
  const pick = Math.floor(draw() * (depth > 0 ? 10 : 2));
  const sub = () => randomTree(draw, depth - 1);
  const n = () => t.num(Math.floor(draw() * 19) - 9, 1 + Math.floor(draw() * 7));
  switch (pick) {
    case 0:
      return n();
    case 1:
      return t.sym(["x", "phi", "kappa"][Math.floor(draw() * 3)]!);
    case 2:
      return t.neg(sub());
    case 3:
      return t.add(sub(), sub());
    case 4:
      return t.sub(sub(), sub());
    case 5:
    case 6:
      return t.mul(sub(), sub());
    case 7:
      return t.div(sub(), t.add(t.sym("x"), sub()));
    case 8:
      return t.pow(t.add(t.sym("x"), sub()), n());
    default:
      return t.call(t.FUNCTIONS[Math.floor(draw() * t.FUNCTIONS.length)]!, sub());
  }
}
