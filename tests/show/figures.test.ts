import { describe, expect, it } from "vitest";
import { RESULT_COLUMNS } from "../../lib/batch/result_columns.ts";
import { resultCells } from "../../lib/batch/result_row.ts";
import { profileText } from "../../lib/batch/profile_text.ts";
import { readTable } from "../../lib/batch/table.ts";
import { compileModel } from "../../lib/model/compile.ts";
import { computeRow } from "../../lib/observe/row.ts";
import { chosenCases, FIGURE_AXES, FIGURE_TITLES } from "../../lib/show/figures.ts";
import { KINDS_MAP_TITLE, kindsMap, mapPlace } from "../../lib/show/kinds_map.ts";
import { profilePanels } from "../../lib/show/profile_panels.ts";
import { readProfileRows, readResultRows } from "../../lib/show/result_rows.ts";

const TABLE = `case,model,state,kappa,mass,bath_ratio,wall_radius
cold,rst,boulware,1,3,,
warm,rst,thermal,1,3,1.5,
huge,rst,boulware,1,1e60,,
negative,rst,boulware,2,-40,,
none,rst,hartle-hawking,1,-5,,
even,rst,hartle-hawking,1,30,,
endless,bpp,boulware,4,-1,,
open,bpp,boulware,1,-3,,
star,swave,boulware,2,9e37,,
shell,swave,thermal,0.1,3,0.4,30
`;
const encoder = new TextEncoder();
const models = Object.fromEntries(
  await Promise.all(
    (["rst", "bpp", "swave"] as const).map(async (n) => [n, await compileModel(n)]),
  ),
);
const table = readTable(encoder.encode(TABLE));
const solved = table.map((row) => ({
  row,
  ...computeRow(row.input, models[row.input.model]!, { profile: true }),
}));
const csv = [
  RESULT_COLUMNS.map(({ name }) => name).join(","),
  ...solved.map(({ row, result }) =>
    Object.values(resultCells(row, result, "ab".repeat(32))).map((t) =>
      t.includes(",") ? `"${t}"` : t
    ).join(",")
  ),
].join("\n");
const rows = readResultRows(encoder.encode(csv));
const svgs = [
  kindsMap(rows, { stamp: "cd".repeat(32) }),
  kindsMap(rows, { stamp: "cd".repeat(32), widthMm: 86 }),
  ...solved.flatMap(({ row, profile }) =>
    profile
      ? [
        profilePanels(
          rows.find((r) => r.case === row.case)!,
          readProfileRows(encoder.encode(profileText(profile))),
        ),
      ]
      : []
  ),
];

describe("Figures", () => {
  it("are the same bytes every time", () => {
    expect(kindsMap(rows, { stamp: "cd".repeat(32) })).toBe(svgs[0]);
  });

  it("hold no NaN, no infinity and no random identifier, whatever the scale of the numbers", () => {
    expect(svgs.length).toBeGreaterThan(8);
    for (const svg of svgs) {
      expect(svg).toMatch(/^<svg[^>]* xmlns="http:\/\/www.w3.org\/2000\/svg"/);
      expect(svg).not.toMatch(/NaN|Infinity|undefined| id="/);
    }
  });

  it("say the unit of every axis", () => {
    for (const { quantity, symbol, unit } of FIGURE_AXES) {
      expect([quantity, unit].every((text) => text !== ""), symbol).toBe(true);
    }
    expect(svgs[0]).toMatch(/\(dimensionless\)/);
    expect(svgs[0]).toMatch(/\(Planck masses\)/);
  });

  it("carry their title and the short stamp of what they show", () => {
    expect(FIGURE_TITLES).toContain(KINDS_MAP_TITLE);
    expect(svgs[0]).toContain(`<title>${KINDS_MAP_TITLE}`);
    expect(svgs[0]).toContain("cd".repeat(6));
    for (const svg of svgs.slice(2)) expect(svg).toContain("ab".repeat(6));
  });

  it("are as wide as a journal's columns: 178 mm and 86 mm", () => {
    const width = (svg: string) => /width="([\d.]+)(mm|pt)?"/.exec(svg)!;
    const mm = (svg: string) => {
      const [, value, unit] = width(svg);
      return unit === "mm" ? Number(value) : Number(value) * 25.4 / 72;
    };
    expect(Math.abs(mm(svgs[0]!) - 178)).toBeLessThan(0.1); // rounding of points
    expect(Math.abs(mm(svgs[1]!) - 86)).toBeLessThan(0.1); // as above
  });
});

describe("The map of kinds", () => {
  it("places rows at m/kappa and bath ratio, for swave at M/sqrt(kappa), refused ones in a lane", () => {
    const at = (name: string) => mapPlace(rows.find((row) => row.case === name)!);
    expect([at("cold").mass, at("cold").bath, at("cold").lane]).toEqual([3, 0, undefined]);
    expect([at("negative").mass, at("warm").bath]).toEqual([-20, 1.5]);
    expect(at("star").mass).toBeCloseTo(9e37 / Math.SQRT2, -25); // twelve digits of 6e37
    expect([at("none").lane, at("none").mass]).toEqual(["refused", -5]);
  });
});

it("Profiles to be drawn: at most six, one of each kind first", () => {
  const chosen = chosenCases(rows.filter((row) => row.kind !== ""));
  expect(chosen.length).toBeLessThanOrEqual(6);
  const kinds = new Set(rows.map(({ kind }) => kind).filter((kind) => kind !== ""));
  expect(new Set(chosen.map(({ kind }) => kind))).toEqual(kinds);
});
