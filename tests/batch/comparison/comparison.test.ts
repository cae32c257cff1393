import { afterAll, describe, expect, it } from "vitest";
import { compareResults } from "../../../lib/batch/comparison/comparison.ts";
import type { Difference, RowChange } from "../../../lib/batch/comparison/row_change.ts";
import { ComparisonError } from "../../../lib/batch/comparison/comparison_error.ts";
import { RESULT_COLUMNS } from "../../../lib/batch/result_columns.ts";
import { sha256 } from "../../../lib/batch/stamp.ts";

const ROOT = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(ROOT, { recursive: true }));

const NAMES = RESULT_COLUMNS.map(({ name }) => name);
type Cells = Readonly<Record<string, string>>;
const EMPTY: Cells = Object.fromEntries(NAMES.map((name) => [name, ""]));
const row = (name: string, cells: Cells = {}): Cells => ({
  ...EMPTY,
  case: name,
  model: "rst",
  state: "boulware",
  outcome: "solved",
  kind: "throat",
  kappa: "1",
  mass: "3",
  mass_err: "0",
  dilaton_locus: "-1",
  dilaton_locus_err: "0.125",
  curvature_locus: "4",
  curvature_locus_err: "0.25",
  tolerance: "1e-10",
  stamp: "aa",
  ...cells,
});
const rows = (name: string, ...all: Cells[]) => ({ name, rows: all });

const text = (all: readonly Cells[], names: readonly string[] = NAMES): string =>
  [names.join(), ...all.map((cells) => names.map((n) => cells[n] ?? "").join())].join("\n") + "\n";

const IDENTITY = {
  table: "",
  core: "c0",
  expressions: { rst: { H: "1" }, bpp: { H: "2" } },
  settings: { steps: 6, far: { order: 8 } },
  pins: { mathjs: "15.2.0" },
  runtime: { deno: "2.9.6", v8: "15" },
};

/** An output folder as a run leaves it. */
function folder(name: string, all: readonly Cells[], more: {
  readonly identity?: Record<string, unknown>;
  readonly table?: string;
  readonly total?: number;
} = {}): string {
  const path = `${ROOT}/${name}`, results = text(all), { table = "", total = all.length } = more;
  Deno.mkdirSync(path);
  Deno.writeTextFileSync(`${path}/results.csv`, results);
  if (table !== "") Deno.writeTextFileSync(`${path}/parameters.csv`, table);
  const record = {
    status: "done",
    runs: [],
    rows: {},
    total,
    identity: { ...IDENTITY, table: sha256(table), ...more.identity },
    results: { sha256: sha256(results), rows: all.length },
  };
  Deno.writeTextFileSync(`${path}/run.json`, JSON.stringify(record));
  return path;
}

async function message(a: Parameters<typeof compareResults>[0], b = a): Promise<string> {
  try {
    await compareResults(a, b);
  } catch (error) {
    if (error instanceof ComparisonError) return error.message;
    throw error;
  }
  return "";
}

describe("Two results tables", () => {
  const a = rows(
    "a",
    row("same"),
    row("gone"),
    row("stamped"),
    row("near"),
    row("far"),
    row("kind"),
    row("asked"),
  );
  const b = rows(
    "b",
    row("asked", { mass: "4", dilaton_locus: "-9", stamp: "bb" }),
    row("kind", { kind: "horizon", curvature_locus: "", curvature_locus_err: "", stamp: "bb" }),
    row("far", { dilaton_locus: "-2", curvature_locus: "4.25", stamp: "bb" }),
    row("near", { dilaton_locus: "-1.25", stamp: "bb" }),
    row("stamped", { stamp: "bb" }),
    row("new"),
    row("same"),
  );

  it("are counted by what became of each row, in any order", async () => {
    const { rows, same } = await compareResults(a, b);
    const one = { identical: 1, stamp: 1, within: 1, beyond: 1, kind: 1, inputs: 1 };
    expect(rows).toEqual({ ...one, added: 1, removed: 1 });
    expect(same).toBe(false);
    const back = await compareResults(b, a);
    expect(back.rows).toEqual(rows);
    expect(back.others.filter(({ column }) => column === "case").map((d) => [d.change, d.case]))
      .toEqual([["added", "gone"], ["removed", "new"]]);
  });

  it("are the same if nothing is beyond the bounds", async () => {
    const near = ["same", "stamped", "near"];
    const some = (all: typeof a) => ({
      ...all,
      rows: all.rows.filter((cells) => near.includes(cells["case"])),
    });
    expect((await compareResults(some(a), some(b))).same).toBe(true);
    for (const name of ["far", "kind", "asked", "gone", "new"]) {
      const one = (all: typeof a) => ({
        ...all,
        rows: all.rows.filter((cells) => [...near, name].includes(cells["case"])),
      });
      expect((await compareResults(one(a), one(b))).same, name).toBe(false);
    }
  });

  it("have their largest differences by column, without rows that ask something else", async () => {
    const { columns } = await compareResults(a, b, { most: 1 });
    expect(columns.map(({ column, within, beyond }) => [column, within, beyond])).toEqual([
      ["dilaton_locus", 1, 1],
      ["curvature_locus", 1, 0], // a throat's curvature that a horizon does not have is not counted
    ]);
    expect(columns[0].worst).toEqual([
      expect.objectContaining({ case: "far", a: "-1", b: "-2", excess: 4 }),
    ]);
    // 4 = 10^0.60, so two quarters of a decade up; 1 is within: the quarter below
    expect(columns[0].sizes).toEqual(new Map([[2, 1], [-1, 1]]));
    expect(columns[1].sizes).toEqual(new Map([[-2, 1]])); // 0.5 = 10^-0.30
  });

  it("pass every difference on, with what became of its row", async () => {
    const all: [Difference, RowChange][] = [];
    await compareResults(a, b, { most: 1, onDifference: (...one) => void all.push(one) });
    const of = (name: string) =>
      all.filter(([d]) => d.case === name).map(([d, change]) => `${d.column} ${change}`);
    expect(of("same")).toEqual([]);
    expect(of("far")).toEqual(["dilaton_locus beyond", "curvature_locus beyond", "stamp beyond"]);
    expect(of("asked")).toEqual(["mass inputs", "dilaton_locus inputs", "stamp inputs"]);
    expect(all.at(-2)?.[1]).toBe("removed");
    expect(all.at(-1)?.[1]).toBe("added");
  });

  it("of one file are identical", async () => {
    const path = folder("one", a.rows);
    const { rows, same, a: one } = await compareResults(path, `${path}/results.csv`);
    expect([rows.identical, same]).toEqual([7, true]);
    expect(one).toMatchObject({ name: "one", rows: 7, digest: sha256(text(a.rows)) });
    expect((await compareResults(a, path)).a.digest).toBe(one.digest);
  });
});

describe("Columns that only one table has", () => {
  it("are named and not compared", async () => {
    const old = NAMES.filter((name) => name !== "validity");
    Deno.writeTextFileSync(`${ROOT}/old.csv`, text([row("x")], old));
    Deno.writeTextFileSync(`${ROOT}/new.csv`, text([row("x")], [...NAMES, "flux"]));
    const { a, b, same } = await compareResults(`${ROOT}/old.csv`, `${ROOT}/new.csv`);
    expect([a.ownColumns, b.ownColumns, same]).toEqual([[], ["validity", "flux"], true]);
  });
});

describe("What the records of two runs tell", () => {
  const stamped = (model: string, stamp: string) => row(model, { model, stamp });

  it("are the parts of a stamp that differ, and which rows they concern", async () => {
    const a = folder("origin-a", [stamped("rst", "1"), stamped("bpp", "1")]);
    const b = folder("origin-b", [stamped("rst", "2"), stamped("bpp", "2")], {
      identity: {
        expressions: { rst: { H: "1" }, bpp: { H: "3" } },
        runtime: { deno: "2.9.7", v8: "15" },
        settings: { steps: 6, far: { order: 9 } },
      },
    });
    const { stamps, origins } = await compareResults(a, b);
    expect(stamps).toMatchObject({ runtime: 2, settings: 2, expressions: 1, core: 0, unknown: 0 });
    expect(origins).toEqual([
      { item: "expressions.bpp.H", a: "2", b: "3" },
      { item: "runtime.deno", a: "2.9.6", b: "2.9.7" },
      { item: "settings.far.order", a: "8", b: "9" },
    ]);
  });

  it("is the tolerance of a row too, and nothing where a record is missing or explains nothing", async () => {
    const a = folder("tolerance-a", [row("x"), row("y")]);
    const changed = [row("x", { tolerance: "1e-6", stamp: "b" }), row("y", { stamp: "b" })];
    const b = folder("tolerance-b", changed);
    expect((await compareResults(a, b)).stamps).toMatchObject({ tolerance: 1, unknown: 1 });
    const without = await compareResults(a, rows("b", ...changed));
    expect(without.stamps).toMatchObject({ tolerance: 1, unknown: 2 });
    expect(without.origins).toBeUndefined();
  });

  it("are rows that a run has not finished", async () => {
    const a = folder("part", [row("x")], { total: 3 });
    expect((await compareResults(a, rows("b", row("x")))).a.missing).toBe(2);
  });

  it("are inputs that results do not repeat, from the parameter tables", async () => {
    const table = (above: string) =>
      `case,model,state,kappa,mass_above_critical\nx,rst,boulware,1,${above}\n`;
    const found = { mass_err: "1e-3" };
    const a = folder("above-a", [row("x", found)], { table: table("2") });
    const b = folder("above-b", [row("x", { ...found, mass: "4" })], { table: table("3") });
    const { rows: counts, tablesKnown, others } = await compareResults(a, b);
    expect([counts.inputs, counts.beyond, tablesKnown]).toEqual([1, 0, true]);
    expect(others).toMatchObject([{ column: "mass_above_critical", a: "2", b: "3" }]);
    // by the results alone the mass was found, not given
    const blind = await compareResults(`${a}/results.csv`, `${b}/results.csv`);
    expect([blind.rows.beyond, blind.tablesKnown]).toEqual([1, false]);
  });

  it("is that a tolerance in the parameter tables asks for no other numbers", async () => {
    const table = (tolerance: string) =>
      `case,model,state,kappa,mass,tolerance\nx,rst,boulware,1,3,${tolerance}\n`;
    const a = folder("demand-a", [row("x")], { table: table("1e-10") });
    const changed = row("x", { tolerance: "1e-6", stamp: "bb" });
    const b = folder("demand-b", [changed], { table: table("1e-6") });
    const { rows: counts, tablesKnown } = await compareResults(a, b);
    expect([counts.stamp, tablesKnown]).toEqual([1, true]);
    const { tolerance: _, ...bare } = row("x"); // a version whose results do not repeat it
    const given = (tolerance: number) => ({
      ...rows("bare", bare),
      inputs: new Map([["x", { kappa: 1, tolerance }]]),
    });
    expect((await compareResults(given(1e-10), given(1e-6))).rows.identical).toBe(1);
  });

  it("is that the same parameters were given in other words", async () => {
    const a = folder("words-a", [row("x")], {
      table: "case,model,state,kappa,mass\nx,rst,boulware,1,3\n",
    });
    const b = folder("words-b", [row("x")], {
      table: "case,model,state,n_scalars,mass\nx,rst,boulware,12,3\n",
    });
    expect((await compareResults(a, b)).rows.identical).toBe(1);
  });
});

describe("What cannot be compared", () => {
  it("is refused with all that is wrong with both tables, by line and column", async () => {
    const a = rows("a", row("x", { dilaton_locus: "nan" }), row("v"), row("y", { kappa: "one" }));
    const b = rows(
      "b",
      row("x", { dilaton_locus_err: "" }),
      row("y", { curvature_locus_err: "-1" }),
      row("z", { dilaton_locus: "INF" }),
      row("w", { dilaton_locus_err: "INF" }),
      row(""),
    );
    const lines = (await message(a, b)).split("\n");
    expect(lines).toEqual([
      "Cannot compare a as it must be a results table:",
      expect.stringMatching(/^line 2, column dilaton_locus: must be .*"nan"$/),
      expect.stringMatching(/^line 4, column kappa: must be a decimal number.*"one"$/),
      "Cannot compare b as it must be a results table:",
      expect.stringMatching(/^line 2, column dilaton_locus_err: must be finite and >= 0 .*""$/),
      expect.stringMatching(/^line 3, column curvature_locus_err: must be finite and >= 0 .*"-1"$/),
      expect.stringMatching(/^line 4, column dilaton_locus_err: must be empty as .*"0.125"$/),
      expect.stringMatching(/^line 5, column dilaton_locus_err: must be finite and >= 0 .*"INF"$/),
      "line 6, column case: must be given",
    ]);
  });

  it("is a case twice, a line of other length, a header of something else, an empty or broken file", async () => {
    expect(await message(rows("a", row("x"), row("x")))).toMatch(
      /line 3, column case: must be unique, and line 2 has it: current value is "x"/,
    );
    const file = (content: string) => {
      Deno.writeTextFileSync(`${ROOT}/bad.csv`, content);
      return message(`${ROOT}/bad.csv`);
    };
    expect(await file(text([row("x")]) + "y,rst\n")).toMatch(/line 3: must have 34 fields/);
    expect(await file("case,case,model\nx,x,rst\n")).toMatch(
      /column state: is missing in the header\n.*column outcome[^]*column case: must stand .* once/,
    );
    expect(await file("")).toMatch(/line 1: a header must stand here/);
    expect(await file(text([row("x")]) + 'y,"rst\n')).toMatch(
      /line 3: a quoted field must be closed/,
    );
  });

  it("are paths without a table: both are named at once", async () => {
    Deno.mkdirSync(`${ROOT}/empty`);
    const text = await message(`${ROOT}/empty`, `${ROOT}/nowhere`);
    expect(text).toMatch(
      /empty as it must be .*: there is no results.csv\n.*nowhere as .* no such/,
    );
  });

  it("are results that are not as their run wrote them", async () => {
    const path = folder("touched", [row("x")]);
    Deno.writeTextFileSync(`${path}/results.csv`, text([row("x", { mass: "9" })]));
    expect(await message(path)).toMatch(/must be as the run wrote it \(SHA-256 [0-9a-f]{64}\)/);
    expect(await message(`${path}/results.csv`)).toBe(""); // the table by itself may be compared
  });
});
