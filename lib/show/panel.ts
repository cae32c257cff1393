/**
 * One panel of a figure, drawn by Observable Plot on a detached document. The only file that imports Plot.
 *
 * @module
 */
import * as Plot from "@observablehq/plot";
import { parseHTML } from "linkedom";
import type { Scale } from "./axis.ts";
import { escapeXml, FAINT, FONT_SIZE, INK, TICK_SIZE } from "./figure.ts";

/** A mark of Observable Plot; its coordinates are drawn coordinates of the panel's scales. */
export type Mark = Plot.Markish;

/** Distances between the panel's edges and its plane, in points. */
export interface Margins {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** A piece of a heading in its own colour. */
export interface Words {
  readonly text: string;
  /** @default the ink colour */
  readonly colour?: string;
}

/** What {@linkcode drawPanel} draws. */
export interface PanelOptions {
  /** Whole width, in points. */
  readonly width: number;
  /** Whole height, in points. */
  readonly height: number;
  readonly margins: Margins;
  /** Bold letter before the heading; empty for none. */
  readonly letter: string;
  /** Names the vertical axis with its unit; stands above the plane. */
  readonly heading: readonly Words[];
  readonly x: Scale;
  readonly y: Scale;
  /** Names the horizontal axis with its unit; empty where the panel below carries it. */
  readonly xLabel: string;
  /** Drawn in order, above the grid. */
  readonly marks: readonly Mark[];
}

type PlotDocument = NonNullable<Plot.PlotOptions["document"]>;

/** A document of its own for every panel: Plot needs one, and a global one would mislead other code. */
function detachedDocument(): PlotDocument {
  const page = parseHTML("<!DOCTYPE html><html><body></body></html>");
  return (page as unknown as { readonly document: PlotDocument }).document;
}

/**
 * Draws a panel.
 *
 * @param options Size, scales, labels, marks.
 * @returns SVG elements from (0, 0), without identifiers, classes or style sheets.
 */
export function drawPanel(options: PanelOptions): string {
  const { width, height, margins, x, y, xLabel } = options;
  const tick = { tickSize: 3, tickPadding: 2, color: INK, label: null, fontSize: TICK_SIZE };
  const plot = Plot.plot({
    document: detachedDocument(),
    width,
    height,
    marginLeft: margins.left,
    marginRight: margins.right,
    marginTop: margins.top,
    marginBottom: margins.bottom,
    x: { type: "linear", domain: [...x.domain], axis: null },
    y: { type: "linear", domain: [...y.domain], axis: null },
    marks: [
      Plot.gridX(tickSet(x), { stroke: FAINT, strokeOpacity: 1, strokeWidth: 0.4 }),
      Plot.gridY(tickSet(y), { stroke: FAINT, strokeOpacity: 1, strokeWidth: 0.4 }),
      Plot.axisX(tickSet(x), {
        ...tick,
        ...ticking(x),
        ...(xLabel === "" ? { tickFormat: null } : {}),
      }),
      Plot.axisY(tickSet(y), { ...tick, ...ticking(y) }),
      Plot.frame({ stroke: INK, strokeWidth: 0.5 }),
      ...options.marks,
    ],
  });
  const inner = withoutStyle(plot.innerHTML);
  const middle = margins.left + (width - margins.left - margins.right) / 2;
  const below = `<text x="${middle}" y="${height - 3}" text-anchor="middle" ` +
    `aria-label="x-axis label">${escapeXml(xLabel)}</text>`;
  return `${head(options)}<g font-size="${TICK_SIZE}" text-anchor="middle">${inner}</g>` +
    (xLabel === "" ? "" : below);
}

/**
 * Draws marks without axes; a drawn coordinate is a distance in points, the vertical one counted upwards
 * from the top edge and so negative.
 */
export function drawMarks(width: number, height: number, marks: readonly Mark[]): string {
  const plot = Plot.plot({
    document: detachedDocument(),
    width,
    height,
    margin: 0,
    x: { type: "linear", domain: [0, width], range: [0, width], axis: null },
    y: { type: "linear", domain: [-height, 0], range: [height, 0], axis: null },
    marks: [...marks],
  });
  return withoutStyle(plot.innerHTML);
}

function withoutStyle(svg: string): string {
  return svg.replace(/<style[\s\S]*?<\/style>/, "").replaceAll("currentColor", INK);
}

function head(options: PanelOptions): string {
  const words = options.heading.map(({ text, colour }) =>
    `<tspan fill="${colour ?? INK}">${escapeXml(text)}</tspan>`
  );
  const letter = options.letter === ""
    ? ""
    : `<tspan font-weight="bold">${options.letter}\u00a0\u00a0</tspan>`;
  const at = `x="${options.margins.left}" y="${options.margins.top - 5}"`;
  return `<text ${at} font-size="${FONT_SIZE}" aria-label="y-axis label">${letter}${
    words.join("")
  }</text>`;
}

function tickSet(scale: Scale): number[] | undefined {
  return typeof scale.ticks === "number" ? undefined : [...scale.ticks];
}

function ticking(scale: Scale): { ticks?: number; tickFormat: (t: number) => string } {
  return {
    ...(typeof scale.ticks === "number" ? { ticks: scale.ticks } : {}),
    tickFormat: scale.text,
  };
}

/**
 * A curve; it breaks where a coordinate is not finite.
 *
 * @param points Drawn coordinates.
 * @param colour Stroke colour.
 * @param dashes Lengths of dash and gap, in points; none for a solid line.
 */
export function curve(
  points: readonly (readonly [number, number])[],
  colour: string,
  dashes?: string,
): Mark {
  return Plot.line(points.map(([x, y]) => [x, y]), {
    stroke: colour,
    strokeWidth: 1.1,
    strokeLinejoin: "round",
    ...(dashes === undefined ? {} : { strokeDasharray: dashes }),
  });
}

/** A marker, optionally named for readers' software. */
export function marker(
  at: readonly [number, number],
  options: {
    readonly symbol: string;
    readonly colour: string;
    readonly size?: number;
    readonly name?: string;
  },
): Mark {
  return Plot.dot([[at[0], at[1]]], {
    symbol: options.symbol as Plot.SymbolType,
    r: options.size ?? 2.6,
    stroke: options.colour,
    strokeWidth: 1,
    fill: "none",
    ...(options.name === undefined ? {} : { ariaLabel: options.name }),
  });
}

/** A vertical rule at a drawn coordinate. */
export function verticalRule(x: number, colour: string): Mark {
  return Plot.ruleX([x], { stroke: colour, strokeWidth: 0.7, strokeDasharray: "2 2" });
}

/** A grey band between two drawn heights. */
export function band(y1: number, y2: number): Mark {
  return Plot.rect([[y1, y2]], {
    y1: (d: number[]) => d[0],
    y2: (d: number[]) => d[1],
    fill: "#f2f2f2",
  });
}

/** Text beside a drawn point, moved by (dx, dy) points. */
export function words(
  at: readonly [number, number],
  options: {
    readonly text: string;
    readonly colour: string;
    readonly dx: number;
    readonly dy: number;
    readonly anchor: "start" | "middle" | "end";
  },
): Mark {
  return Plot.text([[at[0], at[1]]], {
    text: [options.text],
    fill: options.colour,
    stroke: "white",
    strokeWidth: 2,
    dx: options.dx,
    dy: options.dy,
    textAnchor: options.anchor,
    fontSize: TICK_SIZE,
  });
}

/** A filled bar between drawn coordinates, optionally named for readers' software. */
export function bar(
  [x1, x2]: readonly [number, number],
  [y1, y2]: readonly [number, number],
  options: { readonly colour: string; readonly name: string },
): Mark {
  return Plot.rect([[x1, x2, y1, y2]], {
    x1: (d: number[]) => d[0],
    x2: (d: number[]) => d[1],
    y1: (d: number[]) => d[2],
    y2: (d: number[]) => d[3],
    fill: options.colour,
    ariaLabel: [options.name],
  });
}
