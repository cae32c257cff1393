import { describe, expect, it } from "vitest";
import { connectionText, freePorts } from "../../../lib/show/notebook/connection.ts";
import { connectKernel } from "../../../lib/show/notebook/kernel.ts";
import { kernelsFolder, kernelSpec } from "../../../lib/show/notebook/kernelspec.ts";
import type { Message } from "../../../lib/show/notebook/message.ts";

const haveNpx = await new Deno.Command("npx", { args: ["--version"] }).output()
  .then(({ success }) => success, () => false);

describe("kernelSpec", () => {
  it("is installed and removed by the command, alone in its folder", async () => {
    const folder = await Deno.makeTempDir();
    const { tasks } = JSON.parse(Deno.readTextFileSync("deno.json"));
    const [, ...words] = tasks.kernelspec.command.split(" ");
    const run = (...args: string[]) =>
      new Deno.Command(Deno.execPath(), {
        args: [...words, ...args],
        env: { JUPYTER_DATA_DIR: folder },
      }).output();
    const file = `${folder}/kernels/backstamp/kernel.json`;
    expect((await run()).code).toBe(0);
    expect(JSON.parse(Deno.readTextFileSync(file))).toEqual(kernelSpec(Deno.version.deno));
    expect((await run("--remove")).code).toBe(0);
    expect([...Deno.readDirSync(`${folder}/kernels`)]).toEqual([]);
    expect((await run("--remove")).code).toBe(0);
    await Deno.remove(folder, { recursive: true });
  });

  it("goes where Jupyter looks on each system", () => {
    const env = (values: Record<string, string>) => (name: string) => values[name];
    // paths from Jupyter's documentation, "Data files"
    expect(kernelsFolder(env({ HOME: "/h" }), "linux")).toBe("/h/.local/share/jupyter/kernels");
    expect(kernelsFolder(env({ HOME: "/h" }), "darwin")).toBe("/h/Library/Jupyter/kernels");
    expect(kernelsFolder(env({ JUPYTER_DATA_DIR: "/d" }), "linux")).toBe("/d/kernels");
    expect(() => kernelsFolder(env({}), "linux")).toThrow("HOME must be set");
  });

  it.runIf(haveNpx || Deno.env.get("CI") === "true")(
    "starts a kernel with npx whose busy loop stops on request, and variables survive",
    async () => {
      const spec = kernelSpec(Deno.version.deno);
      const [ports, key] = [freePorts(5), crypto.randomUUID()];
      const file = await Deno.makeTempFile({ suffix: ".json" });
      await Deno.writeTextFile(file, connectionText(ports, key));
      const [program, ...args] = spec.argv.map((word) =>
        word === "{connection_file}" ? file : word
      );
      const child = new Deno.Command(program, {
        args,
        env: { NO_COLOR: "1" },
        stdout: "null",
        stderr: "null",
      }).spawn();
      const ended = child.status.then(({ code }) => code);
      const kernel = await connectKernel(
        { ended, strayText: () => "", kill: async () => {} },
        ports,
        key,
      );
      try {
        const shown: Message[] = [];
        kernel.onPublished = (message) => shown.push(message);
        const run = (code: string) =>
          kernel.request("execute_request", { code, silent: false, allow_stdin: false });
        await run("const kappa = 12;");
        const busy = run("while (true);");
        await new Promise((go) => setTimeout(go, 500)); // the loop runs by then
        expect(spec.interrupt_mode).toBe("message");
        await kernel.interrupt();
        expect((await busy).content.status).toBe("error");
        await run("kappa + 1");
        await new Promise((go) => setTimeout(go, 500)); // outputs may come after the reply
        expect(
          shown.filter(({ type }) => type === "execute_result").map(({ content }) => content.data),
        )
          .toEqual([{ "text/plain": "13" }]);
      } finally {
        await kernel.shutdown();
        expect(await ended).toBe(0);
        await kernel.stop();
        await Deno.remove(file);
      }
    },
  );
});
