import { bignumber } from "mathjs";
import { describe, expect, it } from "vitest";
import { differentiate, type Discarded, simplify } from "../../lib/expr/algebra.ts";
import { parse } from "../../lib/expr/parse.ts";
import { uniform } from "../../lib/expr/points.ts";
import { print } from "../../lib/expr/print.ts";
import { CLASSES, expressions } from "./expressions.ts";
import { type Point, slope, value } from "./outside.ts";

/** More on demand: BACKSTAMP_FUZZ=2400. */
const COUNT = Number(Deno.env.get("BACKSTAMP_FUZZ") ?? 240);
const POINTS = 2;

/** Points that the library does not use: another seed and another range. */
function elsewhere(names: readonly string[], draw: () => number): Point {
  return Object.fromEntries(names.map((n) => [n, (0.4 + 1.5 * draw()).toFixed(12)]));
}

describe("random expressions", () => {
  it(
    `of ${CLASSES.length} classes, ${COUNT}: no derivative and no shorter form is wrong`,
    async () => {
      const next = expressions(20261201), draw = uniform(4242);
      const wrong: string[] = [], discarded: Discarded[] = [];
      let compared = 0, shorter = 0;
      for (let i = 0; i < COUNT; i++) {
        const { kind, text, names } = next(), e = parse(text);
        const name = names[Math.floor(draw() * names.length)]!;
        const d = print(await differentiate(e, name, { discarded }));
        const s = print(await simplify(e, { discarded }));
        if (s !== print(e)) shorter++;
        for (let k = 0; k < POINTS; k++) {
          const at = elsewhere(["x", "y", "a", "b", "c"], draw);
          const f = value(text, at);
          if (!f) continue;
          compared++;
          // step 1e-12 to the fourth leaves 1e-48 of the fifth derivative, rounding 1e-52 of f: 1e-30 of either
          // is far above both and far below a double's 1e-16
          const right = slope(text, name, at), left = value(d, at);
          const scale = bignumber(1).plus(f.abs()).plus(right?.abs() ?? 0);
          const differ = !right || !left || left.minus(right).abs().gt(scale.times("1e-30"));
          if (differ) wrong.push(`${kind}: d(${text})/d${name} = ${d}`);
          // 64 digits less what cancels between terms of these sizes
          const g = value(s, at);
          if (!g || g.minus(f).abs().gt(f.abs().plus(1).times("1e-40"))) {
            wrong.push(`${kind}: ${text} -> ${s}`);
          }
        }
      }
      const refused = Object.groupBy(
        discarded,
        ({ op, why }) => why.startsWith("not asked") ? "not asked" : op,
      );
      const count = (op: keyof typeof refused) => refused[op]?.length ?? 0;
      console.info({
        compared,
        shorter,
        refused: Object.entries(refused).map(([k, l]) => [k, l.length]),
      });
      expect(wrong).toEqual([]);
      expect(compared).toBe(POINTS * COUNT); // all classes are real on positive names
      expect(refused["normal form"] ?? []).toEqual([]); // our own is checked as well, and is right
      // something wrong was proposed and seen
      expect(count("diff") + count("expand") + count("simplify")).toBeGreaterThan(COUNT / 20);
    },
    COUNT * 2000,
  );
});
