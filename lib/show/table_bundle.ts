/**
 * Tables for notebook pages and terminals.
 *
 * @module
 */
import { escapeXml } from "./figure.ts";

/**
 * A table as HTML and as plain text.
 *
 * @param header names of the columns; none for a table without header
 * @param rows cells as text
 * @returns representations by media type
 */
export function tableBundle(
  header: readonly string[],
  rows: readonly (readonly string[])[],
): { "text/html": string; "text/plain": string } {
  const line = (cells: readonly string[], tag: string): string =>
    `<tr>${cells.map((cell) => element(cell, tag)).join("")}</tr>`;
  const head = header.length === 0 ? "" : `<thead>${line(header, "th")}</thead>`;
  const all = header.length === 0 ? rows : [header, ...rows];
  const widths = (all[0] ?? []).map((_, i) => Math.max(...all.map((row) => row[i].length)));
  const plain = all.map((row) => row.map((cell, i) => cell.padEnd(widths[i])).join("  ").trimEnd());
  return {
    "text/html": `<table>${head}<tbody>${
      rows.map((row) => line(row, "td")).join("")
    }</tbody></table>`,
    "text/plain": plain.join("\n"),
  };
}

/** A number must not be parted from its bound; prose may be wrapped. */
function element(cell: string, tag: string): string {
  const wrap = cell.length > 50 ? "" : ";white-space:nowrap";
  return `<${tag} style="text-align:left${wrap}">${escapeXml(cell)}</${tag}>`;
}
