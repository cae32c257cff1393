/**
 * Places one label beside a group of markers so that it covers no marker and no other label.
 *
 * @module
 */
import { textWidth, TICK_SIZE } from "./figure.ts";

/** A position in points, y downwards. */
export type Position = readonly [number, number];

/** Markers that share a label. */
export interface LabelGroup {
  readonly text: string;
  readonly at: readonly Position[];
}

/** A placed label: the marker it belongs to and how far from it the text stands. */
export interface PlacedLabel {
  readonly text: string;
  readonly at: Position;
  readonly dx: number;
  readonly dy: number;
  readonly anchor: "start" | "middle" | "end";
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Half the extent of a marker with a little air, in points. */
const MARKER = 3.6;
/** Half the height of a line of text, in points. */
const HALF_LINE = TICK_SIZE * 0.5;

const PLACES = [
  { dx: 5, dy: 0, anchor: "start" },
  { dx: -5, dy: 0, anchor: "end" },
  { dx: 0, dy: -7.5, anchor: "middle" },
  { dx: 0, dy: 7.5, anchor: "middle" },
  { dx: 4, dy: -7, anchor: "start" },
  { dx: 4, dy: 7, anchor: "start" },
  { dx: -4, dy: -7, anchor: "end" },
  { dx: -4, dy: 7, anchor: "end" },
] as const;

/**
 * Places a label for each group where there is room: of all free places beside its markers the one farthest
 * from other groups.
 *
 * @param groups Groups with the positions of their markers.
 * @param plane The box that labels must stay in.
 * @returns Labels in the order of the groups; a group without room has none.
 */
export function placeLabels(groups: readonly LabelGroup[], plane: Box): PlacedLabel[] {
  const taken: Box[] = [];
  const placed: PlacedLabel[] = [];
  for (const group of groups) {
    const others = groups.filter((g) => g !== group).flatMap((g) => g.at);
    let best: { label: PlacedLabel; box: Box; clear: number } | undefined;
    for (const at of group.at) {
      for (const place of PLACES) {
        const label = { text: group.text, at, ...place };
        const box = boxOf(label);
        if (!inside(box, plane) || taken.some((b) => gap(box, b) <= 1)) continue;
        if ([...others, ...group.at].some((p) => gap(box, around(p)) <= 0)) continue;
        const clear = Math.min(40, ...others.map((p) => gap(box, around(p))));
        if (best === undefined || clear > best.clear + 1e-9) best = { label, box, clear };
      }
    }
    if (best === undefined) continue;
    placed.push(best.label);
    taken.push(best.box);
  }
  return placed;
}

function boxOf({ text, at: [x, y], dx, dy, anchor }: PlacedLabel): Box {
  const width = textWidth(text, TICK_SIZE);
  const start = x + dx - (anchor === "start" ? 0 : anchor === "end" ? width : width / 2);
  return { left: start, right: start + width, top: y + dy - HALF_LINE, bottom: y + dy + HALF_LINE };
}

function around([x, y]: Position): Box {
  return { left: x - MARKER, right: x + MARKER, top: y - MARKER, bottom: y + MARKER };
}

function inside(box: Box, plane: Box): boolean {
  return box.left > plane.left && box.right < plane.right && box.top > plane.top &&
    box.bottom < plane.bottom;
}

/** Distance between two boxes; not positive if they meet. */
function gap(a: Box, b: Box): number {
  const x = Math.max(a.left - b.right, b.left - a.right);
  const y = Math.max(a.top - b.bottom, b.top - a.bottom);
  return x > 0 && y > 0 ? Math.sqrt(x * x + y * y) : Math.max(x, y);
}
