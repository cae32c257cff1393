/**
 * A profile as the text of its CSV file. Free of packages: workers write profiles.
 *
 * @module
 */
import { type Profile, PROFILE_COLUMNS } from "../observe/result.ts";
import { writeNumber } from "./number.ts";

/**
 * Writes a profile.
 *
 * @param profile Equally long columns, from outside inwards.
 * @returns Header and one line a point, each ended by LF.
 * @throws {RangeError} if a column is shorter or longer than the first, or holds NaN.
 */
export function profileText(profile: Profile): string {
  const columns = PROFILE_COLUMNS.map((name) => profile[name]);
  const length = columns[0]!.length;
  for (const [i, column] of columns.entries()) {
    if (column.length === length) continue;
    throw new RangeError(
      `Cannot write the profile as column ${PROFILE_COLUMNS[i]} must have ${length} points: ` +
        `current count is ${column.length}`,
    );
  }
  const lines = [PROFILE_COLUMNS.join(",")];
  for (let i = 0; i < length; i++) {
    lines.push(columns.map((column) => writeNumber(column[i]!)).join(","));
  }
  return `${lines.join("\n")}\n`;
}
