import { describe, expect, it } from "vitest";
import { notebookText, type Output } from "../../../lib/show/notebook/document.ts";
import { execute } from "./notebooks.ts";

/** Sizes that cross the short frame (255), the read buffer (64 KiB) and the socket's buffers. */
const SIZES = [1, 200, 255, 256, 4_000, 65_536, 300_000, 900_000];
const size = (i: number): number => SIZES[i % SIZES.length];
const text = (i: number): string => `${i}:${"x".repeat(size(i))}`;

/** One output in the kernel, written out anew here so that the expectation does not share its code. */
function source(i: number): string {
  const data = `{ "text/plain": ${i} + ":" + "x".repeat(${size(i)}) }`;
  switch (i % 5) {
    case 0:
    case 1:
      return `await Deno.jupyter.display(${data}, { raw: true });`;
    case 2:
      return `console.log("out ${i}");`;
    case 3:
      return `console.error("err ${i}");`;
    default:
      return `await Deno.jupyter.display(${data}, { raw: true, display_id: "live", update: true });`;
  }
}

function expected(i: number): Output | undefined {
  switch (i % 5) {
    case 0:
    case 1:
      return { output_type: "display_data", data: { "text/plain": text(i) }, metadata: {} };
    case 2:
      return { output_type: "stream", name: "stdout", text: `out ${i}\n` };
    case 3:
      return { output_type: "stream", name: "stderr", text: `err ${i}\n` };
  }
}

const LIVE =
  'await Deno.jupyter.display({ "text/plain": "0" }, { raw: true, display_id: "live" });';
const LAST_LIVE: Output = {
  output_type: "display_data",
  data: { "text/plain": text(99) },
  metadata: {},
};
const COUNT = Array.from({ length: 100 }, (_, i) => i);

describe("executeNotebook", () => {
  it("keeps 100 mixed outputs of one cell, in order and byte for byte, in three runs", async () => {
    const wanted = [LAST_LIVE, ...COUNT.map(expected).filter((o) => o !== undefined)];
    const texts = [];
    for (let run = 0; run < 3; run++) {
      const { notebook, failure } = await execute([[LIVE, ...COUNT.map(source)].join("\n")]);
      expect(failure).toBeUndefined();
      expect(notebook.cells[0].outputs).toEqual(wanted);
      texts.push(notebookText(notebook));
    }
    expect(new Set(texts).size).toBe(1);
  });

  it("keeps one mixed output in each of 100 cells, in three runs", async () => {
    const texts = [];
    for (let run = 0; run < 3; run++) {
      const { notebook, failure } = await execute([LIVE, ...COUNT.map(source)]);
      expect(failure).toBeUndefined();
      const [live, ...cells] = notebook.cells;
      expect(live.outputs).toEqual([LAST_LIVE]);
      expect(cells.map((cell) => cell.outputs)).toEqual(
        COUNT.map((i) => expected(i) === undefined ? [] : [expected(i)]),
      );
      expect(notebook.cells.map((cell) => cell.execution_count)).toEqual(
        [0, ...COUNT].map((_, i) => i + 1),
      );
      texts.push(notebookText(notebook));
    }
    expect(new Set(texts).size).toBe(1);
  });

  it("merges text of one stream, clears on demand and keeps results apart from displays", async () => {
    const { notebook, failure } = await execute([
      'console.log("a"); console.log("b"); console.error("c"); console.log("d"); 1 + 1',
      'console.log("gone"); Deno.jupyter.broadcast("clear_output", { wait: true }); console.log("left")',
      'console.log("gone"); Deno.jupyter.broadcast("clear_output", { wait: false });',
    ]);
    expect(failure).toBeUndefined();
    expect(notebook.cells.map((cell) => cell.outputs)).toEqual([
      [
        { output_type: "stream", name: "stdout", text: "a\nb\n" },
        { output_type: "stream", name: "stderr", text: "c\n" },
        { output_type: "stream", name: "stdout", text: "d\n" },
        {
          output_type: "execute_result",
          data: { "text/plain": "2" },
          metadata: {},
          execution_count: 1,
        },
      ],
      [{ output_type: "stream", name: "stdout", text: "left\n" }],
      [],
    ]);
  });

  it.runIf(Deno.build.os !== "windows")(
    "waits for no program that the notebook left behind",
    async () => {
      const start = performance.now();
      const { notebook } = await execute([
        'new Deno.Command("sleep", { args: ["30"] }).spawn().pid',
      ]);
      expect(performance.now() - start).toBeLessThan(20_000); // the program sleeps for 30 s
      const [result] = notebook.cells[0].outputs as { data: Record<string, string> }[];
      Deno.kill(Number(result.data["text/plain"]), "SIGKILL");
    },
  );

  it("waits for the output of a timer that fires after the last cell", async () => {
    const { notebook } = await execute(['setTimeout(() => console.log("late"), 700); 0;']);
    expect(notebook.cells[0].outputs?.at(-1)).toEqual({
      output_type: "stream",
      name: "stdout",
      text: "late\n",
    });
  });
});
