import { describe, expect, it } from "vitest";
import type { Output } from "../../../lib/show/notebook/document.ts";
import { execute, runs } from "./notebooks.ts";

type ErrorOutput = Extract<Output, { output_type: "error" }>;

const BEFORE = 'console.log("before");';
/** What a kernel has not sent yet dies with it: a quarter of a second is ample for one line. */
const PAUSE = "await new Promise((go) => setTimeout(go, 250));";

/** Executes a good cell, a faulty one and one more; returns the one error output of the faulty cell. */
async function fault(source: string, seconds?: number): Promise<ErrorOutput> {
  const { notebook, failure } = await execute(["Deno.pid", BEFORE + source, "2"], seconds);
  const [first, second, third] = notebook.cells.map((cell) => cell.outputs ?? []);
  const pid = Number((first[0] as { data: Record<string, string> }).data["text/plain"]);
  expect(runs(pid)).toBe(false);
  expect(third).toEqual([]);
  const errors = second.filter((output) => output.output_type === "error");
  expect(errors).toHaveLength(1);
  expect(failure).toEqual({
    position: 2,
    id: "c2",
    message: `${errors[0].ename}: ${errors[0].evalue}`,
  });
  if (errors[0].ename !== "SyntaxError") {
    expect(second).toContainEqual({ output_type: "stream", name: "stdout", text: "before\n" });
  }
  return errors[0];
}

describe("a cell that fails ends the execution with an error output and the kernel gone", () => {
  it("a throw", async () => {
    expect(await fault('throw new RangeError("too far")')).toMatchObject({
      ename: "RangeError",
      evalue: "too far",
    });
  });

  it("a throw after many outputs comes after them", async () => {
    const source =
      'for (let i = 0; i < 200; i++) console.log("x".repeat(5000)); throw new Error("e")';
    const { notebook } = await execute([source]);
    const [stream, error] = notebook.cells[0].outputs ?? [];
    expect(stream).toMatchObject({ name: "stdout", text: `${"x".repeat(5000)}\n`.repeat(200) });
    expect(error).toMatchObject({ output_type: "error", evalue: "e" });
  });

  it("a syntax error, told with line and column", async () => {
    const error = await fault("\nlet x = = 3;");
    expect(error.ename).toBe("SyntaxError");
    expect(error.evalue).toMatch(/Expression expected[^]*let x = = 3[^]*\(2:9\)/);
  });

  it("a rejection that nobody awaits", async () => {
    expect(await fault('Promise.reject(new TypeError("lost")); 1')).toMatchObject({
      ename: "TypeError",
      evalue: "lost",
    });
  });

  it("a throw in a timer, without the kernel's half minute of silence", async () => {
    const start = performance.now();
    const source = 'setTimeout(() => { throw new Error("in timer") }, 50);' +
      "await new Promise((go) => setTimeout(go, 200));";
    expect(await fault(source)).toMatchObject({ evalue: "in timer" });
    // the silence measured without handlers is 29 s
    expect(performance.now() - start).toBeLessThan(20_000);
  });

  it("a throw in a timer that fires after the last cell", async () => {
    const { failure } = await execute(['setTimeout(() => { throw new Error("late") }, 300);']);
    expect(failure).toMatchObject({ position: 1, message: "Error: late" });
  });

  it("a representation that throws", async () => {
    const source = '({ [Symbol.for("Jupyter.display")]() { throw new Error("no picture") } })';
    expect(await fault(source)).toMatchObject({ evalue: "no picture" });
  });

  it("a busy loop over its time is interrupted", async () => {
    expect(await fault("while (true) {}", 3)).toMatchObject({
      ename: "TimeoutError",
      evalue: "The cell ran longer than its limit of 3 s; it was interrupted",
    });
  });

  it("a promise that never settles costs the kernel", async () => {
    expect(await fault("await new Promise(() => {})", 3)).toMatchObject({
      ename: "TimeoutError",
      evalue: expect.stringContaining("its kernel was ended"),
    });
  });

  it("a busy loop that begins in a timer after its cell", async () => {
    expect(await fault("setTimeout(() => { while (true); }, 0); 0;", 3)).toMatchObject({
      ename: "TimeoutError",
    });
  });

  it("displays so large that they may break the kernel's stream, unless all arrive whole", async () => {
    const { notebook, failure } = await execute([
      "for (let i = 0; i < 5; i++) await Deno.jupyter.display(" +
      '{ "text/plain": "x".repeat(1e7) }, { raw: true });',
    ], 20);
    const outputs = notebook.cells[0].outputs ?? [];
    const whole = outputs.filter((output) =>
      output.output_type === "display_data" && output.data["text/plain"] === "x".repeat(1e7)
    );
    if (failure === undefined) expect(whole).toHaveLength(5);
    else expect(outputs.at(-1)).toMatchObject({ output_type: "error" });
    expect(outputs.length - whole.length).toBe(failure === undefined ? 0 : 1);
  });

  it("a kernel that exits", async () => {
    expect(await fault(PAUSE + "Deno.exit(7)")).toMatchObject({
      ename: "KernelDied",
      evalue: "The kernel was lost: it ended with exit code 7",
    });
  });

  it.runIf(Deno.build.os !== "windows")("a kernel that is killed", async () => {
    expect(await fault(PAUSE + 'Deno.kill(Deno.pid, "SIGKILL")')).toMatchObject({
      ename: "KernelDied",
      evalue: "The kernel was lost: it ended with exit code 137", // 128 + SIGKILL
    });
  });
});
