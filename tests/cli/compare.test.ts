import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { parse } from "csv-parse/sync";
import { join } from "node:path";
import { COMPARISON_COLUMNS } from "../../lib/batch/comparison/comparison_file.ts";
import { runTable } from "../../lib/batch/run.ts";

const FOLDER = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(FOLDER, { recursive: true }));
const path = (name: string) => join(FOLDER, name);

/** The command with the permissions that deno.json gives it. */
async function compare(...args: string[]) {
  const { tasks } = JSON.parse(Deno.readTextFileSync("deno.json"));
  const [, ...words] = tasks.compare.command.split(" ");
  const child = new Deno.Command(Deno.execPath(), {
    args: [...words, ...args],
    env: { PATH: Deno.env.get("PATH") ?? "", NO_COLOR: "1" },
  });
  const { code, stdout, stderr } = await child.output(), decoder = new TextDecoder();
  return { code, out: decoder.decode(stdout), err: decoder.decode(stderr) };
}

const TABLE = "case,model,state,kappa,mass\ncold,rst,boulware,1,3\nwarm,rst,hartle-hawking,1,5\n";
const solve = (name: string, table: string) =>
  runTable({ table: new TextEncoder().encode(table), folder: path(name), workers: 1 });

/** Writes the results of the run `one` with the cells of a case changed. */
function edited(name: string, change: (cells: Record<string, string>) => void): string {
  const text = Deno.readTextFileSync(path("one/results.csv"));
  const rows: Record<string, string>[] = parse(text, { columns: true });
  rows.forEach(change);
  const lines = [Object.keys(rows[0]), ...rows.map((row) => Object.values(row))];
  Deno.writeTextFileSync(path(name), lines.map((cells) => cells.join()).join("\n") + "\n");
  return path(name);
}

beforeAll(async () => {
  await solve("one", TABLE);
  await solve("two", TABLE);
  await solve("other", TABLE.replace("1,3", "1,4") + "new,bpp,boulware,1,3\n");
});

describe("deno task compare", () => {
  it("ends with 0 for two runs of one table", async () => {
    const { code, out, err } = await compare(path("one"), path("two"));
    expect(code, err).toBe(0);
    expect(out).toMatch(/identical +2$/m);
    expect(out).toMatch(/^Same: nothing differs beyond the bounds$/m);
  });

  it("ends with 0 for a folder and itself, and says so", async () => {
    const { code, err } = await compare(path("one"), path("one"));
    expect(code).toBe(0);
    expect(err).toContain(`A and B are the same: ${path("one")}`);
  });

  it("ends with 0 within the bounds and with 1 beyond them", async () => {
    const shift = (sums: number) => (cells: Record<string, string>) => {
      if (cells.case !== "cold") return;
      cells.dilaton_locus_err = "0.125";
      cells.dilaton_locus = String(Number(cells.dilaton_locus) + sums * 0.125);
    };
    const near = await compare(path("one"), edited("near.csv", shift(1)));
    expect([near.code, near.err]).toEqual([0, ""]);
    expect(near.out).toMatch(/differ within their bounds +1$/m);
    const far = await compare(path("one"), edited("far.csv", shift(2)));
    expect([far.code, far.err]).toEqual([1, ""]);
    expect(far.out).toMatch(/Dilaton at the locus +0 +1 +2 +cold /);
    expect(far.out).toMatch(/^Not the same/m);
  });

  it("ends with 1 if rows came, or ask something else, or are of another kind", async () => {
    const other = await compare(path("one"), path("other"));
    expect(other.code, other.err).toBe(1);
    expect(other.out).toMatch(/cold +mass +3 +4$/m);
    expect(other.out).toMatch(/only in B\n +Case\n +new$/m);
    const kind = edited("kind.csv", (cells) => {
      if (cells.case === "warm") cells.kind = "throat";
    });
    const result = await compare(path("one"), kind);
    expect(result.code).toBe(1);
    expect(result.out).toMatch(/warm +kind +horizon +throat$/m);
  });

  it("names columns that only one version has", async () => {
    const old = edited("old.csv", (cells) => delete cells.validity);
    const { code, out } = await compare(old, path("one"));
    expect(code).toBe(0);
    expect(out).toMatch(/B +one .*not compared: validity$/m);
  });

  it("writes every difference and a figure where it is told, once unless told to replace", async () => {
    const args = [path("one"), path("other"), "--out", path("diff")];
    const { code, out, err } = await compare(...args);
    expect(code, err).toBe(1);
    expect(out).toContain(`Differences: ${path("diff")}/comparison.csv`);
    expect([...Deno.readDirSync(path("diff"))].map(({ name }) => name).sort()).toEqual([
      "comparison.csv",
      "comparison.svg",
    ]);
    const text = Deno.readTextFileSync(path("diff/comparison.csv"));
    const [header, ...rows]: string[][] = parse(text);
    expect(header).toEqual([...COMPARISON_COLUMNS]);
    expect(rows[0]).toEqual(["cold", "mass", "3", "0", "4", "0", "INF", "inputs"]);
    expect(rows.at(-1)).toEqual(["new", "case", "", "", "new", "", "", "added"]);
    expect(rows.some(([name]) => name === "warm")).toBe(false);
    const again = await compare(...args);
    expect(again.code).toBe(2);
    expect(again.err).toMatch(/comparison.csv as it is there already; give --replace/);
    const replaced = await compare(...args, "--replace");
    expect(replaced.code).toBe(1);
    expect(Deno.readTextFileSync(path("diff/comparison.csv"))).toBe(text);
  });

  it("ends with 2 for bad input, all of it named, and leaves no file", async () => {
    const absent = await compare(path("no"), path("nowhere"), "--out", path("none"));
    expect([absent.code, absent.out]).toEqual([2, ""]);
    expect(absent.err).toMatch(/no as it must be .* no such path\n.*nowhere as it must be/);
    const bad = edited("bad.csv", (cells) => cells.mass = "heavy");
    const faulty = await compare(path("one"), bad, "--out", path("none"));
    expect(faulty.code).toBe(2);
    expect(faulty.err).toMatch(/bad.csv .*\nline 2, column mass: .*"heavy"\nline 3, column mass/);
    expect([...Deno.readDirSync(path("none"))]).toEqual([]);
    expect((await compare(path("one"), bad, "--out", bad)).err).toMatch(
      /Cannot write to .*bad.csv/,
    );
  });

  it("ends with 2 for bad usage, all of it named", async () => {
    const { code, err } = await compare(path("one"), "--lines", "0");
    expect(code).toBe(2);
    expect(err).toMatch(
      /two runs must be named: current count is 1\n.*--lines .* current value is 0/,
    );
    expect((await compare("--help")).out).toMatch(/^deno task compare[^]*A B[^]*--out DIR/);
  });
});
