import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { compareRuns, DISPLAY, OptionsError, readRun, solveAgain } from "@backstamp/backstamp";
import { runTable } from "../../lib/batch/run.ts";
import { COMPARISON_AXES, COMPARISON_TITLE } from "../../lib/show/comparison_figure.ts";
import { axisLabel } from "../../lib/show/axis.ts";

const ROW = {
  case: "x",
  model: "rst",
  state: "boulware",
  outcome: "solved",
  kind: "throat",
  dilaton_locus: "-1",
  dilaton_locus_err: "0.125",
  curvature_locus: "4",
  curvature_locus_err: "0",
  stamp: "aa",
};
type Cells = Readonly<Record<string, string>>;
const pair = (from: Cells, to: Cells) =>
  compareRuns({ name: "first", rows: [{ ...ROW, ...from }] }, {
    name: "second",
    rows: [{ ...ROW, ...to }],
  });

describe("compareRuns", () => {
  it("tells as text what became of the rows, the largest differences, and what of the stamps", async () => {
    const result = await pair({}, {
      dilaton_locus: "-2",
      curvature_locus: "INF",
      curvature_locus_err: "",
      stamp: "bb",
    });
    const text = result.text();
    expect(text).toMatch(/A +first +1 +[0-9a-f]{12}$/m);
    expect(text).toMatch(/differ beyond their bounds +1$/m);
    expect(text).toMatch(/Dilaton at the locus +0 +1 +4 +x +-1\.00 ± 0\.13 +-2\.00 ± 0\.13$/m);
    expect(text).toMatch(/Curvature at the locus +0 +1 +∞ +x +4 +diverges to \+∞$/m);
    expect(text).toMatch(/unknown: .* 1$/m);
  });

  it("tells about kinds, inputs, and rows that only one table has", async () => {
    const kind = (await pair({}, { kind: "horizon" })).text();
    expect(kind).toMatch(/x +kind +throat +horizon$/m);
    const inputs = (await pair({}, { model: "bpp" })).text();
    expect(inputs).toMatch(/other inputs\n +Case.*\n +x +model +rst +bpp$/m);
    const other = (await pair({}, { case: "y" })).text();
    expect(other).toMatch(/only in B\n +Case\n +y\n\nonly in A\n +Case\n +x$/m);
  });

  it("shows at most the lines asked for, but every column's largest difference", async () => {
    const rows = Array.from({ length: 9 }, (_, i) => ({ ...ROW, case: `x${i}` }));
    const shifted = rows.map((row, i) => ({ ...row, dilaton_locus: `-${2 + i}` }));
    const result = await compareRuns({ name: "a", rows }, { name: "b", rows: shifted });
    expect(result.text(2).match(/ x\d /g)).toEqual([" x8 ", " x7 "]);
    expect(result.columns[0].worst[0].excess).toBe(36); // 10 - 1 over 0.25
    const bounds = rows.map((row) => ({ ...row, dilaton_locus_err: "1" }));
    const same = await compareRuns({ name: "a", rows }, { name: "b", rows: bounds });
    expect(same.text().match(/ x\d /g)).toEqual([" x0 "]); // all alike: one of them will do
    expect(same.text()).toContain("0 (only bounds)");
  });

  it("shows itself as tables without markup from the cells", async () => {
    const result = await pair({ kind: "<b>" }, {});
    const { "text/html": html, "text/plain": plain } = result[DISPLAY]();
    expect(html).toContain("&lt;b&gt;");
    expect(plain).toBe(result.text());
  });
});

describe("The figure of a comparison", () => {
  it("is the same bytes every time, with its title, units and both digests, whatever the sizes", async () => {
    const wild = [
      { dilaton_locus: "-1.001" },
      { dilaton_locus: "-1.1" }, // on an axis of hundreds of decades beside the one before
      { dilaton_locus: "-1e300" },
      { dilaton_locus: "INF", dilaton_locus_err: "" },
      { dilaton_locus_err: "1" },
      { dilaton_locus: "-1.0000000000000002", dilaton_locus_err: "1e300" },
    ].map((cells, i) => ({ ...ROW, ...cells, case: `x${i}` }));
    const rows = wild.map(({ case: name }) => ({ ...ROW, case: name }));
    const draw = async () =>
      (await compareRuns({ name: "a", rows }, { name: "b", rows: wild })).figure().svg;
    const svg = await draw();
    expect(await draw()).toBe(svg);
    expect(svg).not.toMatch(/NaN|Infinity|undefined| id="/);
    expect(svg).toContain(`<title>${COMPARISON_TITLE}</title>`);
    for (const axis of COMPARISON_AXES) expect(svg).toContain(axisLabel(axis));
    expect(svg.match(/aria-label="dilaton_locus: 1"/g)).toHaveLength(4);
    expect(svg.match(/aria-label="dilaton_locus: 2"/g)).toHaveLength(1);
    expect(svg).toContain("2 beyond");
    expect(svg.match(/fill="#b4531f"/g)).toHaveLength(2); // beyond, divergence among them
    expect(svg.match(/fill="#14324f"/g)).toHaveLength(3);
    const { a, b } = await compareRuns({ name: "a", rows }, { name: "b", rows: wild });
    for (const { digest } of [a, b]) expect(svg).toContain(digest.slice(0, 12));
  });

  it("says so if no number differs", async () => {
    const { svg } = (await pair({}, { stamp: "bb" })).figure();
    expect(svg).toContain("No number differs.");
    expect(svg).not.toMatch(/NaN|Infinity|undefined/);
  });
});

describe("solveAgain", () => {
  let folder = "";
  beforeAll(async () => {
    folder = await Deno.makeTempDir();
    const table = "case,model,state,n_scalars,mass,mass_above_critical,bath_ratio\n" +
      "cold,rst,boulware,12,3,,\nwarm,bpp,thermal,24,,2,0.5\n";
    await runTable({ table: new TextEncoder().encode(table), folder, workers: 1 });
  });
  afterAll(() => Deno.remove(folder, { recursive: true }));

  it("gives the same rows to the last bit, stamps and all", async () => {
    const run = readRun(folder), again = await solveAgain(run, { warm: {}, cold: {} });
    expect(again.rows).toEqual([run.rows[1], run.rows[0]]);
    const { rows, origins } = await compareRuns(run, again);
    expect([rows.identical, origins]).toEqual([2, []]);
  });

  it("changes and takes away parameters", async () => {
    const run = readRun(folder);
    const again = await solveAgain(run, {
      cold: { tolerance: 1e-6 },
      warm: { massAboveCritical: undefined, mass: 7 },
    });
    expect(again.rows.map((row) => [row.case, row.kappa, row.tolerance])).toEqual([
      ["cold", "1", "0.000001"],
      ["warm", "2", "1e-10"],
    ]);
    expect([again.rows[1].mass, again.rows[1].mass_err]).toEqual(["7", "0"]);
    const { rows, stamps } = await compareRuns(run, again);
    // of the second row, a mass that was found became another one that is given
    expect([rows.stamp, rows.inputs, stamps.tolerance, stamps.unknown]).toEqual([1, 1, 1, 0]);
  });

  it("refuses cases that the run does not have, and rows that are not valid", async () => {
    const run = readRun(folder);
    await expect(solveAgain(run, { cald: {}, x: {} })).rejects.toThrow(
      /must have the case: cald \(nearest: cold\), x \(nearest/,
    );
    await expect(solveAgain(run, { cold: { kappa: 1 } })).rejects.toThrow(OptionsError);
    await expect(solveAgain(run, {})).rejects.toThrow("a case must be named: got none");
    await expect(solveAgain({ ...run, folder: "lib" }, { cold: {} })).rejects.toThrow(
      "lib must hold parameters.csv: there is none",
    );
  });
});
