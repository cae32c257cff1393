import { createHash } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { notebookText, parseNotebook } from "../../../lib/show/notebook/document.ts";
import { executeFile } from "../../../lib/show/notebook/file.ts";
import { notebookOf } from "./notebooks.ts";

const DISPLAY_MODULE = new URL("../../../lib/show/notebook/display.ts", import.meta.url).href;

describe("displayable", () => {
  let folder = "";
  beforeAll(async () => {
    // inside the repository: the library's bare import names are looked up from the notebook's folder
    await Deno.mkdir("out", { recursive: true });
    folder = await Deno.realPath(await Deno.makeTempDir({ dir: "out" }));
  });
  afterAll(() => Deno.remove(folder, { recursive: true }));

  it("shows up to 1 MB in place, and links larger things to files beside the notebook", async () => {
    const path = `${folder}/large.ipynb`;
    const show = (length: number) =>
      `displayable({ "text/html": "h".repeat(${length}), "text/plain": "plain" })`;
    const notebook = notebookOf(
      `import { displayable } from ${JSON.stringify(DISPLAY_MODULE)};\n${show(999_995)}`,
      show(999_996),
    );
    Deno.writeTextFileSync(path, notebookText(notebook));
    const { failure } = await executeFile(path, { out: `${folder}/out`, timeout: 60_000 });
    expect(failure).toBeUndefined();
    const written = Deno.readTextFileSync(`${folder}/out/large.ipynb`);
    const [small, large] = parseNotebook(written, "large.ipynb").cells.map((cell) =>
      cell.outputs?.[0] as { data: Record<string, string[]> }
    );
    expect(small.data["text/html"]).toEqual(["h".repeat(999_995)]);
    expect(large.data["text/plain"]).toEqual(["plain"]);
    const link = /href="(large_displays\/[0-9a-f]{16}\.html)"/.exec(
      large.data["text/html"].join(""),
    );
    const file = Deno.readTextFileSync(`${folder}/out/${link?.[1]}`);
    expect(file).toBe("h".repeat(999_996));
    const digest = createHash("sha256").update(file).digest("hex");
    expect(link?.[1]).toContain(digest.slice(0, 16));
  });
});
