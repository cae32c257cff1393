/**
 * How small -g_tt gets at the throat, over hierarchies of scales: the leading tensor of the anomaly in four dimensions
 * beside the s-wave reduction, and their laws.
 *
 * @module
 */
import { sha256 } from "../batch/stamp.ts";
import {
  anomalyOf,
  type BetaScheme,
  type FieldContent,
  leadingCoefficient,
} from "../model/content.ts";
import type { Bounded } from "../observe/result.ts";
import { type Axis, axisLabel, decadeScale } from "./axis.ts";
import { boundedText } from "./bounded_text.ts";
import { COLUMN_WIDTHS, figureSvg, points, SHORT_STAMP } from "./figure.ts";
import { DISPLAY, type Displayable, displayable } from "./notebook/display.ts";
import type { MimeBundle } from "./notebook/document.ts";
import { curve, drawPanel, marker, words } from "./panel.ts";
import type { Solution } from "./solution.ts";
import { solve } from "./solve.ts";
import { tableBundle } from "./table_bundle.ts";

/** Title of the figure. */
export const HIERARCHY_TITLE = "Redshift at the throat over the hierarchy of scales";

const SCALE: Axis = { quantity: "hierarchy", symbol: "G/M^{2}", unit: "dimensionless" };
const REDSHIFT: Axis = {
  quantity: "redshift factor at the throat",
  symbol: "\u2212g_{tt}",
  unit: "dimensionless",
};
/** Axes of the figure. */
export const HIERARCHY_AXES: readonly Axis[] = [SCALE, REDSHIFT];

const FOUR = "#14324f";
const WAVE = "#b4531f";
const MARGINS = { left: 38, right: 10, top: 15, bottom: 24 } as const;

/** One mass: both solutions, and -g_tt over its law. */
export interface HierarchyRow {
  /** M, in Planck masses. */
  readonly mass: number;
  /** The minimal sphere of the anomaly's leading tensor. */
  readonly four: Solution;
  /** The throat of the s-wave reduction with the content's scalars. */
  readonly wave: Solution;
  /** (1/4) sqrt((a + beta/2)/S), S = 4 pi M^2. */
  readonly fourLaw: number;
  /** kappa/(4 S). */
  readonly waveLaw: number;
}

/** What is asked. */
export interface HierarchyOptions {
  /** Content; the s-wave reduction takes its scalars, of which there must be one. */
  readonly content: FieldContent;
  /** What fixes the vectors' part of beta. */
  readonly scheme: BetaScheme;
  /** Masses M in Planck masses. */
  readonly masses: readonly number[];
}

const redshift = (solution: Solution): Bounded => solution.numbers.minus_gtt_locus!;

/** -g_tt at the throat over hierarchies; shows itself as a table. */
export class RedshiftHierarchy implements Displayable {
  /** One row for each mass. */
  readonly rows: readonly HierarchyRow[];

  /**
   * A view of rows.
   *
   * @param rows One for each mass, in the order of the table.
   */
  constructor(rows: readonly HierarchyRow[]) {
    this.rows = rows;
  }

  /** SHA-256 of the stamps of all solutions. */
  get stamp(): string {
    return sha256(this.rows.map(({ four, wave }) => `${four.stamp}${wave.stamp}`).join("\n"));
  }

  /** The table. */
  [DISPLAY](): MimeBundle {
    const header = [
      "M",
      "anomaly: -g_tt",
      "over its law",
      "s-wave: -g_tt",
      "over its law",
      "Stamps",
    ];
    const lines = this.rows.map(({ mass, four, wave, fourLaw, waveLaw }) => [
      mass.toExponential(0),
      boundedText(redshift(four)),
      (redshift(four).value / fourLaw).toFixed(9),
      boundedText(redshift(wave)),
      (redshift(wave).value / waveLaw).toFixed(9),
      `${four.stamp.slice(0, SHORT_STAMP)} ${wave.stamp.slice(0, SHORT_STAMP)}`,
    ]);
    return tableBundle(header, lines);
  }

  /**
   * The figure: both results as marks, both laws as lines.
   *
   * @returns an object that shows itself
   */
  figure(): Displayable {
    const { rows } = this, widthMm = COLUMN_WIDTHS.single, width = points(widthMm), height = 150;
    const x = (mass: number) => -2 * Math.log10(mass);
    const four = rows.map((r) => [x(r.mass), Math.log10(redshift(r.four).value)] as const);
    const wave = rows.map((r) => [x(r.mass), Math.log10(redshift(r.wave).value)] as const);
    const law = (of: (r: HierarchyRow) => number) =>
      rows.map((r) => [x(r.mass), Math.log10(of(r))] as const);
    const far = Math.floor(0.75 * rows.length); // where the lines are well apart
    const svg = drawPanel({
      width,
      height,
      margins: MARGINS,
      letter: "",
      heading: [{ text: axisLabel(REDSHIFT) }],
      x: decadeScale(four.map(([at]) => at)),
      y: decadeScale([...four, ...wave].map(([, at]) => at)),
      xLabel: axisLabel(SCALE),
      marks: [
        curve(law((r) => r.fourLaw), FOUR),
        curve(law((r) => r.waveLaw), WAVE),
        ...four.map((at) => marker(at, { symbol: "circle", colour: FOUR })),
        ...wave.map((at) => marker(at, { symbol: "square", colour: WAVE })),
        words(four[far]!, {
          text: "four dimensions",
          colour: FOUR,
          dx: -2,
          dy: -10,
          anchor: "end",
        }),
        words(wave[far]!, {
          text: "s-wave reduction",
          colour: WAVE,
          dx: 6,
          dy: 9,
          anchor: "start",
        }),
      ],
    });
    const caption =
      "Marks: solutions. Lines: (1/4)\u221a((a + \u03b2/2)/S) and \u03ba/(4S), S = 4\u03c0M^{2}. " +
      "Four dimensions: the leading tensor at the would-be horizon is the whole source, reduced in order.";
    return displayable({
      "image/svg+xml": figureSvg({
        title: HIERARCHY_TITLE,
        widthMm,
        height,
        parts: [{ x: 0, y: 0, svg }],
        caption,
        stamp: this.stamp,
      }),
      "text/plain": HIERARCHY_TITLE,
    });
  }
}

/**
 * Solves the minimal sphere in four dimensions and the throat of the s-wave reduction for many masses.
 *
 * @param options Content, scheme, masses.
 * @returns Both with their laws.
 * @throws {RangeError} if the content has no scalar or its leading term is not positive.
 * @example One over the square root of the entropy, and one over the entropy
 * ```ts
 * import { redshiftHierarchy } from "@backstamp/backstamp";
 * const content = { scalars: 1, weyl: 0, vectors: 0 };
 * const { rows } = await redshiftHierarchy({ content, scheme: "zeta", masses: [1e6] });
 * const { four, fourLaw } = rows[0]!;
 * if (Math.abs(four.numbers.minus_gtt_locus!.value / fourLaw - 1) > 1e-6) throw new Error("not the law");
 * ```
 */
export async function redshiftHierarchy(options: HierarchyOptions): Promise<RedshiftHierarchy> {
  const { content, scheme, masses } = options, coefficients = anomalyOf(content, scheme);
  const number = ({ p, q }: { p: bigint; q: bigint }) => Number(p) / Number(q);
  const leading = number(leadingCoefficient(coefficients));
  if (!(content.scalars > 0 && leading > 0)) {
    throw new RangeError(
      "Cannot compare the laws as there must be a scalar and a + beta/2 must be positive: " +
        `current values are ${content.scalars} and ${leading}`,
    );
  }
  const rows = masses.map(async (mass): Promise<HierarchyRow> => {
    const S = 4 * Math.PI * mass * mass;
    const four = await solve({
      model: "anomaly4d",
      state: "boulware",
      realScalars: content.scalars,
      diracSpinors: content.weyl / 2,
      vectors: content.vectors,
      beta: number(coefficients.beta),
      mass,
    });
    const wave = await solve({
      model: "swave",
      state: "boulware",
      nScalars: content.scalars,
      mass,
    });
    return {
      mass,
      four,
      wave,
      fourLaw: Math.sqrt(leading / S) / 4,
      waveLaw: content.scalars / 12 / (4 * S),
    };
  });
  return new RedshiftHierarchy(await Promise.all(rows));
}
