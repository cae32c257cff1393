import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { Lock } from "../../lib/batch/lock.ts";

const FOLDER = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(FOLDER, { recursive: true }));

const ROWS = 300;
const TABLE = `${FOLDER}/table.csv`;
const rows = Array.from({ length: ROWS }, (_, i) => `r${i},rst,boulware,1,${1 + i / 7}`);
Deno.writeTextFileSync(TABLE, `case,model,state,kappa,mass\n${rows.join("\n")}\n`);

/** Starts the command as deno.json has it; the launcher is the process that gets signals. */
function start(out: string, ...args: string[]): Deno.ChildProcess {
  const { tasks } = JSON.parse(Deno.readTextFileSync("deno.json"));
  const [, ...words] = tasks.run.command.split(" ");
  return new Deno.Command(Deno.execPath(), {
    args: [...words, "--table", TABLE, "--out", `${FOLDER}/${out}`, ...args],
    env: { NO_COLOR: "1" },
    stdout: "piped",
    stderr: "piped",
  }).spawn();
}

async function ended(
  child: Deno.ChildProcess,
): Promise<{ code: number; out: string; err: string }> {
  const { code, stdout, stderr } = await child.output(), decoder = new TextDecoder();
  return { code, out: decoder.decode(stdout), err: decoder.decode(stderr) };
}

function journalled(out: string): number {
  try {
    return Deno.readTextFileSync(`${FOLDER}/${out}/rows.journal`).split("\n").length - 1;
  } catch {
    return 0;
  }
}

async function until(condition: () => boolean): Promise<void> {
  while (!condition()) await new Promise((resolve) => setTimeout(resolve, 5));
}

const exists = (path: string) => {
  try {
    return Deno.lstatSync(path) !== undefined;
  } catch {
    return false;
  }
};
const results = (out: string) => Deno.readTextFileSync(`${FOLDER}/${out}/results.csv`);

let undisturbed = "";
beforeAll(async () => {
  const { code, err } = await ended(start("whole", "--quiet", "--store", `${FOLDER}/store`));
  expect(code, err).toBe(0);
  undisturbed = results("whole");
});

describe("deno task run that is stopped", () => {
  for (const signal of ["SIGINT", "SIGTERM"] as const) {
    it(`by ${signal} keeps what was finished, frees the folder, and completes it the next time`, async () => {
      const out = signal.toLowerCase(), child = start(out);
      await until(() => journalled(out) >= 20);
      child.kill(signal);
      const { code, err } = await ended(child);
      expect(code, err).toBe(3);
      const kept = journalled(out);
      expect(err).toContain(
        `Interrupted: ${
          ROWS - kept
        } of ${ROWS} rows are missing; finished ones are kept, run again`,
      );
      expect(kept).toBeLessThan(ROWS);
      expect(exists(`${FOLDER}/${out}/run.lock`)).toBe(false);
      expect(JSON.parse(Deno.readTextFileSync(`${FOLDER}/${out}/run.json`)).status).toBe(
        "interrupted",
      );
      const again = await ended(start(out));
      expect(again.code, again.err).toBe(0);
      expect(results(out)).toBe(undisturbed);
      expect(journalled(out)).toBe(ROWS);
    });
  }

  it("by SIGKILL of its launcher stops too, and completes the next time", async () => {
    const out = "launcher", child = start(out);
    await until(() => journalled(out) >= 20);
    child.kill("SIGKILL");
    await child.output(); // its pipes close when the solving process ends as well
    expect(exists(`${FOLDER}/${out}/run.lock`)).toBe(false);
    expect(journalled(out)).toBeLessThan(ROWS);
    const again = await ended(start(out));
    expect(again.code, again.err).toBe(0);
    expect(results(out)).toBe(undisturbed);
  });

  it("refuses a folder that another process has, and changes nothing in it", async () => {
    Deno.mkdirSync(`${FOLDER}/taken`);
    const lock = await Lock.take(`${FOLDER}/taken`);
    const { code, err } = await ended(start("taken"));
    lock.release();
    expect(code).toBe(2);
    expect(err).toContain(
      `one run at a time must do so: process ${Deno.pid} on ${Deno.hostname()} works there since`,
    );
    expect([...Deno.readDirSync(`${FOLDER}/taken`)]).toEqual([]);
  });

  it("started twice at once comes to the same table: one solves, the other is refused or comes later", async () => {
    const both = await Promise.all([ended(start("twice")), ended(start("twice"))]);
    const codes = both.map(({ code }) => code).sort();
    expect([[0, 0], [0, 2]], JSON.stringify(both)).toContainEqual(codes);
    expect(results("twice")).toBe(undisturbed);
    expect(journalled("twice")).toBe(ROWS);
  });
});

describe("deno task run", () => {
  it("--quiet prints nothing if all goes well, and --progress-lines tells programs how far it is", async () => {
    const lines = `${FOLDER}/lines.jsonl`;
    const args = ["--quiet", "--store", `${FOLDER}/store`, "--progress-lines", lines];
    expect(await ended(start("stored", ...args))).toEqual({
      code: 0,
      out: "",
      err: "",
    });
    expect(results("stored")).toBe(undisturbed);
    const events = Deno.readTextFileSync(lines).trimEnd().split("\n").map((line) =>
      JSON.parse(line)
    );
    expect(events).toEqual([
      { event: "rows", done: 0, total: 0, kept: ROWS, kinds: {}, unfinished: 0 },
      { event: "end", status: "done" },
    ]);
  });

  it("refuses a limit of rows that is none", async () => {
    for (const limit of ["0", "-1", "x", "NaN"]) {
      const { code, err } = await ended(start("none", `--row-limit=${limit}`));
      expect(code).toBe(2);
      expect(err).toMatch(/Cannot use --row-limit as it must be seconds/);
    }
  });
});
