import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { command } from "./command.ts";

const FOLDER = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(FOLDER, { recursive: true }));

const path = (name: string) => join(FOLDER, name);
const write = (name: string, text: string) => {
  Deno.writeTextFileSync(path(name), text);
  return path(name);
};
const file = (claims: string) => `title: t\nsetting: free\nconstants: [x]\nclaims:\n${claims}`;
const claim = (id: string, left: string, right: string) =>
  `  - {id: ${id}, statement: s, left: "${left}", right: "${right}"}\n`;
const audit = (name: string, ...more: string[]) =>
  command("audit", path(name), "--out", path("out"), ...more);

write("right.yaml", file(claim("a", "(x+1)^2", "x^2+2*x+1")));
write("wrong.yaml", file(claim("a", "x", "x") + claim("b", "x", "2*x")));
write("open.yaml", file(claim("a", "log(-x)", "0")));
write("bad.yaml", file(claim("a", "x +", "y")));
write(
  "right.json",
  JSON.stringify({
    title: "t",
    setting: "free",
    claims: [{ id: "a", statement: "s", left: 1, right: "2/2" }],
  }),
);

describe("deno task audit", () => {
  it("writes a ledger, its appendix and times beside it, the same bytes each time", async () => {
    const { code, text } = await audit("right.yaml");
    expect(code, text).toBe(0);
    expect(text).toContain("proved            a: s");
    const ledger = Deno.readTextFileSync(path("out/ledger.json"));
    expect(JSON.parse(ledger).counts.proved).toBe(1);
    expect(JSON.parse(ledger).versions.nerdamer).toMatch(/^\d+\.\d+\.\d+$/);
    for (const name of ["ledger.tex", "ledger-document.tex", "times.json"]) {
      expect(Deno.statSync(path(`out/${name}`)).size).toBeGreaterThan(0);
    }
    await audit("right.yaml");
    expect(Deno.readTextFileSync(path("out/ledger.json"))).toBe(ledger);
  });

  it.each([
    ["right.json", [], 0],
    ["wrong.yaml", [], 1],
    ["open.yaml", [], 0],
    ["open.yaml", ["--strict"], 1],
    ["bad.yaml", [], 2],
    ["none.yaml", [], 2],
  ])("judges %s %s with exit status %i", async (name, options, status) => {
    const { code, text } = await audit(name, ...options);
    expect(code, text).toBe(status);
  });

  it("shows a counterexample and the repair", async () => {
    const { text } = await audit("wrong.yaml");
    expect(text).toMatch(/refuted +b: s\n +repair: left side = \(1\/2\) \* right side\n +at x = /);
  });

  it("names every fault with its place", async () => {
    const { text } = await audit("bad.yaml");
    expect(text).toContain("claims.0.left, line 5, column 33: Cannot read the expression");
    expect(text).toContain("claims.0.right, line 5, column 47: Cannot use the name y");
  });

  it("judges the ready audits of one model", async () => {
    const { code, text } = await command("audit", "--model", "jt", "--out", path("jt"));
    expect(code, text).toBe(0);
    expect(text).toMatch(/refuted: 0, undecided: 0\n/);
  });

  it.each([
    [["--model", "nothing"], "its name must be one of cghs"],
    [["a.yaml", "b.yaml"], "one claims file must be named"],
    [["a.yaml", "--model", "rst"], "the file names its model"],
    [["--seed", "-1"], "--seed"],
    [["--workers", "0"], "whole number from 1 to 1024"],
    [["--stric"], "nearest: --strict"],
  ])("refuses %s", async (options, message) => {
    const { code, text } = await command("audit", "--out", path("none"), ...options);
    expect(code).toBe(2);
    expect(text).toContain(message);
  });
});
