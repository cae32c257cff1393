/**
 * The record of a run, `run.json`: everything about it that is not a result, once.
 *
 * @module
 */
import type { Bounded } from "../observe/result.ts";
import type { CoreIdentity } from "./core.ts";
import type { Host } from "./host.ts";
import { canonicalJson } from "./stamp.ts";
import type { SummaryJson } from "./summary.ts";

/** What a run computes, told apart from any other run. */
export interface RunIdentity extends CoreIdentity {
  /** SHA-256 of the bytes of the parameter table. */
  readonly table: string;
  /** Settings of the solver. */
  readonly settings: unknown;
  /** Functions of each model of the table, as text. */
  readonly expressions: Readonly<Record<string, Readonly<Record<string, string>>>>;
}

/** One start of the command on this folder. */
export interface RunPart {
  /** The command and its arguments. */
  readonly command: readonly string[];
  /** When it began, ISO 8601. */
  readonly started: string;
  /** When it ended; absent if it was killed. */
  readonly ended?: string;
  /** Where. */
  readonly host: Host;
  /** Commit of the checkout, if there is one. */
  readonly commit?: string;
  /** Versions of the program, the runtime, its engine and its compiler. */
  readonly versions: Readonly<Record<string, string>>;
  /** Number of workers. */
  readonly workers: number;
  /** Rows it finished. */
  readonly rows?: number;
}

/** A bounded number as JSON, where an infinity is `INF` or `-INF`. */
export interface BoundedJson {
  /** The number. */
  readonly value: number | "INF" | "-INF";
  /** Absolute bound. */
  readonly error?: number;
}

/** What the record keeps of one row. */
export interface RowRecord {
  /** Stamp of the row. */
  readonly stamp: string;
  /** SHA-256 of its profile; null where it has none; absent if none was asked for. */
  readonly profile?: string | null;
  /** Event values that decided its kind. */
  readonly evidence: Readonly<Record<string, BoundedJson>>;
}

/** A row that was not finished through a fault of the program, a crash or a limit. */
export interface Unfinished {
  /** Case. */
  readonly case: string;
  /** Message of the error. */
  readonly error: string;
}

/** The whole record. */
export interface RunRecord {
  /** running (or killed), interrupted, or done. */
  readonly status: "running" | "interrupted" | "done";
  /** Starts of the command on this folder, in order. */
  readonly runs: readonly RunPart[];
  /** What is computed. */
  readonly identity: RunIdentity;
  /** Rows of the parameter table. */
  readonly total: number;
  /** SHA-256 and rows of results.csv, once it is written. */
  readonly results?: { readonly sha256: string; readonly rows: number };
  /** Counts and extremes of results.csv, once it is written. */
  readonly summary?: SummaryJson;
  /** Rows that a fault of the program, a crash or a limit ended. */
  readonly unfinished: readonly Unfinished[];
  /** Finished rows by case. */
  readonly rows: Readonly<Record<string, RowRecord>>;
}

/**
 * Bounded numbers as JSON.
 *
 * @param numbers Bounded numbers by name.
 * @returns The same with infinities as text.
 * @throws {Error} if one is NaN.
 */
export function boundedJson(
  numbers: Readonly<Record<string, Bounded>>,
): Readonly<Record<string, BoundedJson>> {
  return Object.fromEntries(
    Object.entries(numbers).map(([name, { value, error }]) => {
      if (Number.isNaN(value)) {
        throw new Error(`Cannot record ${name} as it must not be NaN: current value is NaN`);
      }
      const json = Number.isFinite(value) ? value : value > 0 ? "INF" : "-INF";
      const bound = error === undefined || !Number.isFinite(error) ? {} : { error };
      return [name, { value: json, ...bound }] as const;
    }),
  );
}

/**
 * Bounded numbers from JSON.
 *
 * @param json What {@linkcode boundedJson} made.
 * @returns Bounded numbers by name.
 */
export function boundedOf(
  json: Readonly<Record<string, BoundedJson>>,
): Readonly<Record<string, Bounded>> {
  return Object.fromEntries(
    Object.entries(json).map(([name, { value, error }]) => {
      const number = value === "INF" ? Infinity : value === "-INF" ? -Infinity : value;
      return [name, error === undefined ? { value: number } : { value: number, error }] as const;
    }),
  );
}

/**
 * Tells how two runs differ.
 *
 * @param x One run.
 * @param y Another.
 * @returns Keys of the identity that differ, in order; none if the runs are the same.
 */
export function differences(x: RunIdentity, y: RunIdentity): readonly (keyof RunIdentity)[] {
  const keys = ["table", "core", "expressions", "settings", "pins", "runtime"] as const;
  return keys.filter((key) => canonicalJson(x[key] ?? null) !== canonicalJson(y[key] ?? null));
}
