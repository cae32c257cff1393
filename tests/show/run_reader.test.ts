import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  DISPLAY,
  profileResiduals,
  readRun,
  reasonsTable,
  residualsTable,
  resultsTable,
  runStamp,
  worstBounds,
} from "@backstamp/backstamp";
import { RESULT_COLUMNS } from "../../lib/batch/result_columns.ts";

const NAMES = RESULT_COLUMNS.map((column) => column.name);

/** A line of results.csv with the given cells, the others empty. */
function line(cells: Record<string, string>): string {
  return NAMES.map((name) => cells[name] ?? "").join(",");
}

const SOLVED = { case: "x", model: "rst", state: "boulware", outcome: "solved", kind: "throat" };
const ROWS = [
  line({ ...SOLVED, mass: "10", mass_err: "0", dilaton_locus: "-2", dilaton_locus_err: "1e-3" }),
  line({ ...SOLVED, case: "y", curvature_locus: "4", curvature_locus_err: "1e-2" }),
  line({ ...SOLVED, case: "h", log10_minus_gtt_locus: "-INF", minus_gtt_locus: "0" }),
  line({ case: "n", model: "rst", outcome: "refused", reason: "below-critical: too light" }),
];

let folder = "";
beforeAll(async () => {
  folder = await Deno.makeTempDir();
  await Deno.writeTextFile(`${folder}/results.csv`, `${[NAMES.join(), ...ROWS].join("\n")}\n`);
  await Deno.mkdir(`${folder}/profiles`);
  const header =
    "sigma,proper_distance,dilaton,rho,minus_gtt,curvature,energy_density,pressure,residual_1,residual_2,residual_c";
  await Deno.writeTextFile(
    `${folder}/profiles/y.csv`,
    `${header}\n1,1,0,0,1,0,0,0,1e-9,-3e-8,0\n0,0,0,0,1,0,0,0,-2e-9,1e-8,\n`,
  );
});
afterAll(() => Deno.remove(folder, { recursive: true }));

const plain = (shown: { [DISPLAY](): Record<string, unknown> }): string =>
  String(shown[DISPLAY]()["text/plain"]);

describe("readRun", () => {
  it("reads rows in order, the cases with a profile, and the SHA-256 of what it read", async () => {
    const run = readRun(folder);
    expect(run.rows.map((row) => row.case)).toEqual(["x", "y", "h", "n"]);
    expect(run.profiles).toEqual(["y"]);
    const digest = await crypto.subtle.digest(
      "SHA-256",
      Deno.readFileSync(`${folder}/results.csv`),
    );
    const hex = [...new Uint8Array(digest)].map((b) => b.toString(16).padStart(2, "0")).join("");
    expect(run.stamp).toBe(hex);
    expect(plain(runStamp(run))).toContain(hex);
  });

  it("refuses a folder without results, foreign columns, and results changed after the run", async () => {
    const other = await Deno.makeTempDir();
    expect(() => readRun(other)).toThrow("must hold results.csv: there is none");
    await Deno.writeTextFile(`${other}/results.csv`, "case,kind\n");
    expect(() => readRun(other)).toThrow("no column model");
    await Deno.copyFile(`${folder}/results.csv`, `${other}/results.csv`);
    const record = { identity: {}, rows: {}, runs: [], results: { sha256: "0".repeat(64) } };
    await Deno.writeTextFile(`${other}/run.json`, JSON.stringify(record));
    expect(() => readRun(other)).toThrow("must be as the run wrote it");
    await Deno.remove(other, { recursive: true });
  });
});

describe("tables of a run", () => {
  it("results: numbers to the digit that their bound leaves standing, kind or outcome", () => {
    const lines = plain(resultsTable(readRun(folder))).split("\n");
    expect(lines[1]).toMatch(/^x +rst +boulware +throat +10 +-2\.0000 ± 1\.0e-3/);
    expect(lines[3]).toContain("diverges to -∞");
    expect(lines[4]).toMatch(/^n +rst +refused/);
  });

  it("worst bounds: largest bound over value first; exact and divergent numbers have none", () => {
    const lines = plain(worstBounds(readRun(folder))).split("\n");
    expect(lines.slice(1).map((text) => text.split(/ +/)[0])).toEqual(["y", "x"]);
    expect(lines[1]).toMatch(/2\.5e-3$/); // 1e-2 / 4
    expect(lines[2]).toMatch(/5\.0e-4$/); // 1e-3 / 2
    expect(plain(worstBounds(readRun(folder), 1)).split("\n")).toHaveLength(2);
  });

  it("reasons: refused rows and why", () => {
    const text = plain(reasonsTable(readRun(folder)));
    expect(text.split("\n")).toHaveLength(2);
    expect(text).toMatch(/n +rst +refused +below-critical: too light$/);
  });

  it("residuals: the largest magnitude of each equation along a profile", async () => {
    const residuals = await profileResiduals(readRun(folder), "y");
    expect(residuals).toEqual({ case: "y", points: 2, largest: [2e-9, 3e-8, 0] });
    expect(plain(residualsTable([residuals]))).toMatch(/y +2 +2\.0e-9 +3\.0e-8 +0\.0e\+0$/);
  });

  it("escape what would be markup", () => {
    const run = readRun(folder);
    const rows = [{ ...run.rows[3], reason: "<b>&" }];
    expect(reasonsTable({ ...run, rows })[DISPLAY]()["text/html"]).toContain("&lt;b&gt;&amp;");
  });
});
