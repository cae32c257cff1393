/**
 * What else differs between two runs than their results: the parts of a stamp that all rows, or all rows of
 * a model, share.
 *
 * @module
 */
import type { RunIdentity } from "../record.ts";
import { canonicalJson } from "../stamp.ts";

/** Parts of a stamp that may change without the row's inputs. */
export const STAMP_PARTS = [
  "core",
  "expressions",
  "settings",
  "pins",
  "runtime",
  "tolerance",
  "unknown",
] as const;

/**
 * A part of a stamp: `core`, the files of the numeric core; `expressions` of the row's model; `settings` of
 * the solver; `pins`, the packages; the `runtime`; the row's `tolerance`; `unknown` where no record tells.
 */
export type StampPart = (typeof STAMP_PARTS)[number];

/** One value in the records of two runs that differs. */
export interface Origin {
  /** Where in the record, such as `runtime.deno`. */
  readonly item: string;
  /** Value of the first run; empty where it has none. */
  readonly a: string;
  /** Value of the second run. */
  readonly b: string;
}

const SHARED = ["core", "settings", "pins", "runtime"] as const;

function isObject(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

function leaves(item: string, a: unknown, b: unknown): Origin[] {
  if (isObject(a) && isObject(b)) {
    const names = [...new Set([...Object.keys(a), ...Object.keys(b)])].sort();
    return names.flatMap((name) =>
      leaves(item === "" ? name : `${item}.${name}`, a[name], b[name])
    );
  }
  const text = (value: unknown) =>
    value === undefined ? "" : typeof value === "string" ? value : canonicalJson(value);
  return text(a) === text(b) ? [] : [{ item, a: text(a), b: text(b) }];
}

/**
 * Lists what differs between two runs.
 *
 * @param a Identity of the first run.
 * @param b Identity of the second.
 * @returns Every value that differs, of the expressions those of models in both. The digest of the parameter
 * table is left out: it says nothing by itself.
 */
export function origins(a: RunIdentity, b: RunIdentity): readonly Origin[] {
  const models = Object.keys(a.expressions).filter((model) => model in b.expressions);
  const told = ({ core, settings, pins, runtime, expressions }: RunIdentity) => ({
    core,
    settings,
    pins,
    runtime,
    expressions: Object.fromEntries(models.map((model) => [model, expressions[model]])),
  });
  return leaves("", told(a), told(b));
}

/**
 * Tells which parts of a row's stamp differ by what its two runs record.
 *
 * @param a Identity of the first run, if it is known.
 * @param b Identity of the second.
 * @returns A function from the row's model to the parts; empty if both runs are unlike in nothing it shares.
 */
export function stampParts(
  a: RunIdentity | undefined,
  b: RunIdentity | undefined,
): (model: string) => readonly StampPart[] {
  if (a === undefined || b === undefined) return () => ["unknown"];
  const unlike = (x: unknown, y: unknown) => canonicalJson(x ?? null) !== canonicalJson(y ?? null);
  const shared = SHARED.filter((part) => unlike(a[part], b[part]));
  const models = Object.keys(a.expressions).filter((model) =>
    unlike(a.expressions[model], b.expressions[model])
  );
  return (model) =>
    STAMP_PARTS.filter((part) =>
      part === "expressions" ? models.includes(model) : shared.some((name) => name === part)
    );
}
