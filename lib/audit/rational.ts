/**
 * Recognises the exact constant behind a high-precision number.
 *
 * @module
 */
import type { BigNumber, Precise } from "../expr/precise.ts";

/**
 * The simple constant p/q, or p/q times a power of pi from -2 to 2, that a number equals.
 *
 * @param x A number of 60 digits or so.
 * @param p Evaluator that made it.
 * @returns Text in the grammar of expressions, or undefined if no such constant fits to 30 digits.
 */
export function recognise(x: BigNumber, p: Precise): string | undefined {
  const pi = p.big("3.14159265358979323846264338327950288419716939937510582097494459230781640629");
  for (const k of [0, 1, -1, 2, -2]) {
    const text = fraction(x.div(pi.pow(k)), p);
    if (text === undefined) continue;
    if (k === 0) return text;
    const power = k === 1 ? "pi" : `pi^${k < 0 ? `(${k})` : k}`;
    return text === "1" ? power : `${text}*${power}`;
  }
  return undefined;
}

/** Continued fraction with denominators up to 10^6: 30 digits cannot agree by chance. */
function fraction(x: BigNumber, p: Precise): string | undefined {
  let a = x, [h0, h1] = [p.big(1), x.floor()], [k0, k1] = [p.big(0), p.big(1)];
  for (let i = 0; i < 20 && k1.lt(1e6) && h1.abs().lt(1e9); i++) {
    if (x.minus(h1.div(k1)).abs().lte(x.abs().times("1e-30"))) {
      return k1.eq(1) ? h1.toFixed() : `${h1.toFixed()}/${k1.toFixed()}`;
    }
    const rest = a.minus(a.floor());
    if (rest.isZero()) return undefined;
    a = p.big(1).div(rest);
    const n = a.floor();
    [h0, h1] = [h1, n.times(h1).plus(h0)];
    [k0, k1] = [k1, n.times(k1).plus(k0)];
  }
  return undefined;
}
