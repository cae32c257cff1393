/**
 * Notebooks on disk: Jupyter's notebook format 4.5 (nbformat documentation, "The Notebook file format").
 *
 * @module
 */

/** Text, whole or by lines with their line ends. */
export type Multiline = string | string[];

/** Representations of one thing by media type; JSON types hold a value, all others text. */
export type MimeBundle = Record<string, unknown>;

/** What a code cell put out. */
export type Output =
  | { output_type: "stream"; name: string; text: Multiline }
  | { output_type: "display_data"; data: MimeBundle; metadata: Record<string, unknown> }
  | {
    output_type: "execute_result";
    data: MimeBundle;
    metadata: Record<string, unknown>;
    execution_count: number | null;
  }
  | { output_type: "error"; ename: string; evalue: string; traceback: string[] };

/** One cell. */
export interface Cell {
  /** Identifier, unique in the notebook. */
  id?: string;
  /** Kind of cell. */
  cell_type: "code" | "markdown" | "raw";
  /** Text. */
  source: Multiline;
  /** Free metadata. */
  metadata: Record<string, unknown>;
  /** Number of the execution; code cells only. */
  execution_count?: number | null;
  /** What it put out; code cells only. */
  outputs?: Output[];
}

/** A notebook. */
export interface Notebook {
  /** Cells in order. */
  cells: Cell[];
  /** Free metadata, among it the kernel and its language. */
  metadata: Record<string, unknown>;
  /** Major version of the format, 4. */
  nbformat: number;
  /** Minor version of the format. */
  nbformat_minor: number;
}

/**
 * Reads a notebook. A notebook older than format 4.5 is raised to it: cells without identifier get one from
 * their position.
 *
 * @param text text of an `.ipynb` file
 * @param name name of the file, for messages
 * @returns the notebook
 * @throws {SyntaxError} if the text is not a notebook of format 4
 * @example
 * ```ts
 * import { parseNotebook } from "@backstamp/backstamp";
 * const text = '{"nbformat": 4, "nbformat_minor": 5, "metadata": {}, "cells": []}';
 * if (parseNotebook(text, "empty.ipynb").cells.length !== 0) throw new Error();
 * ```
 */
export function parseNotebook(text: string, name: string): Notebook {
  let value: Partial<Notebook> | null;
  try {
    value = JSON.parse(text);
  } catch (error) {
    throw new SyntaxError(
      `Cannot read ${name} as it must be a notebook in JSON: ${(error as Error).message}`,
    );
  }
  if (value?.nbformat !== 4 || !Array.isArray(value.cells)) {
    throw new SyntaxError(
      `Cannot read ${name} as it must be a notebook of format 4: nbformat is ${value?.nbformat}`,
    );
  }
  const language = (value.metadata?.language_info as { name?: string } | undefined)?.name;
  if (language !== undefined && language !== "typescript") {
    throw new SyntaxError(
      `Cannot read ${name} as its language must be typescript: language is ${language}`,
    );
  }
  const cells = value.cells.map((cell, i) => ({ ...cell, id: cell.id ?? `cell-${i + 1}` }));
  const minor = Math.max(value.nbformat_minor ?? 0, 5);
  return { cells, metadata: value.metadata ?? {}, nbformat: 4, nbformat_minor: minor };
}

/**
 * Writes a notebook as Jupyter does: keys sorted, one space of indent, text split by lines.
 *
 * @param notebook notebook
 * @returns text of an `.ipynb` file
 * @example
 * ```ts
 * import { notebookText, parseNotebook } from "@backstamp/backstamp";
 * const text = notebookText({ cells: [], metadata: {}, nbformat: 4, nbformat_minor: 5 });
 * if (notebookText(parseNotebook(text, "empty.ipynb")) !== text) throw new Error();
 * ```
 */
export function notebookText(notebook: Notebook): string {
  const cells = notebook.cells.map((cell) => ({
    ...cell,
    source: lines(cell.source),
    ...(cell.outputs === undefined ? {} : { outputs: cell.outputs.map(outputOnDisk) }),
  }));
  return JSON.stringify(sorted({ ...notebook, cells }), null, 1) + "\n";
}

/**
 * Text of a cell or an output in one piece.
 *
 * @param text text, whole or by lines
 * @returns the whole text
 * @example
 * ```ts
 * import { wholeText } from "@backstamp/backstamp";
 * if (wholeText(["a\n", "b"]) !== "a\nb") throw new Error();
 * ```
 */
export function wholeText(text: Multiline): string {
  return typeof text === "string" ? text : text.join("");
}

function lines(text: Multiline): string[] {
  return wholeText(text).match(/[^\n]*\n|[^\n]+$/g) ?? [];
}

function outputOnDisk(output: Output): Output {
  switch (output.output_type) {
    case "stream":
      return { ...output, text: lines(output.text) };
    case "error":
      return output;
    default:
      return { ...output, data: Object.fromEntries(Object.entries(output.data).map(dataOnDisk)) };
  }
}

/** Only text of a JSON media type would change its meaning if split. */
function dataOnDisk([type, value]: [string, unknown]): [string, unknown] {
  return [type, typeof value === "string" && !type.endsWith("json") ? lines(value) : value];
}

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (value === null || typeof value !== "object") return value;
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([key, child]) => [key, sorted(child)]));
}
