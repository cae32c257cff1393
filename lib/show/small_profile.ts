/**
 * A profile at a glance: log10 of -g_tt against proper distance, without numbers on its axes.
 *
 * @module
 */
import type { Profile } from "../observe/result.ts";
import { escapeXml } from "./figure.ts";

const WIDTH = 240;
const HEIGHT = 80;
const MARGIN = 4;
/** Points drawn at most. */
const POINTS = 200;
/** The far region, where -g_tt is this near to 1, is cut off: it may be thousands of times as long. */
const FAR = 0.9;
/** Decades of -g_tt that are drawn outside a horizon. */
const DECADES = 6;

/**
 * Draws the small profile.
 *
 * @param profile profile, from outside inwards
 * @returns SVG text, empty if there are not two points to draw
 */
export function smallProfile(profile: Profile): string {
  const points = chosen(profile);
  if (points.length < 2) return "";
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  const place = (values: readonly number[], size: number) => {
    const low = Math.min(...values), range = Math.max(...values) - low || 1;
    return (value: number): number => MARGIN + (value - low) / range * (size - 2 * MARGIN);
  };
  const [px, py] = [place([...xs, 0], WIDTH), place(ys, HEIGHT)];
  const path = points.map(([x, y]) => `${px(x).toFixed(1)},${(HEIGHT - py(y)).toFixed(1)}`);
  const locus = px(0).toFixed(1);
  const label = "log10 of -g_tt against proper distance; the dashed line is the locus";
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}" role="img">` +
    `<title>${escapeXml(label)}</title>` +
    `<line x1="${locus}" x2="${locus}" y1="0" y2="${HEIGHT}" stroke="#6b6b6b" stroke-dasharray="3 3"/>` +
    `<polyline points="${path.join(" ")}" fill="none" stroke="#14324f" stroke-width="1.5"/></svg>`;
}

function chosen(profile: Profile): Array<readonly [number, number]> {
  const all = [...profile.proper_distance].map((x, i) =>
    [x, Math.log10(profile.minus_gtt[i])] as const
  ).filter(([x, y]) => Number.isFinite(x) && Number.isFinite(y));
  const near = Math.max(0, all.findIndex(([, y]) => y < Math.log10(FAR)) - 1);
  // behind a locus as many decades are followed as lie outside it; a horizon lies infinitely deep
  const locus = all.find(([x]) => x === 0)?.[1];
  const floor = locus === undefined ? -DECADES : 2 * locus;
  const deep = all.findIndex(([, y]) => y < floor);
  const drawn = all.slice(near, deep < 0 ? undefined : deep);
  const step = Math.ceil(drawn.length / POINTS);
  return drawn.filter((_, i) => i % step === 0 || i === drawn.length - 1);
}
