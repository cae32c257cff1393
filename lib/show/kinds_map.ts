/**
 * Map of kinds: which kind of static solution stands where in the plane of mass and bath ratio, one panel per
 * model. Rows without a kind, and undecided ones, stand in lanes below the plane.
 *
 * @module
 */
import { KINDS } from "../observe/result.ts";
import { type Axis, axisLabel, type Scale, signed, symmetricLogScale } from "./axis.ts";
import { type LabelGroup, placeLabels } from "./direct_labels.ts";
import { COLUMN_WIDTHS, figureSvg, type Part, points, textWidth, TICK_SIZE } from "./figure.ts";
import { KIND_MARKS, type KindMark, type Lane, LANE_MARKS, LANES } from "./kind_marks.ts";
import { band, drawMarks, drawPanel, type Mark, marker, words } from "./panel.ts";
import type { ResultRow } from "./result_rows.ts";

/** Title of the figure. */
export const KINDS_MAP_TITLE = "Map of kinds";

const MASS: Axis = { quantity: "mass", symbol: "m/\u03ba", unit: "dimensionless" };
const PLANCK_MASS: Axis = { quantity: "mass", symbol: "M", unit: "Planck masses" };
const SWAVE_MASS: Axis = { quantity: "mass", symbol: "M/\u221a\u03ba", unit: "Planck masses" };
const BATH: Axis = { quantity: "bath ratio", symbol: "\u03c4", unit: "dimensionless" };
/** Axes of the figure. */
export const KINDS_MAP_AXES: readonly Axis[] = [MASS, PLANCK_MASS, SWAVE_MASS, BATH];

/** Options of {@linkcode kindsMap}. */
export interface KindsMapOptions {
  /** Hexadecimal digest of the results table; the caption shows its first digits. */
  readonly stamp: string;
  /** Width in millimetres. @default 178 */
  readonly widthMm?: number;
}

/** Where a row stands: in the plane, in a lane, or nowhere because its mass is not known. */
export interface MapPlace {
  readonly row: ResultRow;
  /** m/kappa with m = M/lambda; swave: M/sqrt(kappa). Absent where no mass is known. */
  readonly mass?: number;
  /** Bath ratio; absent in lanes. */
  readonly bath?: number;
  /** Lane; absent in the plane. */
  readonly lane?: Lane;
}

/**
 * Finds where a row stands on the map.
 *
 * @param row A row of a results table.
 */
export function mapPlace(row: ResultRow): MapPlace {
  const { kappa, lambda = 1, mass, bath_ratio: bath } = row.numbers;
  const scaled = row.model === "anomaly4d"
    ? mass
    : row.model === "swave"
    ? mass / Math.sqrt(kappa)
    : mass / lambda / kappa;
  const place = Number.isFinite(scaled) ? { row, mass: scaled } : { row };
  const decided = row.outcome === "solved" && row.kind !== "undecided";
  if (decided && Number.isFinite(bath)) return { ...place, bath };
  const lane = row.outcome === "refused" || row.outcome === "failed" ? row.outcome : "undecided";
  return { ...place, lane };
}

const massAxis = (model: string): Axis =>
  model === "anomaly4d" ? PLANCK_MASS : model === "swave" ? SWAVE_MASS : MASS;

const MARGINS = { left: 38, right: 8, top: 15, bottom: 24 } as const;
const PLANE_HEIGHT = 105;
const LANE_HEIGHT = 10;

/**
 * Draws the map of kinds.
 *
 * @param rows Rows of a results table, in any order.
 * @param options Stamp and width.
 * @returns SVG text.
 */
export function kindsMap(rows: readonly ResultRow[], options: KindsMapOptions): string {
  const widthMm = options.widthMm ?? COLUMN_WIDTHS.double;
  const width = points(widthMm);
  const places = rows.map(mapPlace);
  const models = [...new Set(rows.map((row) => row.model))];
  const lanes = LANES.filter((lane) => places.some((p) => p.lane === lane));
  const columns = widthMm > 120 && models.length > 1 ? 2 : 1;
  const cell = { width: width / columns, height: 0 };
  cell.height = MARGINS.top + PLANE_HEIGHT + LANE_HEIGHT * lanes.length + MARGINS.bottom;
  const layout = {
    cell,
    lanes,
    x: symmetricLogScale([0, 10, ...places.map((p) => p.mass ?? NaN)], {
      threshold: 0.1,
      root: true,
      length: cell.width - MARGINS.left - MARGINS.right,
      gap: 19,
    }),
    y: bathScale(places.map((p) => p.bath ?? NaN), lanes),
  };
  const labelled = new Set<string>();
  const parts: Part[] = models.map((model, i) => ({
    x: (i % columns) * cell.width,
    y: Math.floor(i / columns) * (cell.height + 4),
    svg: panel({ model, letter: String.fromCharCode(97 + i) }, { places, layout, labelled }),
  }));
  const height = Math.ceil(models.length / columns) * (cell.height + 4);
  const key = keyOf(places, labelled, width);
  return figureSvg({
    title: KINDS_MAP_TITLE,
    widthMm,
    height: height + key.height,
    parts: [...parts, { x: 0, y: height, svg: key.svg }],
    caption: caption(places),
    stamp: options.stamp,
    stampName: "SHA-256 of results.csv",
  });
}

interface Layout {
  readonly cell: { readonly width: number; readonly height: number };
  readonly lanes: readonly Lane[];
  readonly x: Scale;
  readonly y: Scale;
}

function panel(
  at: { readonly model: string; readonly letter: string },
  map: {
    readonly places: readonly MapPlace[];
    readonly layout: Layout;
    readonly labelled: Set<string>;
  },
): string {
  const { cell, lanes, x, y } = map.layout;
  const own = map.places.filter((p) => p.row.model === at.model && p.mass !== undefined);
  const marks: Mark[] = lanes.length === 0 ? [] : [band(y.domain[0], laneEdge(y))];
  const groups: (LabelGroup & { mark: KindMark })[] = [];
  const right = cell.width - MARGINS.right;
  const bottom = cell.height - MARGINS.bottom;
  const inPoints = ([tx, ty]: readonly [number, number]): [number, number] => [
    MARGINS.left + (tx - x.domain[0]) / (x.domain[1] - x.domain[0]) * (right - MARGINS.left),
    bottom - (ty - y.domain[0]) / (y.domain[1] - y.domain[0]) * (bottom - MARGINS.top),
  ];
  for (const p of own) {
    const mark = p.lane === undefined ? kindMark(p.row.kind) : LANE_MARKS[p.lane];
    const height = p.lane === undefined ? y.place(p.bath!) : lanePlace(lanes.indexOf(p.lane));
    const point = [x.place(p.mass!), height] as const;
    marks.push(marker(point, { ...mark, name: p.row.case }));
    if (p.lane !== undefined) continue;
    const group = groups.find((g) => g.text === p.row.kind);
    if (group === undefined) groups.push({ text: p.row.kind, at: [inPoints(point)], mark });
    else (group.at as [number, number][]).push(inPoints(point));
  }
  const plane = { left: MARGINS.left, right, top: MARGINS.top, bottom: inPoints([0, 0])[1] + 5 };
  // Small groups first: they have the fewest places to choose from.
  const order = [...groups].sort((a, b) => a.at.length - b.at.length);
  for (const label of placeLabels(order, plane)) {
    map.labelled.add(label.text);
    const [px, py] = label.at;
    const tx = x.domain[0] +
      (px - MARGINS.left) / (right - MARGINS.left) * (x.domain[1] - x.domain[0]);
    const ty = y.domain[0] +
      (bottom - py) / (bottom - MARGINS.top) * (y.domain[1] - y.domain[0]);
    marks.push(words([tx, ty], { ...label, colour: kindMark(label.text).colour }));
  }
  return drawPanel({
    ...cell,
    margins: MARGINS,
    letter: at.letter,
    heading: [{ text: `${at.model}: ${axisLabel(BATH)}` }],
    x,
    y,
    xLabel: axisLabel(massAxis(at.model)),
    marks,
  });
}

function kindMark(kind: string): KindMark {
  return KIND_MARKS[KINDS.find((k) => k === kind) ?? "undecided"];
}

/** Height of a lane, below 0 where the plane ends; the plane's own height is 1. */
function lanePlace(lane: number): number {
  return -0.06 - (lane + 0.5) * LANE_HEIGHT / PLANE_HEIGHT;
}

function laneEdge(y: Scale): number {
  return Math.max(y.domain[0], -0.055);
}

/** Even up to 4; above, logarithmic in 1 + bath ratio. Lanes are ticks with their names. */
function bathScale(baths: readonly number[], lanes: readonly Lane[]): Scale {
  const top = Math.max(1.25, ...baths.filter(Number.isFinite));
  const raw = top <= 4 ? (t: number) => t : (t: number) => Math.log10(1 + t);
  const full = 1.07 * raw(top);
  const step = top <= 2 ? 0.5 : 1;
  const steps = Array.from({ length: Math.floor(top / step) + 1 }, (_, i) => i * step);
  const powers = Array.from({ length: Math.floor(Math.log10(top)) + 1 }, (_, i) => 10 ** i);
  const every = Math.ceil(powers.length / 6);
  const values = top <= 4 ? steps : [0, ...powers.filter((_, i) => i % every === 0)];
  const labels = new Map(values.map((v) => [raw(v) / full, tick(v)]));
  lanes.forEach((lane, i) => labels.set(lanePlace(i), lane));
  return {
    domain: [lanes.length === 0 ? -0.06 : lanePlace(lanes.length - 0.5), 1],
    place: (t) => raw(t) / full,
    ticks: [...labels.keys()],
    text: (t) => labels.get(t) ?? "",
    exponent: 0,
  };
}

function tick(value: number): string {
  return value < 1e4 ? signed(value) : `10^{${Math.round(Math.log10(value))}}`;
}

/** A line of markers with names for the kinds that found no room for a label in any panel. */
function keyOf(places: readonly MapPlace[], labelled: ReadonlySet<string>, width: number) {
  const present = KINDS.filter((kind) =>
    !labelled.has(kind) && places.some((p) => p.lane === undefined && p.row.kind === kind)
  );
  const marks: Mark[] = [];
  let [left, y] = [MARGINS.left, 6];
  for (const kind of present) {
    const extent = textWidth(kind, TICK_SIZE) + 18;
    if (left + extent > width) [left, y] = [MARGINS.left, y + 11];
    marks.push(marker([left, -y], KIND_MARKS[kind]));
    const style = { text: kind, colour: KIND_MARKS[kind].colour, dx: 6, dy: 0 };
    marks.push(words([left, -y], { ...style, anchor: "start" }));
    left += extent;
  }
  const height = present.length === 0 ? 0 : y + 6;
  return { height, svg: height === 0 ? "" : drawMarks(width, height, marks) };
}

function caption(places: readonly MapPlace[]): string {
  const lost = places.filter((p) => p.mass === undefined).map((p) => p.row.case);
  const listed = lost.length > 6 ? [...lost.slice(0, 6), `${lost.length - 6} more`] : lost;
  const without = lost.length === 0
    ? ""
    : ` Rows without a mass are not drawn: ${listed.join(", ")}.`;
  return `${KINDS_MAP_TITLE}, ${places.length} rows. Ticks of the horizontal axis mark the values; ` +
    "distances on it grow as the square root of log(1 + 10 |mass|), with the sign of the mass. " +
    `Grey lanes hold rows without a decided kind, at their mass.${without}`;
}
