/**
 * Two results tables compared row by row, in memory that does not grow with them.
 *
 * @module
 */
import { FILES } from "../folder.ts";
import type { ColumnChange } from "./column_change.ts";
import { ComparisonError, faultText } from "./comparison_error.ts";
import { meet } from "./meet.ts";
import { type Origin, origins, type StampPart } from "./origin.ts";
import type { Difference, RowChange } from "./row_change.ts";
import { type ComparedSource, openSource, type Source } from "./source.ts";
import { type OnDifference, Tally } from "./tally.ts";

/** One of two compared tables. */
export interface ComparedTable {
  /** What it is called. */
  readonly name: string;
  /** Rows. */
  readonly rows: number;
  /** SHA-256 of the results table. */
  readonly digest: string;
  /** Columns that only this table has; they were not compared. */
  readonly ownColumns: readonly string[];
  /** Rows that its run has not finished; absent where no record tells. */
  readonly missing?: number;
}

/** What changed between two results tables. */
export interface Comparison {
  /** The first table. */
  readonly a: ComparedTable;
  /** The second table. */
  readonly b: ComparedTable;
  /** Whether all rows have a partner with the same inputs and kind and numbers within the bounds. */
  readonly same: boolean;
  /** Rows by what became of them. */
  readonly rows: Readonly<Record<RowChange, number>>;
  /** Numbers that differ, by column, over rows with equal inputs; columns without a difference are absent. */
  readonly columns: readonly ColumnChange[];
  /** The first differences in kind and in inputs, and the first rows that only one table has. */
  readonly others: readonly Difference[];
  /** Rows with equal inputs whose stamp differs, by the part of the stamp that does. */
  readonly stamps: Readonly<Record<StampPart, number>>;
  /** Values in the records of both runs that differ; absent where a run has no record. */
  readonly origins?: readonly Origin[];
  /** Whether inputs were compared by the parameter tables, not only as far as the results repeat them. */
  readonly tablesKnown: boolean;
}

/** How results are compared. */
export interface ComparisonOptions {
  /** How many differences are kept of each column, and of each change that is no number. @default 10 */
  readonly most?: number;
  /** Called with every difference, rows in the order in which they meet. */
  readonly onDifference?: OnDifference;
}

async function openBoth(a: ComparedSource, b: ComparedSource): Promise<[Source, Source]> {
  const opened = await Promise.allSettled([openSource(a), openSource(b)]);
  const faults = opened.flatMap((o) => o.status === "rejected" ? [o.reason] : []);
  if (faults.length === 0) {
    return opened.map((o) => (o as PromiseFulfilledResult<Source>).value) as [Source, Source];
  }
  for (const o of opened) if (o.status === "fulfilled") await o.value.rows.return(undefined);
  const other = faults.find((fault) => !(fault instanceof ComparisonError));
  throw other ?? new ComparisonError([...new Set(faults.map((fault) => fault.message))]);
}

/** The table is only known to be what its run wrote once all of it was read. */
function changedSince(source: Source): string | undefined {
  const written = source.run?.results?.sha256;
  if (written === undefined || written === source.digest()) return undefined;
  return `Cannot compare ${source.place} as ${FILES.results} must be as the run wrote it ` +
    `(SHA-256 ${written}): current value is ${source.digest()}`;
}

/**
 * Compares two results tables. Rows meet by their case; the order of rows does not matter, but tables in the
 * same order take the least memory.
 *
 * @param a The first table: an output folder, a results table, or rows in memory.
 * @param b The second.
 * @param options How many differences are kept, and where all of them go.
 * @returns What changed.
 * @throws {ComparisonError} with every fault, if one of the two is not a whole results table.
 */
export async function compareResults(
  a: ComparedSource,
  b: ComparedSource,
  options: ComparisonOptions = {},
): Promise<Comparison> {
  const { most = 10, onDifference } = options;
  const sources = await openBoth(a, b), tally = new Tally(sources, most, onDifference);
  const rows = { a: 0, b: 0 };
  for await (const met of meet(sources[0].rows, sources[1].rows)) {
    if (met.a) rows.a++;
    if (met.b) rows.b++;
    if (met.a && met.b) tally.pair(met.a, met.b);
    else if (met.a) tally.alone(met.a.case, "removed");
    else if (met.b) tally.alone(met.b.case, "added");
  }
  const faults = sources.flatMap((source) => faultText(source) ?? changedSince(source) ?? []);
  if (faults.length > 0) throw new ComparisonError([...new Set(faults)]);
  const table = (i: 0 | 1, count: number): ComparedTable => {
    const { name, run, columns, digest } = sources[i], other = sources[1 - i].columns;
    return {
      name,
      rows: count,
      digest: digest(),
      ownColumns: columns.filter((column) => !other.includes(column)),
      ...(run?.total === undefined ? {} : { missing: run.total - count }),
    };
  };
  const identities = sources.map(({ run }) => run?.identity), [x, y] = identities;
  const unlike = ["beyond", "kind", "inputs", "added", "removed"] as const;
  return {
    a: table(0, rows.a),
    b: table(1, rows.b),
    same: unlike.every((change) => tally.rows[change] === 0),
    rows: tally.rows,
    columns: [...tally.columns.values()].filter(({ within, beyond }) => within + beyond > 0),
    others: [...tally.others.values()].flat(),
    stamps: tally.stamps,
    ...(x && y ? { origins: origins(x, y) } : {}),
    tablesKnown: tally.tablesKnown,
  };
}
