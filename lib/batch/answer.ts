/**
 * A row's answer as the text that journal and store keep: all that its results row and its record are made
 * from, free of the case's name.
 *
 * @module
 */
import type { RowResult } from "../observe/result.ts";
import { type BoundedJson, boundedJson, boundedOf, type RowRecord } from "./record.ts";

/** What came of a row. */
export interface Answer {
  /** The result. */
  readonly result: RowResult;
  /** SHA-256 of its profile; null where it has none; absent if none was asked for. */
  readonly profile?: string | null;
}

type Numbers = Readonly<Record<string, BoundedJson>>;

/**
 * Writes an answer.
 *
 * @param answer Result and digest of the profile.
 * @returns JSON without line ends.
 * @throws {Error} if a number is NaN.
 */
export function answerText({ result, profile }: Answer): string {
  const { numbers, evidence, ...rest } = result;
  return JSON.stringify({
    ...rest,
    ...(profile === undefined ? {} : { profile }),
    numbers: boundedJson(numbers as Readonly<Record<string, { value: number }>>),
    evidence: boundedJson(evidence),
  });
}

/**
 * Reads an answer.
 *
 * @param text What {@linkcode answerText} wrote.
 * @returns The answer.
 * @throws {Error} if the text is none.
 */
export function readAnswer(text: string): Answer {
  const { profile, numbers, evidence, ...rest } = JSON.parse(text) as
    & Omit<RowResult, "numbers" | "evidence">
    & { profile?: string | null; numbers: Numbers; evidence: Numbers };
  return {
    result: { ...rest, numbers: boundedOf(numbers), evidence: boundedOf(evidence) },
    ...(profile === undefined ? {} : { profile }),
  };
}

/**
 * What run.json keeps of an answer.
 *
 * @param text What {@linkcode answerText} wrote.
 * @param stamp Stamp of the row.
 * @param profiled Whether the case has a profile, or was found to have none.
 * @returns Its part of the record.
 */
export function rowRecord(text: string, stamp: string, profiled: boolean): RowRecord {
  const { profile, evidence } = JSON.parse(text) as Pick<RowRecord, "profile" | "evidence">;
  return { stamp, ...(profiled && profile !== undefined ? { profile } : {}), evidence };
}
