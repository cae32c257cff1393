import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type Notebook, parseNotebook, wholeText } from "../../lib/show/notebook/document.ts";
import { executeFile } from "../../lib/show/notebook/file.ts";
import { demoRun } from "../show/notebook/demo_run.ts";

const NAMES = [...Deno.readDirSync("notebooks")].map((entry) => entry.name)
  .filter((name) => name.endsWith(".ipynb")).sort();

const read = (path: string): Notebook => parseNotebook(Deno.readTextFileSync(path), path);

/** Stamps, whole or short, stand for all that may change a number: they change with the program. */
function withoutStamps(notebook: Notebook): unknown {
  const text = JSON.stringify(notebook.cells);
  return JSON.parse(
    text.replace(/(?<![.\w])[0-9a-f]{64}(?!\w)/g, "STAMP")
      .replace(/(?<![.\w])[0-9a-f]{12}(?!\w)/g, "SHORT"),
  );
}

describe.each(NAMES)("notebooks/%s", (name) => {
  const path = `notebooks/${name}`;
  const raw = JSON.parse(Deno.readTextFileSync(path));
  const code = read(path).cells.filter((cell) => cell.cell_type === "code");

  it("has an identifier in every cell, all different", () => {
    const ids = raw.cells.map((cell: { id?: string }) => cell.id);
    expect(ids).not.toContain(undefined);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it("installs the error handlers in its first code cell", () => {
    expect(wholeText(code[0].source)).toContain("reportStrayErrors();");
  });

  it("holds no logic: no cell, so no function, has above ten lines besides imports", () => {
    for (const cell of code) {
      const text = wholeText(cell.source).replace(/^import [^;]*;$/gm, "");
      const lines = text.split("\n").filter((line) => line.trim() !== "");
      expect(lines.length, cell.id).toBeLessThanOrEqual(10);
    }
  });

  it("imports the library by its bare name only", () => {
    const imports = code.flatMap((cell) =>
      [...wholeText(cell.source).matchAll(/\bfrom\s*"([^"]*)"|\bimport\s*\(?\s*"([^"]*)"/g)]
        .map((match) => match[1] ?? match[2])
    );
    expect(new Set(imports)).toEqual(new Set(["@backstamp/backstamp"]));
  });

  it("keeps the path of nobody's machine in its outputs", () => {
    expect(JSON.stringify(raw)).not.toMatch(/file:\/\/|\/home\/|\/root\/|\/tmp\/|\/Users\//);
  });
});

describe("committed outputs", () => {
  let folder = "";
  beforeAll(async () => {
    folder = await Deno.makeTempDir();
  });
  afterAll(() => Deno.remove(folder, { recursive: true }));

  it("are what the notebooks put out when they are executed for the demo", async () => {
    const run = await demoRun(folder);
    expect(NAMES.length).toBeGreaterThan(0);
    for (const name of NAMES) {
      const path = await Deno.realPath(`notebooks/${name}`);
      const executed = await executeFile(path, { out: folder, run, timeout: 120_000 });
      expect(executed.failure).toBeUndefined();
      expect(executed.strayText).toBe("");
      expect(withoutStamps(read(executed.path))).toEqual(withoutStamps(read(path)));
    }
  });
});
