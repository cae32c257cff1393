/**
 * Axes of figures: what stands on them, and scales that place a value on a line and label it.
 *
 * Labels use two marks that the frame turns into raised and lowered text: `^{...}` and `_{...}`.
 *
 * @module
 */

/** What an axis shows. */
export interface Axis {
  /** The quantity in words. */
  readonly quantity: string;
  /** Its symbol. */
  readonly symbol: string;
  /** Its unit; "dimensionless" for a pure number. */
  readonly unit: string;
}

/** Places values on a straight line: `place` maps a value to the coordinate that is drawn. */
export interface Scale {
  /** First and last drawn coordinate. */
  readonly domain: readonly [number, number];
  /** Drawn coordinate of a value. */
  readonly place: (value: number) => number;
  /** Drawn coordinates of the ticks, or about how many evenly spaced ones to set. */
  readonly ticks: number | readonly number[];
  /** Text at a drawn coordinate. */
  readonly text: (coordinate: number) => string;
  /** Power of ten taken out of the labels, 0 if none. */
  readonly exponent: number;
}

/**
 * Label of an axis: quantity, symbol and, in brackets, the unit.
 *
 * @param axis What it shows.
 * @param exponent Power of ten that the tick labels leave out.
 * @returns For example `proper distance d (10^{3} Planck lengths)`.
 *
 * @example
 * ```ts
 * import { axisLabel } from "@backstamp/backstamp";
 * const label = axisLabel({ quantity: "areal radius", symbol: "r", unit: "Planck lengths" });
 * if (label !== "areal radius r (Planck lengths)") throw new Error(label);
 * ```
 */
export function axisLabel(axis: Axis, exponent = 0): string {
  const power = exponent === 0
    ? ""
    : axis.unit === "dimensionless"
    ? `${powerText(exponent)}, `
    : `${powerText(exponent)} `;
  return `${axis.quantity} ${axis.symbol} (${power}${axis.unit})`;
}

/** A number with a minus sign instead of a hyphen. */
export function signed(value: number | string): string {
  return String(value).replace("-", "\u2212");
}

/** A power of ten: 1 and 10 as they are, the others with a raised exponent. */
export function powerText(exponent: number): string {
  if (exponent === 0) return "1";
  return exponent === 1 ? "10" : `10^{${signed(exponent)}}`;
}

/**
 * A number to six significant digits, as text for captions.
 *
 * @param value Any number; infinities are written as such.
 */
export function numberText(value: number): string {
  if (!Number.isFinite(value)) return value > 0 ? "\u221e" : "\u2212\u221e";
  const size = Math.abs(value);
  if (size === 0 || (size >= 1e-3 && size < 1e6)) return signed(Number(value.toPrecision(6)));
  const [digits, exponent] = value.toExponential(5).split("e");
  const factor = signed(Number(digits));
  const power = `10^{${signed(Number(exponent))}}`;
  return factor === "1" ? power : `${factor}\u00d7${power}`;
}

/**
 * Even scale. A power of ten is taken out of the labels of very large and very small numbers.
 *
 * @param values Numbers to be shown; those that are not finite are passed over.
 */
export function evenScale(values: Iterable<number>): Scale {
  const [low, high] = padded(finite(values));
  const size = Math.max(Math.abs(low), Math.abs(high));
  const order = Math.floor(Math.log10(size));
  const exponent = order >= 4 || order <= -3 ? order : 0;
  const unit = Number(`1e${exponent}`);
  return {
    domain: [low / unit, high / unit],
    place: (value) => value / unit,
    ticks: 5,
    text: (t) => signed(Number(t.toPrecision(6))),
    exponent,
  };
}

/**
 * Logarithmic scale of numbers given by their decimal logarithm, so that it reaches below the smallest
 * double.
 *
 * @param exponents Decimal logarithms to be shown; those that are not finite are passed over.
 * @param most Largest number of ticks.
 */
export function decadeScale(exponents: Iterable<number>, most = 6): Scale {
  const [low, high] = padded(finite(exponents));
  const span = high - low;
  const step = [1, 2, 5, 10, 20, 25, 50, 100, 200, 500].find((s) => span / s < most) ??
    Math.ceil(span / most);
  const ticks: number[] = [];
  for (let n = Math.ceil(low / step) * step; n <= high; n += step) ticks.push(n === 0 ? 0 : n);
  const few = ticks.length < 3;
  for (let n = Math.floor(low); few && n <= high; n++) {
    for (const digit of [2, 5]) {
      const t = n + Math.log10(digit);
      if (t >= low && t <= high) ticks.push(t);
    }
  }
  const plain = low >= -3.01 && high <= 4.01; // short enough to write out
  const text = (t: number): string => {
    if (plain) return signed(Number((10 ** t).toPrecision(3)));
    const digit = Math.round(10 ** (t - Math.floor(t)));
    return digit === 1 || digit === 10
      ? powerText(Math.round(t))
      : `${digit}\u00d7${powerText(Math.floor(t))}`;
  };
  return { domain: [low, high], place: (e) => e, ticks, text, exponent: 0 };
}

/** Options of {@linkcode symmetricLogScale}. */
export interface SymmetricLogOptions {
  /** Magnitude below which the scale is about even. */
  readonly threshold: number;
  /** Draws the square root of the logarithm: order one stays readable beside 1e60. @default false */
  readonly root?: boolean;
  /** Length of the axis, in points. */
  readonly length: number;
  /** Least distance between two tick labels, in points. @default 20 */
  readonly gap?: number;
}

/**
 * Symmetric logarithmic scale: sign(x) log10(1 + |x| / threshold), or its square root with the sign of x.
 *
 * @param values Numbers to be shown; those that are not finite are passed over.
 * @param options Threshold, root, length of the axis.
 */
export function symmetricLogScale(values: Iterable<number>, options: SymmetricLogOptions): Scale {
  const place = (value: number): number => {
    const log = Math.log10(1 + Math.abs(value) / options.threshold);
    return Math.sign(value) * (options.root ? Math.sqrt(log) : log);
  };
  const shown = finite(values);
  const [low, high] = padded(shown.map(place));
  const perUnit = options.length / (high - low);
  const gap = options.gap ?? 20;
  const top = Math.max(0, ...shown.map(Math.abs));
  const kept: { at: number; value: number }[] = [];
  for (const value of candidates(options.threshold, top)) {
    const at = place(value);
    if (at < low || at > high || kept.some((k) => Math.abs(k.at - at) * perUnit < gap)) continue;
    kept.push({ at, value });
  }
  const label = new Map(kept.map(({ at, value }) => [at, tickText(value)]));
  return {
    domain: [low, high],
    place,
    ticks: kept.map((k) => k.at).sort((a, b) => a - b),
    text: (t) => label.get(t) ?? "",
    exponent: 0,
  };
}

function tickText(value: number): string {
  if (value === 0) return "0";
  const power = powerText(Math.round(Math.log10(Math.abs(value))));
  return value < 0 ? `\u2212${power}` : power;
}

/** Powers of ten of both signs, the roundest first: a label that is kept displaces its neighbours. */
function candidates(threshold: number, top: number): number[] {
  const lowest = Math.round(Math.log10(threshold));
  const highest = Math.floor(Math.log10(Math.max(top, threshold)));
  const found: number[] = [0];
  const powers: number[] = [];
  for (const step of [60, 40, 20, 10, 5, 2, 1]) {
    for (let n = lowest; n <= highest; n++) {
      if (n % step === 0 && !powers.includes(n)) powers.push(n);
    }
  }
  powers.sort((a, b) => rank(a) - rank(b));
  for (const n of powers) found.push(Number(`1e${n}`), -Number(`1e${n}`));
  return found;

  function rank(n: number): number {
    if (n === 0) return 0; // unity
    const step = [20, 10, 5, 2, 1].findIndex((s) => n % s === 0);
    return 1 + step * 1000 + (highest - n);
  }
}

function finite(values: Iterable<number>): number[] {
  return [...values].filter(Number.isFinite);
}

/** Smallest interval around the numbers with a margin of 4 %; [-1, 1] around nothing. */
function padded(values: readonly number[]): [number, number] {
  if (values.length === 0) return [-1, 1];
  let low = Infinity;
  let high = -Infinity;
  for (const value of values) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  const size = Math.max(Math.abs(low), Math.abs(high));
  const margin = high - low > 1e-9 * size ? 0.04 * (high - low) : 0.1 * size || 1;
  return [low - margin, high + margin];
}
