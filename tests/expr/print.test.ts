import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { uniform } from "../../lib/expr/points.ts";
import { print } from "../../lib/expr/print.ts";
import * as t from "../../lib/expr/tree.ts";

function random(draw: () => number, depth: number): t.Expr {
  const pick = Math.floor(draw() * (depth > 0 ? 10 : 2));
  const sub = () => random(draw, depth - 1);
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

const plain = (e: t.Expr) => JSON.stringify(e, (_, v) => typeof v === "bigint" ? String(v) : v);

describe("print", () => {
  it("gives back the same tree through parse, for 2000 random trees", () => {
    const draw = uniform(11);
    for (let i = 0; i < 2000; i++) {
      const e = random(draw, 5), text = print(e);
      expect(plain(parse(text)), text).toBe(plain(e));
    }
  });

  it("brackets negative exponents and negative factors", () => {
    expect(print(parse("y^(-2)*z"))).toBe("y^(-2)*z");
    expect(print(t.mul(t.sym("x"), t.num(-2)))).toBe("x*(-2)");
  });
});
