import { uniformInt } from "pure-rand/distribution/uniformInt";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { afterAll, describe, expect, it } from "vitest";

const FOLDER = Deno.makeTempDirSync();
afterAll(() => Deno.removeSync(FOLDER, { recursive: true }));

const ROWS = 2000, PROFILES = 60, KILLS = 100;
const TABLE = `${FOLDER}/table.csv`, CASES = `${FOLDER}/cases.txt`;
const names = Array.from({ length: ROWS }, (_, i) => `r${i}`);
const rows = names.map((name, i) => `${name},swave,boulware,1,${1 + i / 7}`);
Deno.writeTextFileSync(TABLE, `case,model,state,kappa,mass\n${rows.join("\n")}\n`);
Deno.writeTextFileSync(CASES, names.slice(0, PROFILES).join("\n"));

function start(folder: string): Deno.ChildProcess {
  return new Deno.Command(Deno.execPath(), {
    args: ["run", "-A", "tests/batch/stub_run.ts", TABLE, folder, CASES],
    stdout: "null",
    stderr: "piped",
  }).spawn();
}

function size(path: string): number {
  try {
    return Deno.statSync(path).size;
  } catch {
    return -1; // not there
  }
}

const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

/** All that a run computes: results, profiles, metadata and the rows of the record. */
function computed(folder: string): Record<string, string> {
  const files = ["results.csv", "results.csv-metadata.json", "parameters.csv"];
  for (const { name } of Deno.readDirSync(`${folder}/profiles`)) files.push(`profiles/${name}`);
  const texts = files.sort().map((name) => [name, Deno.readTextFileSync(`${folder}/${name}`)]);
  const { rows, status } = JSON.parse(Deno.readTextFileSync(`${folder}/run.json`));
  return { ...Object.fromEntries(texts), record: JSON.stringify({ rows, status }) };
}

/** Stamps in the journal, from the format that lib/batch/framed.ts describes. */
function journalled(folder: string): string[] {
  return Deno.readTextFileSync(`${folder}/rows.journal`).split("\n").slice(0, -1)
    .map((line) => line.split(" ")[2]!);
}

describe("A run that is killed", () => {
  it(
    `at ${KILLS} moments and started again comes to the same bytes, no row lost or done twice`,
    async () => {
      const whole = `${FOLDER}/whole`;
      const { code, stderr } = await start(whole).output();
      expect(code, new TextDecoder().decode(stderr)).toBe(0);
      const expected = computed(whole), full = size(`${whole}/rows.journal`);
      const generator = xoroshiro128plus(20260401);
      const phases = { start: 0, rows: 0, end: 0 };
      const finish = async (folder: string) => {
        const { code, stderr } = await start(folder).output();
        expect(code, new TextDecoder().decode(stderr)).toBe(0);
        expect(computed(folder)).toEqual(expected);
        const stamps = journalled(folder);
        expect(stamps.length).toBe(ROWS);
        expect(new Set(stamps).size).toBe(ROWS);
      };
      for (let kills = 0, folder = "", spent = true; kills < KILLS;) {
        if (spent) folder = `${FOLDER}/killed-${kills}`;
        spent = false;
        const child = start(folder);
        let over = false;
        const ended = child.output().then((output) => (over = true, output));
        const phase = (["start", "rows", "end"] as const)[uniformInt(generator, 0, 2)]!;
        const share = uniformInt(generator, 0, 1000) / 1000;
        if (phase === "start") await wait(600 * share);
        const had = size(`${folder}/rows.journal`);
        const reached = () =>
          phase === "rows"
            ? size(`${folder}/rows.journal`) > had + share * (full - had) * 0.9
            : size(`${folder}/results.csv.tmp`) >= 0;
        while (phase !== "start" && !over && !reached()) await wait(1);
        if (phase === "end") await wait(60 * share);
        if (!over) child.kill("SIGKILL");
        const { signal, code, stderr } = await ended;
        if (signal === "SIGKILL") {
          kills++;
          phases[phase]++;
          const results = size(`${folder}/results.csv`);
          expect([-1, new TextEncoder().encode(expected["results.csv"]).length]).toContain(results);
          if (phase !== "end" || uniformInt(generator, 0, 3) > 0) continue;
        } else expect(code, new TextDecoder().decode(stderr)).toBe(0);
        await finish(folder);
        await Deno.remove(folder, { recursive: true });
        spent = true;
      }
      expect(Math.min(...Object.values(phases)), JSON.stringify(phases)).toBeGreaterThan(10);
    },
    900_000,
  );
});
