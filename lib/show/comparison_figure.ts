/**
 * Differences between two results tables in units of the sum of their bounds: one lane a column, a bar for
 * the rows in each quarter of a decade.
 *
 * @module
 */
import { BINS_PER_DECADE, type ColumnChange } from "../batch/comparison/column_change.ts";
import type { Comparison } from "../batch/comparison/comparison.ts";
import { RESULT_COLUMNS } from "../batch/result_columns.ts";
import { type Axis, axisLabel, powerText, type Scale } from "./axis.ts";
import { COLUMN_WIDTHS, figureSvg, INK, points, SHORT_STAMP } from "./figure.ts";
import { bar, drawMarks, drawPanel, type Mark, verticalRule, words } from "./panel.ts";

/** Title of the figure. */
export const COMPARISON_TITLE = "Differences between two tables";

const EXCESS: Axis = {
  quantity: "difference over the sum of the bounds",
  symbol: "|a \u2212 b|/(\u03b4a + \u03b4b)",
  unit: "dimensionless",
};
const ROWS: Axis = {
  quantity: "rows in the lane of each quantity,",
  symbol: "n",
  unit: "dimensionless",
};
/** Axes of the figure. */
export const COMPARISON_AXES: readonly Axis[] = [EXCESS, ROWS];

const MARGINS = { left: 108, right: 48, top: 15, bottom: 24 } as const;
const LANE_HEIGHT = 19;
const WITHIN = "#14324f";
const BEYOND = "#b4531f";
const STEP = 1 / BINS_PER_DECADE;
/** Room between the decades and the bars of equal and of infinitely distant numbers, in decades. */
const GAP = 0.75;

/** What became of rows that were compared number by number. */
const COMPARED = ["identical", "stamp", "within", "beyond", "kind"] as const;

type Bin = number | "0" | "INF";

/** Decades that hold all bins, the bound itself among them. */
function decades(columns: readonly ColumnChange[]): readonly [number, number] {
  const bins = columns.flatMap(({ sizes }) =>
    [...sizes.keys()].filter((b) => typeof b === "number")
  );
  const low = bins.reduce((least, bin) => Math.min(least, bin), -BINS_PER_DECADE);
  const high = bins.reduce((most, bin) => Math.max(most, bin + 1), BINS_PER_DECADE);
  return [Math.floor(low * STEP), Math.ceil(high * STEP)];
}

/** Left edge of a bin, in decades. */
function edge(bin: Bin, [low, high]: readonly [number, number]): number {
  if (bin === "0") return low - GAP - STEP / 2;
  return bin === "INF" ? high + GAP - STEP / 2 : bin * STEP;
}

function excessScale(ends: readonly [number, number]): Scale {
  const [low, high] = ends, every = Math.ceil((high - low) / 10);
  const powers = Array.from({ length: high - low + 1 }, (_, i) => low + i)
    .filter((power) => power % every === 0);
  const zero = edge("0", ends) + STEP / 2, infinite = edge("INF", ends) + STEP / 2;
  return {
    domain: [zero - 0.5, infinite + 0.5],
    place: (excess) => Math.log10(excess),
    ticks: [zero, ...powers, infinite],
    text: (t) => t === zero ? "0" : t === infinite ? "\u221e" : powerText(Math.round(t)),
    exponent: 0,
  };
}

function laneScale(columns: readonly ColumnChange[]): Scale {
  const title = ({ column }: ColumnChange) =>
    RESULT_COLUMNS.find(({ name }) => name === column)?.title ?? column;
  return {
    domain: [-columns.length, 0],
    place: (lane) => lane,
    ticks: columns.map((_, i) => -i - 0.5),
    text: (t) => title(columns[Math.round(-t - 0.5)]),
    exponent: 0,
  };
}

function laneMarks(columns: readonly ColumnChange[], ends: readonly [number, number]): Mark[] {
  const counts = columns.flatMap(({ sizes }) => [...sizes.values()]);
  const full = Math.log10(1 + counts.reduce((most, n) => Math.max(most, n), 1));
  return columns.flatMap(({ column, sizes, beyond }, i) => {
    const bars = [...sizes].map(([bin, n]) => {
      const x = edge(bin, ends), height = 0.85 * Math.log10(1 + n) / full;
      const colour = bin === "INF" || (typeof bin === "number" && bin >= 0) ? BEYOND : WITHIN;
      return bar([x, x + STEP], [-i - 1, -i - 1 + height], { colour, name: `${column}: ${n}` });
    });
    const right = excessScale(ends).domain[1], style = { colour: INK, dx: 4, dy: 0 } as const;
    const text = beyond === 0 ? "none beyond" : `${beyond} beyond`;
    return [...bars, words([right, -i - 0.5], { ...style, text, anchor: "start" })];
  });
}

function nothing(width: number): string {
  const style = { text: "No number differs.", colour: INK, dx: 4, dy: 0, anchor: "start" } as const;
  return drawMarks(width, LANE_HEIGHT, [words([0, -LANE_HEIGHT / 2], style)]);
}

/**
 * Draws how far the numbers of two tables lie apart.
 *
 * @param comparison What changed.
 * @returns SVG text.
 */
export function comparisonFigure(comparison: Comparison): string {
  const widthMm = COLUMN_WIDTHS.double;
  const { a, b, columns } = comparison, width = points(widthMm), ends = decades(columns);
  const height = columns.length === 0
    ? LANE_HEIGHT
    : MARGINS.top + LANE_HEIGHT * columns.length + MARGINS.bottom;
  const svg = columns.length === 0 ? nothing(width) : drawPanel({
    width,
    height,
    margins: MARGINS,
    letter: "",
    heading: [{ text: axisLabel(ROWS) }],
    x: excessScale(ends),
    y: laneScale(columns),
    xLabel: axisLabel(EXCESS),
    marks: [...laneMarks(columns, ends), verticalRule(0, INK)],
  });
  const compared = COMPARED.reduce((sum, change) => sum + comparison.rows[change], 0);
  return figureSvg({
    title: COMPARISON_TITLE,
    widthMm,
    height,
    parts: [{ x: 0, y: 0, svg }],
    caption: `${COMPARISON_TITLE}, ${compared} rows with equal inputs; equal numbers with equal ` +
      "bounds are not drawn. A bar holds the rows of a quarter decade, its height grows as " +
      "log(1 + n). Right of the dashed rule two numbers with their bounds have no value in common. " +
      `A: ${a.name}, SHA-256 of results.csv ${a.digest.slice(0, SHORT_STAMP)}; B: ${b.name},`,
    stamp: b.digest,
    stampName: "SHA-256 of results.csv",
  });
}
