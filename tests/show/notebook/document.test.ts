import { describe, expect, it } from "vitest";
import { notebookText, parseNotebook } from "../../../lib/show/notebook/document.ts";
import { notebookOf } from "./notebooks.ts";

describe("parseNotebook", () => {
  it("gives cells without identifier one from their position, and raises the format to 4.5", () => {
    const cell = { cell_type: "markdown", metadata: {}, source: "x" };
    const text = JSON.stringify({ nbformat: 4, nbformat_minor: 2, metadata: {}, cells: [cell] });
    const notebook = parseNotebook(text, "old.ipynb");
    expect(notebook.nbformat_minor).toBe(5);
    expect(notebook.cells[0].id).toBe("cell-1");
  });

  it("says what is wrong with a file that is no notebook of format 4", () => {
    expect(() => parseNotebook("{", "a.ipynb")).toThrow("must be a notebook in JSON");
    expect(() => parseNotebook("null", "a.ipynb")).toThrow("nbformat is undefined");
    expect(() => parseNotebook('{"nbformat": 3, "cells": []}', "a.ipynb")).toThrow("nbformat is 3");
  });
});

describe("notebookText", () => {
  it("keeps text with any line ends through writing and reading, and is stable", () => {
    const notebook = notebookOf("a\nb\n", "", "\n\n", "no end");
    notebook.cells[0].outputs = [
      { output_type: "stream", name: "stdout", text: "x\r\ny\u2028z" },
      { output_type: "display_data", data: { "application/json": { b: 1 } }, metadata: {} },
    ];
    const text = notebookText(notebook);
    const back = parseNotebook(text, "a.ipynb");
    const joined = (lines: unknown) => (lines as string[]).join("");
    expect(back.cells.map((cell) => joined(cell.source))).toEqual(
      notebook.cells.map((cell) => cell.source),
    );
    expect(back.cells[0].outputs).toMatchObject([
      { text: ["x\r\n", "y\u2028z"] },
      { data: { "application/json": { b: 1 } } },
    ]);
    expect(notebookText(back)).toBe(text);
  });
});
