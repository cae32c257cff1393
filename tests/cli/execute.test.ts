import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { runs } from "../show/notebook/notebooks.ts";
import { notebookText, parseNotebook } from "../../lib/show/notebook/document.ts";
import { notebookOf } from "../show/notebook/notebooks.ts";

let folder = "";
beforeAll(async () => {
  folder = await Deno.makeTempDir();
});
afterAll(() => Deno.remove(folder, { recursive: true }));

function save(name: string, ...sources: string[]): string {
  const path = `${folder}/${name}`;
  Deno.writeTextFileSync(path, notebookText(notebookOf(...sources)));
  return path;
}

/** Starts the command with the permissions that deno.json gives it. */
function start(...args: string[]): Deno.ChildProcess {
  const { tasks } = JSON.parse(Deno.readTextFileSync("deno.json"));
  const [, ...words] = tasks.execute.command.split(" ");
  return new Deno.Command(Deno.execPath(), {
    args: [...words, ...args],
    stdout: "piped",
    stderr: "piped",
  }).spawn();
}

/** Starts the command as a user does. */
function startTask(...args: string[]): Deno.ChildProcess {
  return new Deno.Command(Deno.execPath(), {
    args: ["task", "execute", ...args],
    stdout: "piped",
    stderr: "piped",
  }).spawn();
}

async function run(...args: string[]): Promise<{ code: number; out: string; err: string }> {
  const { code, stdout, stderr } = await start(...args).output();
  const decoder = new TextDecoder();
  return { code, out: decoder.decode(stdout), err: decoder.decode(stderr) };
}

async function until(condition: () => boolean): Promise<void> {
  const limit = Date.now() + 30_000; // far above the seconds it takes
  while (!condition() && Date.now() < limit) await new Promise((go) => setTimeout(go, 50));
  expect(condition()).toBe(true);
}

describe("deno task execute", () => {
  it("writes every notebook, names the failing one and its cell, and exits with 1", async () => {
    const good = save("good.ipynb", "1 + 1");
    const bad = save("bad.ipynb", "1", 'throw new Error("no")', "3");
    const out = `${folder}/out`;
    const { code, out: said, err } = await run(bad, good, "--out", out);
    expect(code).toBe(1);
    expect(err).toContain("bad.ipynb: cell 2 (c2): Error: no\n");
    expect(said).toContain(`Executed: ${out}/good.ipynb\n`);
    const written = parseNotebook(Deno.readTextFileSync(`${out}/bad.ipynb`), "bad.ipynb");
    expect(written.cells[1].outputs).toMatchObject([{ output_type: "error", evalue: "no" }]);
    expect([...Deno.readDirSync(out)].map((entry) => entry.name).sort()).toEqual([
      "bad.ipynb",
      "good.ipynb",
    ]);
  });

  it("gives the notebook the run that it is executed for, and large displays a folder", async () => {
    const run_ = `${folder}/run`;
    Deno.mkdirSync(run_);
    Deno.writeTextFileSync(`${run_}/results.csv`, "");
    const path = save("reads.ipynb", 'console.log(Deno.env.get("BACKSTAMP_RUN"))');
    expect((await run(path, "--run", run_)).code).toBe(0);
    const written = parseNotebook(Deno.readTextFileSync(`${run_}/reads.ipynb`), "reads.ipynb");
    expect(written.cells[0].outputs).toEqual([
      { output_type: "stream", name: "stdout", text: [`${run_}\n`] },
    ]);
  });

  it("names every fault of the command line and exits with 2", async () => {
    const { code, err } = await run("a.ipynb", "b/a.ipynb", "--run", "x", "--table", "y");
    expect(code).toBe(2);
    expect(err).toContain("a.ipynb is named twice");
    expect(err).toContain("--run and --table");
    expect((await run()).err).toContain("a notebook must be named");
    expect((await run("a.ipynb", "--timeout", "0")).err).toContain("current value is 0");
    expect((await run(`${folder}/none.ipynb`)).err).toContain("there is none");
  });

  it("says why a file is not a notebook for this kernel", async () => {
    const path = `${folder}/python.ipynb`;
    const notebook = { ...notebookOf("1"), metadata: { language_info: { name: "python" } } };
    Deno.writeTextFileSync(path, JSON.stringify(notebook));
    const { code, err } = await run(path, "--out", `${folder}/out`);
    expect(code).toBe(1);
    expect(err).toContain("its language must be typescript: language is python");
  });

  const ends = ["SIGINT", "SIGTERM", "SIGKILL"] as const;
  it.runIf(Deno.build.os !== "windows").each([
    ...ends.map((signal) => ({ signal, by: "the command" })),
    ...ends.map((signal) => ({ signal, by: "deno task" })),
  ])(
    "takes its kernel along when $by ends by $signal",
    async ({ signal, by }) => {
      const note = `${folder}/pid-${signal}-${by.length}`;
      const path = save(
        `hangs-${signal}-${by.length}.ipynb`,
        `Deno.writeTextFileSync(${
          JSON.stringify(note)
        }, String(Deno.pid)); await new Promise(() => {})`,
      );
      const command = by === "the command"
        ? start(path, "--out", `${folder}/out`)
        : startTask(path, "--out", `${folder}/out`);
      const output = command.output();
      const pid = (): number => {
        try {
          return Number(Deno.readTextFileSync(note));
        } catch {
          return 0;
        }
      };
      await until(() => pid() > 0);
      expect(runs(pid())).toBe(true);
      command.kill(signal);
      const { code } = await output;
      await until(() => !runs(pid()));
      if (signal === "SIGKILL") return;
      expect(code).toBe(3);
      const written = parseNotebook(
        Deno.readTextFileSync(`${folder}/out/hangs-${signal}-${by.length}.ipynb`),
        "hangs.ipynb",
      );
      expect(written.cells[0].outputs).toMatchObject([{
        output_type: "error",
        ename: "Interrupted",
      }]);
    },
  );
});
