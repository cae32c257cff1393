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
/** Room between the decades and the bars of equal and of infinitely distant numbers, in bars. */
const GAP = 2.5;
/** Decades from which on bars are wider. */
const MOST_DECADES = 16;

/** What became of rows that were compared number by number. */
const COMPARED = ["identical", "stamp", "within", "beyond", "kind"] as const;

type Bin = number | "0" | "INF";

/** The horizontal axis, in decades. */
interface Decades {
  readonly low: number;
  readonly high: number;
  /** Width of a bar: a quarter of a decade, or a whole multiple of it where the axis is long. */
  readonly step: number;
  /** Left edge of a bin. */
  readonly edge: (bin: Bin) => number;
}

/** Decades that hold all bins, the bound itself among them. */
function decadesOf(columns: readonly ColumnChange[]): Decades {
  const bins = columns.flatMap(({ sizes }) =>
    [...sizes.keys()].filter((b) => typeof b === "number")
  );
  const least = bins.reduce((least, bin) => Math.min(least, bin), -BINS_PER_DECADE);
  const most = bins.reduce((most, bin) => Math.max(most, bin + 1), BINS_PER_DECADE);
  const low = Math.floor(least * STEP), high = Math.ceil(most * STEP);
  const joined = Math.max(1, Math.ceil((high - low) / MOST_DECADES)), step = joined * STEP;
  const edge = (bin: Bin): number => {
    if (bin === "0") return low - (GAP + 1) * step;
    return bin === "INF" ? high + GAP * step : Math.floor(bin / joined) * step;
  };
  return { low, high, step, edge };
}

function excessScale({ low, high, step, edge }: Decades): Scale {
  const every = Math.ceil((high - low) / 10);
  const powers = Array.from({ length: high - low + 1 }, (_, i) => low + i)
    .filter((power) => power % every === 0);
  const zero = edge("0") + step / 2, infinite = edge("INF") + step / 2;
  return {
    domain: [zero - 2 * step, infinite + 2 * step],
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

/** Rows by bar: bins that share one are added up. */
function barsOf({ sizes }: ColumnChange, { edge }: Decades): ReadonlyMap<number, number> {
  const bars = new Map<number, number>();
  for (const [bin, n] of sizes) bars.set(edge(bin), (bars.get(edge(bin)) ?? 0) + n);
  return bars;
}

function laneMarks(columns: readonly ColumnChange[], decades: Decades): Mark[] {
  const lanes = columns.map((column) => barsOf(column, decades));
  const most = lanes.flatMap((bars) => [...bars.values()]).reduce((m, n) => Math.max(m, n), 1);
  const right = excessScale(decades).domain[1];
  return columns.flatMap(({ column, beyond }, i) => {
    const bars = [...lanes[i]].map(([x, n]) => {
      const height = 0.85 * Math.log10(1 + n) / Math.log10(1 + most);
      const style = { colour: x >= 0 ? BEYOND : WITHIN, name: `${column}: ${n}` };
      return bar([x, x + decades.step], [-i - 1, -i - 1 + height], style);
    });
    const style = { colour: INK, dx: 4, dy: 0, anchor: "start" } as const;
    const text = beyond === 0 ? "none beyond" : `${beyond} beyond`;
    return [...bars, words([right, -i - 0.5], { ...style, text })];
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
  const { a, b, columns } = comparison, width = points(widthMm), decades = decadesOf(columns);
  const height = columns.length === 0
    ? LANE_HEIGHT
    : MARGINS.top + LANE_HEIGHT * columns.length + MARGINS.bottom;
  const svg = columns.length === 0 ? nothing(width) : drawPanel({
    width,
    height,
    margins: MARGINS,
    letter: "",
    heading: [{ text: axisLabel(ROWS) }],
    x: excessScale(decades),
    y: laneScale(columns),
    xLabel: axisLabel(EXCESS),
    marks: [...laneMarks(columns, decades), verticalRule(0, INK)],
  });
  const compared = COMPARED.reduce((sum, change) => sum + comparison.rows[change], 0);
  return figureSvg({
    title: COMPARISON_TITLE,
    widthMm,
    height,
    parts: [{ x: 0, y: 0, svg }],
    caption: `${COMPARISON_TITLE}, ${compared} rows with equal inputs; equal numbers with equal ` +
      `bounds are not drawn. A bar holds the rows of ${decades.step} decades, its height grows as ` +
      "log(1 + n). Right of the dashed rule two numbers with their bounds have no value in common. " +
      `A: ${a.name}, SHA-256 of results.csv ${a.digest.slice(0, SHORT_STAMP)}; B: ${b.name},`,
    stamp: b.digest,
    stampName: "SHA-256 of results.csv",
  });
}
