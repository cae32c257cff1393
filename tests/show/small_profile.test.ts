import { describe, expect, it } from "vitest";
import { type Profile, PROFILE_COLUMNS } from "../../lib/observe/result.ts";
import { smallProfile } from "../../lib/show/small_profile.ts";

/** A profile with the given proper distances and -g_tt; the other columns are not drawn. */
function profileOf(distance: number[], minusGtt: number[]): Profile {
  const zeros = Object.fromEntries(PROFILE_COLUMNS.map((name) => [name, new Float64Array(2)]));
  return {
    ...zeros,
    proper_distance: Float64Array.from(distance),
    minus_gtt: Float64Array.from(minusGtt),
  } as Profile;
}

const pointsOf = (svg: string): number[][] =>
  /points="([^"]*)"/.exec(svg)![1].split(" ").map((pair) => pair.split(",").map(Number));

describe("smallProfile", () => {
  it("leaves out the far region, and behind a throat what is more than twice as deep", () => {
    const svg = smallProfile(
      profileOf([1e9, 3, 2, 1, 0, -1, -2], [1, 0.99, 0.5, 0.2, 0.1, 0.05, 1e-9]),
    );
    const points = pointsOf(svg);
    expect(points).toHaveLength(5); // from 0.99, the last point before 0.9, to 0.05 > 0.1^2
    expect(points[0][1]).toBeLessThan(points[4][1]); // downwards in the picture as inwards
  });

  it("keeps to points that have a logarithm, and draws nothing from fewer than two", () => {
    expect(pointsOf(smallProfile(profileOf([2, 1, 0], [0.5, 0.1, 0])))).toHaveLength(2);
    expect(smallProfile(profileOf([1, 0], [0.5, 0]))).toBe("");
  });
});
