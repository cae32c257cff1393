import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { uniform } from "../../lib/expr/points.ts";
import { print } from "../../lib/expr/print.ts";
import * as t from "../../lib/expr/tree.ts";
import { randomTree } from "./random_tree.ts";

const plain = (e: t.Expr) => JSON.stringify(e, (_, v) => typeof v === "bigint" ? String(v) : v);

describe("print", () => {
  it("gives back the same tree through parse, for 2000 random trees", () => {
    const draw = uniform(11);
    for (let i = 0; i < 2000; i++) {
      const e = randomTree(draw, 5), text = print(e);
      expect(plain(parse(text)), text).toBe(plain(e));
    }
  });

  it("brackets negative exponents and negative factors", () => {
    expect(print(parse("y^(-2)*z"))).toBe("y^(-2)*z");
    expect(print(t.mul(t.sym("x"), t.num(-2)))).toBe("x*(-2)");
  });
});
