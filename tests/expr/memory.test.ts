import { execFileSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import nerdamer from "nerdamer/all.js";
import { describe, expect, it } from "vitest";
import { parse } from "../../lib/expr/parse.ts";
import { neutral } from "../../lib/expr/precise.ts";
import { print } from "../../lib/expr/print.ts";
import { closeAlgebra, propose } from "../../lib/expr/proposer.ts";
import { type KnownWrong, knownWrong } from "./known_wrong.ts";

describe("the algebra worker", () => {
  it("keeps its heap flat over 10,000 derivatives", () => {
    const script = fileURLToPath(new URL("memory_run.ts", import.meta.url));
    const flags = ["run", "-A", "--v8-flags=--expose-gc", script];
    const { heaps: [warm, end], kept } = JSON.parse(
      execFileSync(Deno.execPath(), flags, { encoding: "utf8" }),
    );
    console.info({ warm, end, kept });
    // without emptying its history it keeps some 8 kB of each request, which this measure sees
    expect(kept).toBeGreaterThan(2000);
    // 8,000 requests; 1 MB is 130 bytes of each, for V8's own tables
    expect(end - warm).toBeLessThan(2 ** 20);
  }, 600_000); // milliseconds that a busy machine may take
});

// texts that would change what later requests mean
const SETTING = ["x:=5", "x^2,x)+(x:=5", "f(x):=x^2", "setVar(x,5)", "x=5", "x;setVar(x,5)"];

describe("state of the algebra system", () => {
  it("could be changed by a variable that is set", () => {
    nerdamer.setVar("x", "5");
    try {
      expect(nerdamer("diff(x^2,x)").toString()).toBe("0");
    } finally {
      nerdamer.clearVars();
    }
  });

  it.each(SETTING)("is not reached by %s, which cannot be read", (text) => {
    expect(() => parse(text)).toThrow("Cannot read");
  });

  it.each(SETTING)("is not changed by %s sent raw", async (text) => {
    await propose({ op: "diff", text, name: "x" });
    expect(await propose({ op: "diff", text: "x^2", name: "x" })).toEqual({ text: "2*x" });
    expect(await propose({ op: "expand", text: "(f+x)*x" })).toEqual({ text: "f*x+x^2" });
  });

  it("does not make answers depend on the order of requests", async () => {
    const entries = knownWrong().filter((_, i) => i % 3 === 0);
    const there = await answers(entries);
    closeAlgebra();
    const back = await answers(entries.toReversed());
    expect(entries.length).toBeGreaterThan(90);
    expect(back.toReversed()).toEqual(there);
  });
});

/** Raw answers, one after the other. */
async function answers(entries: readonly KnownWrong[]) {
  const out = [];
  for (const { op, input, variable } of entries) {
    const { tree, to } = neutral(parse(input));
    const name = variable === undefined ? {} : { name: to(variable) };
    out.push(await propose({ op, text: print(tree), ...name }));
  }
  return out;
}
