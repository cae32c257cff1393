/**
 * Colour and shape of every kind. The shapes alone tell the kinds apart; the colours differ in lightness as
 * well as in hue, so that they survive print in grey and red-green blindness.
 *
 * @module
 */
import type { Kind } from "../observe/result.ts";

/** How a kind of row is marked. */
export interface KindMark {
  /** Colour of marker and label. */
  readonly colour: string;
  /** Shape, a symbol name of Observable Plot. */
  readonly symbol: string;
}

/** Marks of the kinds. */
export const KIND_MARKS: Readonly<Record<Kind, KindMark>> = {
  "horizon": { colour: "#14324f", symbol: "circle" },
  "extremal-horizon": { colour: "#3f78a8", symbol: "hexagon" },
  "throat": { colour: "#b4531f", symbol: "diamond" },
  "semi-infinite-throat": { colour: "#8a6d1f", symbol: "triangle" },
  "naked-singularity": { colour: "#7d1d4c", symbol: "asterisk" },
  "marginal": { colour: "#2f7566", symbol: "square" },
  "vacuum": { colour: "#4d4d4d", symbol: "plus" },
  "constant-dilaton": { colour: "#5c5f2b", symbol: "star" },
  "singular-horizon": { colour: "#6a4fa0", symbol: "wye" },
  "undecided": { colour: "#6b6b6b", symbol: "triangle2" },
};

/** Rows without a kind, and undecided ones: each has a lane of its own below the plane. */
export const LANES = ["undecided", "refused", "failed"] as const;
/** One of {@linkcode LANES}. */
export type Lane = (typeof LANES)[number];

/** Marks of the lanes. */
export const LANE_MARKS: Readonly<Record<Lane, KindMark>> = {
  undecided: KIND_MARKS.undecided,
  refused: { colour: "#6b6b6b", symbol: "times" },
  failed: { colour: "#a01818", symbol: "square2" },
};
