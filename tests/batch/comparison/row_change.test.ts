import { describe, expect, it } from "vitest";
import {
  compareRow,
  ROW_CHANGES,
  sharedColumns,
} from "../../../lib/batch/comparison/row_change.ts";
import { RESULT_COLUMNS } from "../../../lib/batch/result_columns.ts";

const NAMES = RESULT_COLUMNS.map(({ name }) => name);
const EMPTY = Object.fromEntries(NAMES.map((name) => [name, ""]));
const ROW = {
  ...EMPTY,
  case: "x",
  model: "rst",
  state: "boulware",
  outcome: "solved",
  kind: "throat",
  kappa: "1",
  lambda: "1",
  mass: "3",
  mass_err: "0",
  dilaton_locus: "-1",
  dilaton_locus_err: "0.125",
  minus_gtt_locus: "0",
  minus_gtt_locus_err: "5e-324",
  log10_minus_gtt_locus: "-400",
  log10_minus_gtt_locus_err: "1",
  curvature_locus: "-INF",
  inner_end: "null-singularity",
  validity: "inside",
  tolerance: "1e-10",
  stamp: "aa",
};
const COLUMNS = sharedColumns(NAMES, NAMES);
type Cells = Readonly<Record<string, string>>;

const both = (from: Cells, to: Cells, given?: Parameters<typeof compareRow>[3]) =>
  compareRow({ ...ROW, ...from }, { ...ROW, ...to }, COLUMNS, given);
const change = (to: Cells, from: Cells = {}) => both(from, to).change;

describe("A row of two tables", () => {
  it("is identical if all cells read the same: 10 and 1e1, 0 and -0, empty and divergent ones", () => {
    expect(both({}, {})).toEqual({ change: "identical", differences: [] });
    expect(change({ dilaton_locus: "-1.0", kappa: "1e0", minus_gtt_locus: "-0" })).toBe(
      "identical",
    );
    expect(change({ tolerance: "0.1e-9" })).toBe("identical");
  });

  it("has another stamp only, perhaps with another tolerance", () => {
    expect(both({}, { stamp: "bb" }).differences).toEqual([
      { case: "x", column: "stamp", a: "aa", aError: "", b: "bb", bError: "", change: "stamp" },
    ]);
    expect(change({ stamp: "bb", tolerance: "1e-6" })).toBe("stamp");
    // stamps are words even if they look like numbers
    expect(change({ stamp: "1e1" }, { stamp: "10" })).toBe("stamp");
  });

  it("differs within the bounds up to their sum, wide ones too", () => {
    expect(change({ dilaton_locus: "-1.25" })).toBe("within");
    expect(change({ dilaton_locus: "-7e300", dilaton_locus_err: "1e301" })).toBe("within");
    expect(change({ minus_gtt_locus: "5e-324", minus_gtt_locus_err: "0" })).toBe("within");
    expect(change({ log10_minus_gtt_locus: "-401.5" })).toBe("within");
  });

  it("differs within the bounds if only a bound does, or the prose of a reason", () => {
    const [bound] = both({}, { dilaton_locus_err: "0.5" }).differences;
    expect(bound).toMatchObject({
      column: "dilaton_locus",
      excess: 0,
      aError: "0.125",
      bError: "0.5",
    });
    const failed = { outcome: "failed", kind: "" };
    expect(
      change({ ...failed, reason: "tolerance: 1e-9" }, { ...failed, reason: "tolerance: 1e-8" }),
    ).toBe("within");
  });

  it("differs beyond the bounds by more than their sum", () => {
    const { change, differences } = both({}, { dilaton_locus: "-1.5", stamp: "bb" });
    expect(change).toBe("beyond");
    expect(differences.map(({ column }) => column)).toEqual(["dilaton_locus", "stamp"]);
    expect(differences[0].excess).toBe(2); // 0.5 over 0.25
    expect(both({}, { minus_gtt_locus: "1e-323", minus_gtt_locus_err: "0" }).differences[0].excess)
      .toBe(2);
  });

  it("differs beyond all bounds where a number became empty, divergent or of the other sign", () => {
    for (
      const to of [
        { dilaton_locus: "", dilaton_locus_err: "" },
        { dilaton_locus: "INF", dilaton_locus_err: "" },
        { curvature_locus: "INF" },
        { curvature_locus: "-1e308", curvature_locus_err: "1e308" },
        { temperature_horizon: "0", temperature_horizon_err: "1" },
      ]
    ) {
      expect(both({}, to)).toMatchObject({ change: "beyond", differences: [{ excess: Infinity }] });
      expect(both(to, {}).change).toBe("beyond");
    }
  });

  it("is of another kind if what is there is called otherwise, whatever its numbers", () => {
    for (
      const to of [
        { kind: "horizon" },
        { outcome: "failed", reason: "tolerance: x" },
        { reason: "boundary: x" },
        { inner_end: "undecided" },
        { validity: "near-critical" },
      ]
    ) {
      expect(change(to), JSON.stringify(to)).toBe("kind");
      expect(change({ ...to, dilaton_locus: "-2" })).toBe("kind");
    }
  });

  it("asks another question if an input differs, whatever else does", () => {
    for (
      const to of [{ model: "bpp" }, { state: "thermal" }, { kappa: "2" }, { lambda: "2" }, {
        a: "1",
      }, { wall_radius: "9" }]
    ) {
      expect(change({ ...to, kind: "horizon", dilaton_locus: "5" })).toBe("inputs");
    }
  });

  it("takes exact numbers that repeat an input for inputs, unless the parameters are known to agree", () => {
    expect(change({ mass: "4" })).toBe("inputs");
    expect(both({}, { mass: "4" }, []).change).toBe("beyond");
    expect(change({ mass: "4", mass_err: "1e-9" })).toBe("beyond"); // found, not given
    const exact = { dilaton_locus_err: "0" };
    const regular = { ...exact, state: "hartle-hawking" };
    expect(change({ ...regular, dilaton_locus: "-2" }, regular)).toBe("inputs");
    expect(change({ ...exact, dilaton_locus: "-2" }, exact)).toBe("beyond");
  });

  it("asks another question if a parameter differs that results do not repeat", () => {
    const given = {
      case: "x",
      column: "mass_above_critical",
      a: "1",
      aError: "",
      b: "2",
      bError: "",
    };
    const { change, differences } = both({}, { dilaton_locus: "-3" }, [given]);
    expect(change).toBe("inputs");
    expect(differences).toEqual([
      expect.objectContaining({ column: "dilaton_locus", change: "beyond" }),
      { ...given, change: "inputs" },
    ]);
  });

  it("has one of the listed changes, each stronger than those before", () => {
    expect(ROW_CHANGES).toEqual(
      ["identical", "stamp", "within", "beyond", "kind", "inputs", "added", "removed"],
    );
  });
});

describe("Columns of two versions", () => {
  it("are compared as far as both have them; bounds of one side alone still count", () => {
    const a = ["case", "mass", "mass_err", "old"], b = ["case", "new", "mass"];
    const shared = sharedColumns(a, b);
    expect(shared).toEqual([{ name: "mass", words: false, bound: "" }]);
    const row = { case: "x", mass: "1", mass_err: "0.5", old: "1" };
    expect(compareRow(row, { case: "x", new: "2", mass: "1.5" }, shared).change).toBe("within");
    expect(compareRow(row, { case: "x", new: "2", mass: "1" }, shared).change).toBe("identical");
    expect(compareRow(row, { case: "x", new: "2", mass: "1.6" }, shared).change).toBe("beyond");
  });

  it("may hold words that this version does not know", () => {
    const shared = sharedColumns(["case", "engine"], ["case", "engine"]);
    const one = { case: "x", engine: "taylor" };
    expect(compareRow(one, { ...one }, shared).change).toBe("identical");
    expect(compareRow(one, { ...one, engine: "other" }, shared).change).toBe("beyond");
  });
});
