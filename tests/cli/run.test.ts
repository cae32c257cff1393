import { afterAll, describe, expect, it } from "vitest";
import { join } from "node:path";
import { command } from "./command.ts";

const FOLDER = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(FOLDER, { recursive: true }));

const path = (name: string) => join(FOLDER, name);
const table = (name: string, text: string) => {
  Deno.writeTextFileSync(path(name), text);
  return path(name);
};

const ROWS = table(
  "rows.csv",
  `case,model,state,kappa,mass,bath_ratio,a,wall_radius
cold,rst,boulware,1,3,,,
warm,bpp,thermal,1,3,1.5,,
none,rst,hartle-hawking,1,-5,,,
even,solvable,hartle-hawking,1,3,,0.75,
shell,swave,thermal,0.1,3,0.4,,30
`,
);

describe("deno task run", () => {
  it("gives the same bytes with one and two workers and says there is nothing to do the second time", async () => {
    const one = await command("run", "--table", ROWS, "--out", path("one"), "--workers", "1");
    const two = await command("run", "--table", ROWS, "--out", path("two"), "--workers", "2");
    expect([one.code, two.code], one.text + two.text).toEqual([0, 0]);
    for (
      const file of [
        "results.csv",
        "results.csv-metadata.json",
        "profiles/cold.csv",
        "profiles/shell.csv",
      ]
    ) {
      expect(Deno.readTextFileSync(join(path("one"), file))).toBe(
        Deno.readTextFileSync(join(path("two"), file)),
      );
    }
    const lines = Deno.readTextFileSync(join(path("one"), "results.csv")).trimEnd().split(/\r?\n/);
    expect(lines.slice(1).map((line) => line.split(",")[0])).toEqual([
      "cold",
      "warm",
      "none",
      "even",
      "shell",
    ]);
    expect(lines[3]).toContain(",refused,");
    const again = await command("run", "--table", ROWS, "--out", path("one"));
    expect(again.code).toBe(0);
    expect(again.text).toMatch(/nothing to do/i);
  });

  it("completes a folder from which rows are missing to the same bytes", async () => {
    const file = join(path("two"), "results.csv"), whole = Deno.readTextFileSync(file);
    Deno.writeTextFileSync(file, whole.split("\n").slice(0, 3).join("\n") + "\n");
    const { code, text } = await command("run", "--table", ROWS, "--out", path("two"));
    expect(code, text).toBe(0);
    expect(Deno.readTextFileSync(file)).toBe(whole);
  });

  it("refuses the folder of another run unless told to replace it", async () => {
    const other = table("other.csv", "case,model,state,kappa,mass\nx,rst,boulware,1,4\n");
    const refusal = await command(
      "run",
      "--table",
      other,
      "--out",
      path("one"),
      "--profiles",
      "none",
    );
    expect(refusal.code).toBe(2);
    expect(refusal.text).toMatch(/--replace/);
    const replaced = await command(
      "run",
      "--table",
      other,
      "--out",
      path("one"),
      "--profiles",
      "none",
      "--replace",
    );
    expect(replaced.code, replaced.text).toBe(0);
    expect(Deno.readTextFileSync(join(path("one"), "results.csv"))).toMatch(/\nx,rst,/);
  });

  it("writes the profiles of the cases that a file names", async () => {
    const list = table("cases.txt", "shell\n");
    const { code, text } = await command(
      "run",
      "--table",
      ROWS,
      "--out",
      path("some"),
      "--profiles",
      list,
    );
    expect(code, text).toBe(0);
    const names = [...Deno.readDirSync(join(path("some"), "profiles"))].map(({ name }) => name);
    expect(names.filter((name) => !name.includes("metadata"))).toEqual(["shell.csv"]);
  });

  it("ends with 1 if a row failed and with 2 for bad input or usage, naming the nearest option", async () => {
    const failing = table(
      "failing.csv",
      "case,model,state,kappa,mass,tolerance\nx,cghs,boulware,1,4,1e-18\n",
    );
    const failed = await command("run", "--table", failing, "--out", path("failed"));
    expect(failed.code).toBe(1);
    expect(Deno.readTextFileSync(join(path("failed"), "results.csv"))).toMatch(
      /,failed,.*tolerance: /,
    );
    const faulty = table("faulty.csv", "case,model,state,kappa,mass\nx,rst,boulware,-1,4\n");
    const bad = await command("run", "--table", faulty, "--out", path("bad"));
    expect(bad.code).toBe(2);
    expect(bad.text).toMatch(/line 2, column kappa: must be > 0/);
    const usage = await command("run", "--tabel", ROWS);
    expect(usage.code).toBe(2);
    expect(usage.text).toMatch(/--table/);
  });

  it("records the run once: command, versions, hash of the results, what decided each kind", async () => {
    const record = JSON.parse(Deno.readTextFileSync(join(path("some"), "run.json")));
    const bytes = Deno.readFileSync(join(path("some"), "results.csv"));
    const digest = new Uint8Array(await crypto.subtle.digest("SHA-256", bytes));
    const hex = [...digest].map((b) => b.toString(16).padStart(2, "0")).join("");
    expect(JSON.stringify(record)).toContain(hex);
    expect(JSON.stringify(record)).toContain("throat_condition");
    expect(JSON.stringify(record)).toContain(Deno.version.deno);
  });
});

describe("deno task grid", () => {
  it("writes linear, logarithmic and seeded random ranges that run accepts", async () => {
    const grid = [
      "--set",
      "model=rst",
      "--set",
      "state=thermal",
      "--set",
      "kappa=1",
      "--log",
      "mass=1:100:3",
    ];
    const args = [...grid, "--linear", "bath_ratio=0:1:3", "--prefix", "g"];
    const first = await command("grid", ...args, "--out", path("grid.csv"));
    expect(first.code, first.text).toBe(0);
    const lines = Deno.readTextFileSync(path("grid.csv")).trimEnd().split(/\r?\n/);
    expect(lines).toHaveLength(10);
    const random = [...grid, "--uniform", "bath_ratio=0:1", "--draws", "2", "--seed", "5"];
    const a = await command("grid", ...random), b = await command("grid", ...random);
    expect(a.code, a.text).toBe(0);
    expect(a.text).toBe(b.text);
  });
});
