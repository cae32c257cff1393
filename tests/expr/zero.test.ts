import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { normalIsZero } from "../../lib/expr/normal.ts";
import { parse } from "../../lib/expr/parse.ts";
import { decideZero, type ZeroDecision } from "../../lib/expr/zero.ts";

interface Entry {
  readonly class: string;
  /** How SymPy rearranged `left` into `right`. */
  readonly how: string;
  /** What was changed in `left` to give `near`. */
  readonly change: string;
  readonly left: string;
  readonly right: string;
  readonly near: string;
}

// made by zeros.py beside it: rearranged by SymPy, zero and non-zero confirmed by mpmath
const file = new URL("../reference/zeros.json", import.meta.url);
const entries: Entry[] = JSON.parse(readFileSync(file, "utf8")).entries;

/** Milliseconds that a busy machine may take. */
const SLOW = 600_000;

const decide = (a: string, b: string) => decideZero(parse(`(${a})-(${b})`));

function tally(list: readonly ZeroDecision[], key: (d: ZeroDecision) => string) {
  const out: Record<string, number> = {};
  for (const d of list) out[key(d)] = (out[key(d)] ?? 0) + 1;
  return out;
}

describe("decideZero", () => {
  it("has 390 zeros of 8 classes and as many changes, 1e-24 among them", () => {
    expect(entries).toHaveLength(390);
    expect(new Set(entries.map((e) => e.class)).size).toBe(8);
    const changes = new Set(entries.map((e) => e.change));
    for (const change of ["1/997", "sign", "exponent", "1e-12", "1e-24"]) {
      expect(changes).toContain(change);
    }
  });

  it("calls all 390 rearranged expressions zero", async () => {
    const found: ZeroDecision[] = [], missed: string[] = [];
    for (const e of entries) {
      const d = await decide(e.left, e.right);
      found.push(d);
      if (d.verdict !== "proved" && d.verdict !== "holds-numerically") {
        missed.push(`${d.verdict}: ${e.how} of ${e.left}`);
      }
    }
    console.info(tally(found, (d) => d.verdict), tally(found, (d) => d.algorithm));
    expect(missed).toEqual([]);
  }, SLOW);

  it("calls none of the 390 changed ones zero, and gives a point", async () => {
    const wrong: string[] = [];
    for (const e of entries) {
      const { verdict, witness } = await decide(e.near, e.right);
      expect(normalIsZero(parse(`(${e.near})-(${e.right})`)), e.near).not.toBe(true);
      if (verdict !== "nonzero" || !witness.at) wrong.push(`${verdict}: ${e.change} in ${e.near}`);
    }
    expect(wrong).toEqual([]);
  }, SLOW);

  // true on positive names, out of reach of the normal form
  it.each([
    "sqrt(3+2*sqrt(2))-1-sqrt(2)",
    "log(x+sqrt(x^2+1))+log(sqrt(x^2+1)-x)",
    "sqrt(x^2+2*x*y+y^2)-x-y",
    "(x+2*sqrt(x)+1)^(1/2)-sqrt(x)-1",
  ])("calls %s zero by numbers or by proof", async (text) => {
    expect((await decideZero(parse(text))).verdict).toMatch(/^(holds-numerically|proved)$/);
  });

  // exponents whose ratio to 1 is no double
  it.each([
    "exp((1+1e-24)*y)-exp(y)",
    "exp((1+1e-24)*log(x))-x",
    "exp((4+1e-20)*y)/exp(4*y)-1",
    "exp((1/3+1e-19)*x)^3-exp(x)",
  ])("does not call %s zero", async (text) => {
    expect(normalIsZero(parse(text))).toBe(false);
    expect((await decideZero(parse(text))).verdict).toBe("nonzero");
  });
});
