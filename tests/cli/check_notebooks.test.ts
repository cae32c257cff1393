import { describe, expect, it } from "vitest";
import { cellsModule } from "../../lib/cli/check_notebooks.ts";
import { notebookText } from "../../lib/show/notebook/document.ts";
import { notebookOf } from "../show/notebook/notebooks.ts";

describe("cellsModule", () => {
  it("is the code of a notebook in order, each cell under its name", () => {
    const notebook = notebookOf("const x = 1;", "x + 1;");
    notebook.cells.splice(1, 0, {
      id: "m",
      cell_type: "markdown",
      metadata: {},
      source: "# prose",
    });
    expect(cellsModule(notebookText(notebook), "a.ipynb")).toBe(
      "// a.ipynb, cell 1 (c1)\nconst x = 1;\n\n// a.ipynb, cell 3 (c2)\nx + 1;\n",
    );
  });
});

describe("deno task check-notebooks", () => {
  it("passes the notebooks of this repository", async () => {
    const { tasks } = JSON.parse(Deno.readTextFileSync("deno.json"));
    const [, ...args] = tasks["check-notebooks"].command.split(" ");
    const { code, stderr } = await new Deno.Command(Deno.execPath(), { args }).output();
    expect(new TextDecoder().decode(stderr)).not.toContain("ERROR");
    expect(code).toBe(0);
  });
});
