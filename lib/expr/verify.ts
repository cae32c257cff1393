/**
 * Numeric witnesses at high precision: whether two expressions agree, whether one is zero, whether one
 * is the derivative of another by finite differences. This, not the algebra system, decides.
 *
 * @module
 */
import { points, type Ranges } from "./points.ts";
import { type BigNumber, type Precise, precise } from "./precise.ts";
import { type Expr, names, sub } from "./tree.ts";

/** How a witness is taken. */
export interface WitnessOptions {
  /** Points inside the domain. @default 4 */
  readonly count?: number;
  /** Working precision, decimal digits. @default 64 */
  readonly digits?: number;
  /** Seed of the points. @default 1 */
  readonly seed?: number;
  /** Ranges of names, positive and of order one by default. */
  readonly ranges?: Ranges;
}

/** What a witness found. */
export interface Witness {
  /** `agree` at all points, `differ` at `at`, or `no-points`: too few lie inside the domain. */
  readonly outcome: "agree" | "differ" | "no-points";
  /** Points used. */
  readonly count: number;
  /** Digits of the evaluation. */
  readonly digits: number;
  /** Seed of the points. */
  readonly seed: number;
  /** Largest residual seen, relative to the largest term (to two digits, decimal text). */
  readonly residual: string;
  /** Where it differs, with both sides to 15 digits. */
  readonly at?: Readonly<Record<string, string>>;
  /** Left side at the point where the two differ. */
  readonly left?: string;
  /** Right side there. */
  readonly right?: string;
}

/** Relative residual below which a value counts as zero: 24 digits above the rounding of 64. */
const ZERO = "1e-40";

/**
 * Compares two expressions at random points.
 *
 * @param left One side.
 * @param right The other side.
 * @param options Points, digits, seed, ranges.
 * @example A wrong simplification is seen
 * ```ts
 * import { compare, parse } from "@backstamp/backstamp";
 * const { outcome } = await compare(parse("1 - x/3"), parse("(x - 3)/3"));
 * if (outcome !== "differ") throw new Error("not seen");
 * ```
 */
export async function compare(
  left: Expr,
  right: Expr,
  options: WitnessOptions = {},
): Promise<Witness> {
  const p = await precise(options.digits ?? 64);
  const difference = sub(left, right);
  return witness(p, names(difference), options, (at) => {
    const l = p.evaluateScaled(left, at), r = p.evaluateScaled(right, at);
    return { left: l.value, right: r.value, scale: l.scale.gt(r.scale) ? l.scale : r.scale };
  });
}

/**
 * Checks a derivative against finite differences of the original.
 *
 * Fourth-order central difference with step h = 10^-(digits/5) relative: truncation h^4 and rounding
 * 10^-digits/h both near 10^-(4 digits/5) of the function's scale, below the threshold of 1e-40.
 */
export async function differences(
  e: Expr,
  name: string,
  derivative: Expr,
  options: WitnessOptions = {},
): Promise<Witness> {
  const p = await precise(options.digits ?? 64);
  const list = [...new Set([...names(e), ...names(derivative), name])].sort();
  const h = p.big(`1e-${Math.floor(p.digits / 5)}`);
  return witness(p, list, options, (at) => {
    const x = p.big(at[name]!);
    const f = (k: number) => p.evaluateScaled(e, { ...at, [name]: x.plus(h.times(k)) });
    const [a, b, c, d] = [f(-2), f(-1), f(1), f(2)] as const;
    const left = c.value.minus(b.value).times(8).minus(d.value.minus(a.value)).div(h.times(12));
    const right = p.evaluateScaled(derivative, at);
    let scale = right.scale;
    for (const t of [a, b, c, d]) if (t.scale.gt(scale)) scale = t.scale;
    return { left, right: right.value, scale };
  });
}

function witness(
  p: Precise,
  list: readonly string[],
  options: WitnessOptions,
  sides: (
    at: Record<string, string>,
  ) => { left: BigNumber; right: BigNumber; scale: BigNumber },
): Witness {
  const { count = 4, seed = 1, ranges = {} } = options;
  const next = points(list, seed, ranges), zero = p.big(ZERO);
  let used = 0, worst = p.big(0);
  const found = { digits: p.digits, seed };
  for (let tries = 0; used < count && tries < 20 * count; tries++) {
    const at = next();
    const { left, right, scale } = sides(at);
    if (!left.isFinite() || !right.isFinite() || !scale.isFinite()) continue;
    used++;
    const gap = left.minus(right).abs();
    const residual = scale.isZero() ? gap : gap.div(scale);
    if (residual.gt(worst)) worst = residual;
    if (residual.gt(zero)) {
      return {
        ...found,
        outcome: "differ",
        count: used,
        residual: residual.toPrecision(2),
        at,
        left: left.toPrecision(15),
        right: right.toPrecision(15),
      };
    }
  }
  const outcome = used === count ? "agree" : "no-points";
  return { ...found, outcome, count: used, residual: worst.toPrecision(2) };
}
