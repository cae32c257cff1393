/**
 * What changed between two results tables, as tables for terminals and notebooks.
 *
 * @module
 */
import type { Comparison } from "../batch/comparison/comparison.ts";
import { STAMP_PARTS, type StampPart } from "../batch/comparison/origin.ts";
import { type Difference, ROW_CHANGES, type RowChange } from "../batch/comparison/row_change.ts";
import { readResultNumber } from "../batch/number.ts";
import { RESULT_COLUMNS } from "../batch/result_columns.ts";
import { boundedText } from "./bounded_text.ts";
import { SHORT_STAMP } from "./figure.ts";

/** One of the tables. */
export interface ShownTable {
  /** What it shows. */
  readonly title: string;
  /** Names of the columns. */
  readonly header: readonly string[];
  /** Cells as text. */
  readonly rows: readonly (readonly string[])[];
}

/** What became of a row, in words. */
export const CHANGE_TEXTS: Readonly<Record<RowChange, string>> = {
  identical: "identical",
  stamp: "only the stamp differs",
  within: "differ within their bounds",
  beyond: "differ beyond their bounds",
  kind: "other kind, outcome, reason, inner end or validity",
  inputs: "other inputs",
  added: "only in B",
  removed: "only in A",
};

const PART_TEXTS: Readonly<Record<StampPart, string>> = {
  core: "files of the numeric core",
  expressions: "expressions of the model",
  settings: "settings of the solver",
  pins: "packages",
  runtime: "runtime",
  tolerance: "tolerance of the row",
  unknown: "unknown: a run without a record, or a record that does not tell",
};

/** Longest value of a record that is shown (characters). */
const LONGEST = 40;

function cut(text: string): string {
  if (/^[0-9a-f]{64}$/.test(text)) return text.slice(0, SHORT_STAMP);
  return text.length > LONGEST ? `${text.slice(0, LONGEST - 3)}...` : text || "(none)";
}

function cell(text: string, error: string): string {
  if (text === "") return "(empty)";
  const value = readResultNumber(text), bound = readResultNumber(error);
  if (value === undefined || Number.isNaN(value)) return text;
  return boundedText(bound === undefined ? { value } : { value, error: bound });
}

function excessText(excess: number): string {
  if (excess === Infinity) return "\u221e";
  if (excess === 0) return "0 (only bounds)";
  return excess < 1e4 ? String(Number(excess.toPrecision(3))) : excess.toExponential(2);
}

function worstTable({ columns }: Comparison, lines: number): ShownTable {
  const each = Math.max(1, Math.floor(lines / Math.max(1, columns.length)));
  const rows = columns.slice(0, lines).flatMap(({ column, within, beyond, worst }) => {
    const title = RESULT_COLUMNS.find(({ name }) => name === column)?.title ?? column;
    const shown = worst.slice(0, each).filter((d, i) => i === 0 || d.excess! > 0);
    return shown.map((d, i) => [
      ...(i === 0 ? [title, String(within), String(beyond)] : ["", "", ""]),
      excessText(d.excess!),
      d.case,
      cell(d.a, d.aError),
      cell(d.b, d.bError),
    ]);
  });
  return {
    title: "Numbers of rows with equal inputs; distance in units of the sum of the bounds",
    header: ["Quantity", "Within", "Beyond", "Largest", "Case", "A", "B"],
    rows,
  };
}

function othersTable({ others }: Comparison, change: RowChange, lines: number): ShownTable {
  const shown = others.filter((d: Difference) => d.change === change).slice(0, lines);
  const only = change === "added" || change === "removed";
  return {
    title: CHANGE_TEXTS[change],
    header: only ? ["Case"] : ["Case", "Column", "A", "B"],
    rows: shown.map((d) =>
      only ? [d.case] : [d.case, d.column, cell(d.a, d.aError), cell(d.b, d.bError)]
    ),
  };
}

function stampTables({ stamps, origins }: Comparison, lines: number): ShownTable[] {
  const parts = STAMP_PARTS.filter((part) => stamps[part] > 0);
  return [
    {
      title: "Rows with equal inputs and another stamp, by what of the stamp differs",
      header: ["Part", "Rows"],
      rows: parts.map((part) => [PART_TEXTS[part], String(stamps[part])]),
    },
    {
      title: "What the records of the runs say about it",
      header: ["Item", "A", "B"],
      rows: (origins ?? []).slice(0, lines).map(({ item, a, b }) => [item, cut(a), cut(b)]),
    },
  ];
}

function tablesTable({ a, b }: Comparison): ShownTable {
  const line = (letter: string, { name, rows, digest, missing, ownColumns }: Comparison["a"]) => {
    const unfinished = missing ? `${missing} rows not finished` : "";
    const own = ownColumns.length > 0 ? `not compared: ${ownColumns.join(", ")}` : "";
    const notes = [unfinished, own].filter((text) => text !== "").join("; ");
    return [letter, name, String(rows), digest.slice(0, SHORT_STAMP), notes];
  };
  return {
    title: "Tables",
    header: ["", "Name", "Rows", "SHA-256", "Notes"],
    rows: [line("A", a), line("B", b)],
  };
}

/**
 * The tables of a comparison.
 *
 * @param comparison What changed.
 * @param lines Most lines of a table; each column keeps its largest difference.
 * @returns Tables that are not empty; the first two always are there.
 */
export function comparisonTables(comparison: Comparison, lines: number): readonly ShownTable[] {
  const counts = ROW_CHANGES.map((change) => [
    CHANGE_TEXTS[change],
    String(comparison.rows[change]),
  ]);
  const others = (["kind", "inputs", "added", "removed"] as const).map((change) =>
    othersTable(comparison, change, lines)
  );
  return [
    tablesTable(comparison),
    { title: "What became of the rows", header: ["Rows", "Number"], rows: counts },
    worstTable(comparison, lines),
    ...others,
    ...stampTables(comparison, lines),
  ].filter(({ rows }) => rows.length > 0);
}
