/**
 * The step a truncated series allows, from its last two coefficients.
 *
 * @module
 */

/**
 * Largest s with |c_n| s^n <= tolerance * size for n = N and N - 1, by Jorba & Zou, Exp. Math. 14 (2005) 99,
 * section 3.2, with log and exp in place of a power (which is not reproducible).
 *
 * @param C Coefficient table.
 * @param from Index of the row's first coefficient.
 * @param N Order.
 * @param target tolerance * size.
 * @returns The step in the table's unit, Infinity for a polynomial, NaN if a coefficient is not finite.
 */
export function stepOf(C: Float64Array, from: number, N: number, target: number): number {
  let out = Infinity, range = 0;
  for (let n = 1; n <= N; n++) range += 0 * C[from + n]!; // NaN if any coefficient left the range
  if (range !== 0) return NaN;
  for (let n = N - 1; n <= N; n++) {
    const c = Math.abs(C[from + n]!);
    if (c > 0) out = Math.min(out, Math.exp(Math.log(target / c) / n));
  }
  return out;
}

/** The power of two at or below x > 0 (clamped to 2^-1000 .. 2^1000). */
export function powerOfTwoBelow(x: number): number {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, Math.min(Math.max(x, 1e-300), 1e300));
  view.setUint32(0, view.getUint32(0) & 0x7ff00000);
  view.setUint32(4, 0);
  return view.getFloat64(0);
}

/**
 * Expands in a unit that suits the step: repeats with a better unit until the safe step is within a
 * factor 64 of it, so that no coefficient over- or underflows.
 *
 * @param unit First unit, a power of two.
 * @param expandedStep Expands in the given unit and returns the safe step in it.
 * @returns The unit used last and the safe step (Infinity for a polynomial, NaN if singular).
 */
export function adapted(
  unit: number,
  expandedStep: (unit: number) => number,
): { readonly unit: number; readonly step: number } {
  let long = 0, short = Infinity; // units that proved too small (the tail underflows) and too large
  for (let tries = 0; tries < 80; tries++) {
    const s = expandedStep(unit);
    if (s >= 1 / 64 && s <= 64) return { unit, step: s * unit };
    if (s === Infinity) {
      if (unit > 1e270) return { unit, step: Infinity };
      long = unit;
    } else if (Number.isNaN(s) || s === 0) {
      if (unit < 1e-270) return { unit, step: NaN };
      short = unit;
    }
    if (s > 0 && s < Infinity) {
      const next = powerOfTwoBelow(s * unit);
      if (next >= short) return { unit, step: s * unit }; // coefficients are in range here, not there
      unit = next;
    } else if (long > 0 && short < Infinity) {
      if (short <= 4 * long) {
        const again = expandedStep(long); // the tail is zero here and overflows at four times the unit
        return { unit: long, step: again === Infinity ? long : NaN };
      }
      unit = powerOfTwoBelow(Math.sqrt(long) * Math.sqrt(short));
    } else unit *= s === Infinity ? 2 ** 20 : 2 ** -20;
  }
  return { unit, step: NaN };
}
