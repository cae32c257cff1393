import { describe, expect, it } from "vitest";
import { chromium } from "playwright-core";
import { notebookText } from "../../../lib/show/notebook/document.ts";
import { freePorts } from "../../../lib/show/notebook/connection.ts";
import { kernelSpec } from "../../../lib/show/notebook/kernelspec.ts";
import { execute } from "./notebooks.ts";
import { demoRun } from "./demo_run.ts";

/** Debian keeps the modules of its own packages from any other python3. */
const PYTHON = "/usr/bin/python3";
const CHROMIUM = "/usr/bin/chromium";
const NOTEBOOK = "/usr/bin/jupyter-notebook";

async function starts(program: string, ...args: string[]): Promise<boolean> {
  const command = new Deno.Command(program, { args, stdout: "null", stderr: "null" });
  return await command.output().then(({ success }) => success, () => false);
}

const inCi = Deno.env.get("CI") === "true";
const haveValidator = inCi || await starts(PYTHON, "-c", "import nbformat");
const havePage = inCi ||
  (await starts(CHROMIUM, "--version") && await starts(NOTEBOOK, "--version"));

/** What Jupyter's own validator says of notebooks; empty if all are valid. */
async function validate(...paths: string[]): Promise<string> {
  const program = "import sys, nbformat\n" +
    "for path in sys.argv[1:]: nbformat.validate(nbformat.read(path, as_version=nbformat.NO_CONVERT))";
  const { stderr } = await new Deno.Command(PYTHON, {
    args: ["-W", "error", "-c", program, ...paths],
  })
    .output();
  return new TextDecoder().decode(stderr);
}

describe("nbformat's validator (python3-nbformat)", () => {
  it.runIf(haveValidator)(
    "accepts what the executor writes, with every kind of output",
    async () => {
      const folder = await Deno.makeTempDir();
      const path = `${folder}/all.ipynb`;
      const { notebook } = await execute([
        'console.log("text"); await Deno.jupyter.display(Deno.jupyter.html`<b>x</b>`); 1',
        'throw new Error("no")',
        "2",
      ]);
      Deno.writeTextFileSync(path, notebookText(notebook));
      expect(await validate(path)).toBe("");
      Deno.writeTextFileSync(
        path,
        notebookText(notebook).replace('"name": "stdout"', '"nom": "x"'),
      );
      expect(await validate(path)).toContain("ValidationError");
      await Deno.remove(folder, { recursive: true });
    },
  );

  it.runIf(haveValidator)("accepts the notebooks of this repository", async () => {
    const names = [...Deno.readDirSync("notebooks")].map((entry) => entry.name);
    const paths = names.filter((n) => n.endsWith(".ipynb")).map((n) => `notebooks/${n}`);
    expect(paths.length).toBeGreaterThan(0);
    expect(await validate(...paths)).toBe("");
  });
});

describe("the classic notebook page in Chromium (jupyter-notebook, chromium)", () => {
  it.runIf(havePage)(
    "opens notebooks/survey.ipynb, runs all its cells, and Stop keeps their variables",
    async () => {
      const data = await Deno.makeTempDir();
      const run = await demoRun(data);
      // a copy, as the page saves by itself; inside the repository, whose import map it needs
      await Deno.mkdir("out", { recursive: true });
      const folder = await Deno.realPath(await Deno.makeTempDir({ dir: "out" }));
      await Deno.copyFile("notebooks/survey.ipynb", `${folder}/survey.ipynb`);
      await Deno.mkdir(`${data}/kernels/backstamp`, { recursive: true });
      const spec = JSON.stringify(kernelSpec(Deno.version.deno));
      await Deno.writeTextFile(`${data}/kernels/backstamp/kernel.json`, spec);
      const [[port], token] = [freePorts(1), crypto.randomUUID()];
      const server = new Deno.Command(NOTEBOOK, {
        args: [
          "--no-browser",
          "--ip=127.0.0.1",
          `--port=${port}`,
          "--port-retries=0",
          "--allow-root",
          `--NotebookApp.token=${token}`,
          `--notebook-dir=${folder}`,
        ],
        env: { JUPYTER_DATA_DIR: data, JUPYTER_RUNTIME_DIR: `${data}/runtime`, BACKSTAMP_RUN: run },
        stdout: "null",
        stderr: "null",
      }).spawn();
      const browser = await chromium.launch({ executablePath: CHROMIUM, args: ["--no-sandbox"] });
      try {
        const page = await browser.newPage();
        const address = `http://127.0.0.1:${port}/notebooks/survey.ipynb?token=${token}`;
        await whenUp(() => page.goto(address));
        await page.waitForFunction("globalThis.Jupyter?.notebook?.kernel?.is_connected?.()", null, {
          timeout: 60_000, // connected after 5 to 9 s here
        });
        await page.evaluate(
          "Jupyter.notebook.clear_all_output(); Jupyter.notebook.execute_all_cells()",
        );
        const done = "Jupyter.notebook.get_cells().filter((c) => c.cell_type === 'code')" +
          ".every((c) => typeof c.input_prompt_number === 'number')";
        await page.waitForFunction(done, null, { timeout: 60_000 });
        await new Promise((go) => setTimeout(go, 2000)); // outputs may come after the count
        const cells = await page.evaluate("Jupyter.notebook.toJSON().cells") as {
          cell_type: string;
          outputs?: { output_type: string }[];
        }[];
        const outputs = cells.flatMap((cell) => cell.outputs ?? []);
        expect(outputs.filter((output) => output.output_type === "error")).toEqual([]);
        expect(outputs).toHaveLength(8);
        expect(await page.locator(".output svg").count()).toBeGreaterThan(0);
        expect(await page.locator(".output table").count()).toBeGreaterThan(3);
        const execute = (code: string) =>
          page.evaluate(`{
          const { notebook } = Jupyter;
          notebook.insert_cell_at_bottom("code");
          const cell = notebook.get_cell(notebook.ncells() - 1);
          cell.set_text(${JSON.stringify(code)});
          cell.execute();
        }`);
        await execute("while (true);");
        await new Promise((go) => setTimeout(go, 1000)); // the loop runs by then
        await page.evaluate("Jupyter.notebook.kernel.interrupt()");
        await execute("`still ${run.rows.length} rows`");
        await page.waitForFunction(
          'document.querySelector(".cell:last-of-type .output_text")?.innerText.includes("still ")',
          null,
          { timeout: 30_000 },
        );
      } finally {
        await browser.close();
        server.kill("SIGTERM");
        await server.status;
        await Deno.remove(data, { recursive: true });
        await Deno.remove(folder, { recursive: true });
      }
    },
  );
});

async function whenUp(open: () => Promise<unknown>): Promise<void> {
  for (const limit = Date.now() + 60_000;;) {
    try {
      await open();
      return;
    } catch (error) {
      if (Date.now() > limit) throw error;
      await new Promise((go) => setTimeout(go, 300));
    }
  }
}
