import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { excess } from "../../../lib/batch/comparison/excess.ts";

const bounded = (value: number, error?: number) =>
  error === undefined ? { value } : { value, error };

/** A double times 2^1074, which is whole: the exact value, by the layout of IEEE 754. */
function whole(x: number): bigint {
  const bits = new DataView(new ArrayBuffer(8));
  bits.setFloat64(0, x);
  const all = bits.getBigUint64(0),
    exponent = (all >> 52n) & 2047n,
    digits = all & ((1n << 52n) - 1n);
  const size = exponent === 0n ? digits : (digits | (1n << 52n)) << (exponent - 1n);
  return all >> 63n === 1n ? -size : size;
}

describe("The distance of two numbers in units of the sum of their bounds", () => {
  it("is above 1 exactly if the intervals have no point in common", () => {
    const number = fc.double({ noNaN: true, noDefaultInfinity: true });
    // near ones too: far from each other the question is easy
    const pair = fc.tuple(number, fc.oneof(number, fc.integer({ min: -4, max: 4 })));
    const error = fc.oneof(fc.double({ min: 0, noNaN: true, noDefaultInfinity: true }));
    fc.assert(
      fc.property(pair, error, error, ([a, by], ea, eb) => {
        const b = Number.isInteger(by) ? a * (1 + by * Number.EPSILON) : by;
        if (!Number.isFinite(b)) return;
        const scale = Math.abs(a - b); // bounds of the size of the distance decide
        const [x, y] = [ea, eb].map((e) => Number.isFinite(scale) && e < 2 ? e * scale : e);
        const distance = whole(a) - whole(b);
        const apart = (distance < 0n ? -distance : distance) > whole(x) + whole(y);
        expect(excess(bounded(a, x), bounded(b, y)) > 1).toBe(apart);
      }),
      { numRuns: 2000 },
    );
  });

  it("decides sums that rounding would make equal", () => {
    // the distance is 2^-52; the second sum of bounds is less by 2^-106, which rounding loses
    const far = bounded(1 + 2 ** -52, 2 ** -53), near = bounded(1, 2 ** -53);
    expect(excess(far, near)).toBe(1);
    expect(excess(far, bounded(1, 2 ** -53 - 2 ** -106))).toBeGreaterThan(1);
    // the distance is 1, the bounds sum up to 1 + 2^-60, which rounds to 1
    expect(excess(bounded(1, 1), bounded(2, 2 ** -60))).toBeLessThanOrEqual(1);
    expect(excess(bounded(1 + 2 ** -52, 1), bounded(0, 2 ** -60))).toBeGreaterThan(1);
  });

  it("is 0 for equal numbers whatever their bounds, zeros of both signs among them", () => {
    expect(excess(bounded(3, 0), bounded(3, 1))).toBe(0);
    expect(excess(bounded(0, 0), bounded(-0, 0))).toBe(0);
    expect(excess(bounded(Infinity), bounded(Infinity))).toBe(0);
  });

  it("is the quotient of distance and summed bounds", () => {
    expect(excess(bounded(1, 0.25), bounded(2, 0.25))).toBe(2);
    expect(excess(bounded(2, 0.5), bounded(1, 1.5))).toBe(0.5);
  });

  it("is infinite where exact numbers differ, or one of the two diverges", () => {
    expect(excess(bounded(1, 0), bounded(1 + 2 ** -52, 0))).toBe(Infinity);
    expect(excess(bounded(1), bounded(2))).toBe(Infinity);
    expect(excess(bounded(Infinity), bounded(1e308, 1e308))).toBe(Infinity);
    expect(excess(bounded(Infinity), bounded(-Infinity))).toBe(Infinity);
  });

  it("holds at both ends of the doubles", () => {
    expect(excess(bounded(0, 5e-324), bounded(5e-324, 0))).toBe(1);
    expect(excess(bounded(0, 5e-324), bounded(1e-323, 0))).toBe(2);
    expect(excess(bounded(5e-324, 0), bounded(-5e-324, 5e-324))).toBe(2);
    const most = Number.MAX_VALUE; // the distance is 2 most, the bounds sum up to 2 most
    expect(excess(bounded(most, most), bounded(-most, most))).toBe(1);
    expect(excess(bounded(most, most), bounded(-most, most / 3))).toBeCloseTo(1.5, 12); // 12 digits
  });
});
