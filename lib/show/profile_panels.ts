/**
 * Profile of one case: -g_tt, dilaton, curvature, energy density and pressure, from the outside through the
 * locus.
 *
 * @module
 */
import type { Kind } from "../observe/result.ts";
import { axisLabel, decadeScale, evenScale, numberText, powerText, type Scale } from "./axis.ts";
import { placeLabels, type Position } from "./direct_labels.ts";
import { COLUMN_WIDTHS, figureSvg, points, QUIET } from "./figure.ts";
import { KIND_MARKS } from "./kind_marks.ts";
import { curve, drawPanel, type Mark, marker, verticalRule, type Words, words } from "./panel.ts";
import {
  abscissa,
  type DrawnColumn,
  LINEAR_DILATON_AXES,
  log10MinusGtt,
  signedScale,
  SWAVE_AXES,
} from "./profile_axes.ts";
import type { ProfileRows, ResultRow } from "./result_rows.ts";

/** Title of the figure. */
export const PROFILE_TITLE = "Profile";

/** Options of {@linkcode profilePanels}. */
export interface ProfilePanelsOptions {
  /** Width in millimetres: two columns of panels from 120 on, else one. @default 178 */
  readonly widthMm?: number;
}

/** What the locus of a kind is called; kinds without a locus are absent. */
const LOCUS: Readonly<Partial<Record<string, string>>> = {
  "horizon": "horizon",
  "extremal-horizon": "extremal horizon",
  "throat": "throat",
  "semi-infinite-throat": "throat",
  "naked-singularity": "singularity",
  "singular-horizon": "singular horizon",
} satisfies Partial<Record<Kind, string>>;

const MAIN = "#14324f";
const SECOND = "#b4531f";
const MARGINS = { left: 34, right: 9, top: 16, bottom: 13 } as const;
/** Room for the label of the horizontal axis, below the lowest panels. */
const LABEL_HEIGHT = 11;
const PLANE_HEIGHT = 88;

interface Line {
  readonly values: readonly number[];
  readonly colour: string;
  readonly dashes?: string;
}

interface Plane {
  readonly y: Scale;
  readonly lines: readonly Line[];
  readonly heading: readonly Words[];
}

interface Across {
  readonly x: Scale;
  readonly values: readonly number[];
  readonly label: string;
  /** Value at the locus; absent if there is none or it is not finite. */
  readonly locus?: number;
  /** Row at the locus, -1 if the profile has none. */
  readonly origin: number;
}

/**
 * Draws the profile of a case.
 *
 * @param row The case's row of the results table.
 * @param profile Its profile, from outside inwards.
 * @param options Width.
 * @returns SVG text.
 */
export function profilePanels(
  row: ResultRow,
  profile: ProfileRows,
  options: ProfilePanelsOptions = {},
): string {
  const widthMm = options.widthMm ?? COLUMN_WIDTHS.double;
  const columns = widthMm > 120 ? 2 : 1;
  const width = points(widthMm) / columns;
  const shown = shownPart(row, profile);
  const across = acrossOf(row, shown);
  const full = MARGINS.top + PLANE_HEIGHT + MARGINS.bottom;
  const all = planes(row, shown, across.origin);
  const parts = all.map((plane, i) => ({
    x: (i % columns) * width,
    y: Math.floor(i / columns) * full,
    svg: drawPlane(plane, across, { row, width, index: i, lowest: i >= all.length - columns }),
  }));
  return figureSvg({
    title: `${PROFILE_TITLE}: ${row.case}`,
    widthMm,
    height: full * all.length / columns + LABEL_HEIGHT,
    parts,
    caption: caption(row, profile, shown),
    stamp: row.stamp,
  });
}

/**
 * The part that is drawn: behind a locus -g_tt may fall by hundreds of decades more; it is followed for as
 * many decades as lie outside the locus, and for four at least.
 */
function shownPart(row: ResultRow, profile: ProfileRows): ProfileRows {
  const log = log10MinusGtt(profile);
  const origin = profile.proper_distance.indexOf(0);
  const level = log[origin];
  if (LOCUS[row.kind] === undefined || origin < 0 || !Number.isFinite(level)) return profile;
  const floor = level - Math.max(4, Math.abs(level));
  const beyond = log.findIndex((l, i) => i > origin && l < floor);
  if (beyond < 0) return profile;
  const cut = Object.entries(profile).map(([name, values]) => [name, values.slice(0, beyond)]);
  return Object.fromEntries(cut) as unknown as ProfileRows;
}

function columnReader(row: ResultRow, shown: ProfileRows): (name: DrawnColumn) => number[] {
  const axes = row.model === "swave" ? SWAVE_AXES : LINEAR_DILATON_AXES;
  const lambda = row.numbers.lambda ?? 1;
  return (name) => {
    const power = axes[name].power;
    const unit = power === 2 ? lambda * lambda : power === -1 ? 1 / lambda : 1;
    return shown[name].map((value) => value / unit);
  };
}

function acrossOf(row: ResultRow, shown: ProfileRows): Across {
  const axes = row.model === "swave" ? SWAVE_AXES : LINEAR_DILATON_AXES;
  const named = LOCUS[row.kind] !== undefined;
  const name = abscissa(shown, named);
  const values = columnReader(row, shown)(name);
  const x = evenScale(values);
  const origin = named ? shown.proper_distance.indexOf(0) : -1;
  const locus = !named ? NaN : name === "proper_distance" ? 0 : values[origin];
  const axis = name === "sigma"
    ? axes.sigma
    : { ...axes.proper_distance, quantity: `proper distance from the ${LOCUS[row.kind]}` };
  const label = axisLabel(axis, x.exponent);
  return { x, values, label, origin, ...(Number.isFinite(locus) ? { locus } : {}) };
}

function planes(row: ResultRow, shown: ProfileRows, origin: number): Plane[] {
  const axes = row.model === "swave" ? SWAVE_AXES : LINEAR_DILATON_AXES;
  const column = columnReader(row, shown);
  const single = (name: DrawnColumn, values: readonly number[], y: Scale): Plane => ({
    y,
    lines: [{ values, colour: MAIN }],
    heading: [{ text: axisLabel(axes[name], y.exponent) }],
  });
  const scaled = (names: readonly DrawnColumn[]): Scale =>
    signedScale(names.flatMap(column), {
      reference: Math.max(...names.map((name) => Math.abs(column(name)[origin]))),
      length: PLANE_HEIGHT,
    });
  const log = log10MinusGtt(shown);
  const stress = scaled(["energy_density", "pressure"]);
  const { quantity, symbol } = axes.energy_density;
  return [
    single("minus_gtt", log, decadeScale(log)),
    single("dilaton", column("dilaton"), evenScale(column("dilaton"))),
    single("curvature", column("curvature"), scaled(["curvature"])),
    {
      y: stress,
      lines: [
        { values: column("energy_density"), colour: MAIN },
        { values: column("pressure"), colour: SECOND, dashes: "3 1.5" },
      ],
      heading: [
        { text: `${quantity} ${symbol}`, colour: MAIN },
        { text: ", dashed: " },
        { text: axisLabel(axes.pressure, stress.exponent), colour: SECOND },
      ],
    },
  ];
}

interface PlaneOptions {
  readonly row: ResultRow;
  readonly width: number;
  readonly index: number;
  readonly lowest: boolean;
}

function drawPlane(plane: Plane, across: Across, options: PlaneOptions): string {
  const { y, lines } = plane;
  const { x, locus } = across;
  const paths = lines.map(({ values }) =>
    across.values.map((value, i) => [x.place(value), y.place(values[i])] as const)
  );
  const marks: Mark[] = locus === undefined ? [] : [verticalRule(x.place(locus), QUIET)];
  paths.forEach((path, i) => marks.push(curve(path, lines[i].colour, lines[i].dashes)));
  if (locus !== undefined) {
    const mark = KIND_MARKS[options.row.kind as Kind];
    for (const { values } of lines) {
      const level = y.place(values[across.origin] ?? NaN);
      if (!Number.isFinite(level)) continue;
      marks.push(marker([x.place(locus), level], { ...mark, name: "locus" }));
    }
    if (options.index === 0) {
      marks.push(...locusName(x.place(locus), { plane, across, options, paths }));
    }
  }
  const extra = options.lowest ? LABEL_HEIGHT : 0;
  return drawPanel({
    width: options.width,
    height: MARGINS.top + PLANE_HEIGHT + MARGINS.bottom + extra,
    margins: { ...MARGINS, bottom: MARGINS.bottom + extra },
    letter: String.fromCharCode(97 + options.index),
    heading: plane.heading,
    x,
    y,
    xLabel: options.lowest ? across.label : "",
    marks,
  });
}

/** The name of the locus beside its rule, where the curve leaves room. */
function locusName(
  at: number,
  drawn: {
    readonly plane: Plane;
    readonly across: Across;
    readonly options: PlaneOptions;
    readonly paths: readonly (readonly (readonly [number, number])[])[];
  },
): Mark[] {
  const { x, y } = { x: drawn.across.x, y: drawn.plane.y };
  const right = drawn.options.width - MARGINS.right;
  const perX = (right - MARGINS.left) / (x.domain[1] - x.domain[0]);
  const perY = PLANE_HEIGHT / (y.domain[1] - y.domain[0]);
  const bottom = MARGINS.top + PLANE_HEIGHT;
  const place = ([tx, ty]: readonly [number, number]): Position => [
    MARGINS.left + (tx - x.domain[0]) * perX,
    bottom - (ty - y.domain[0]) * perY,
  ];
  const heights = [0.93, 0.07, 0.75, 0.5, 0.25].map((part) =>
    y.domain[0] + part * (y.domain[1] - y.domain[0])
  );
  const name = LOCUS[drawn.options.row.kind] ?? "";
  const curves = drawn.paths.flat().map(place).filter((p) => p.every(Number.isFinite));
  for (const height of heights) {
    const group = { text: name, at: [place([at, height])] };
    const plane = { left: MARGINS.left, right, top: MARGINS.top, bottom };
    const [label] = placeLabels([group, { text: "", at: dense(curves) }], plane);
    if (label === undefined || label.text !== name || label.anchor === "middle") continue;
    const colour = KIND_MARKS[drawn.options.row.kind as Kind].colour;
    return [words([at, height], { ...label, colour })];
  }
  return [];
}

/** Points of a polygonal line at most two points apart. */
function dense(path: readonly Position[]): Position[] {
  return path.flatMap(([x, y], i) => {
    const [x2, y2] = path[i + 1] ?? [x, y];
    const steps = Math.max(1, Math.ceil(Math.max(Math.abs(x2 - x), Math.abs(y2 - y)) / 2));
    return Array.from(
      { length: steps },
      (_, k) => [x + (x2 - x) * k / steps, y + (y2 - y) * k / steps] as const,
    );
  });
}

function caption(row: ResultRow, profile: ProfileRows, shown: ProfileRows): string {
  const { kappa, lambda, a, mass, bath_ratio, wall_radius, log10_minus_gtt_locus } = row.numbers;
  const given: readonly (readonly [string, number | undefined])[] = [
    ["\u03ba", kappa],
    ["\u03bb", lambda],
    ["a", a],
    ["M", mass],
    ["\u03c4", bath_ratio],
    ["r_{wall}", wall_radius],
  ];
  const listed = given.filter(([, value]) => value !== undefined)
    .map(([name, value]) => `${name} = ${numberText(value!)}`).join(", ");
  const log = log10_minus_gtt_locus;
  const at = LOCUS[row.kind] === undefined || log === undefined
    ? "."
    : `, with log_{10}(\u2212g_{tt}) = ${numberText(log)} at the ${LOCUS[row.kind]}.`;
  const last = log10MinusGtt(profile).at(-1) ?? NaN;
  const cut = shown.rho.length === profile.rho.length || !Number.isFinite(last)
    ? ""
    : ` Farther in, not drawn, the profile goes on to ${powerText(Math.round(last))}.`;
  return `${PROFILE_TITLE} of ${row.case}: ${row.model}, ${row.state}, ${listed}; ` +
    `${row.kind}${at}${cut}`;
}
