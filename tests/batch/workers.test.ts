import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { casesOf, runStub, stubTable } from "./stub.ts";
import { CRASH, EXHAUST, HANG, NOT_A_NUMBER, THROW } from "./stub_worker_rows.ts";

let folder = "";
beforeEach(() => void (folder = Deno.makeTempDirSync()));
afterEach(() => Deno.removeSync(folder, { recursive: true }));

const good = Array.from({ length: 80 }, (_, i) => [`r${i}`, 1 + i / 7] as const);
const limits = { rowLimit: 2, memoryLimit: 64 };

/** The good rows with one bad one among them. */
const among = (tolerance: number, at: number) =>
  stubTable([...good.slice(0, at), ["bad", 2.25, tolerance], ...good.slice(at)]);

const lines = (out: string) => Deno.readTextFileSync(`${out}/results.csv`).split("\n");

describe("A worker", () => {
  for (
    const [what, tolerance, why] of [
      ["crashes", CRASH, /the worker ended.*, twice/],
      ["hangs", HANG, /longer than 2 s.*, twice/],
      ["exceeds its memory", EXHAUST, /the worker ended|more memory than a worker has, twice/],
    ] as const
  ) {
    it(`that ${what} loses no row but the one it was at, and that one is tried twice`, async () => {
      const out = `${folder}/out`;
      const outcome = await runStub(among(tolerance, 37), out, limits);
      expect(outcome.status).toBe("interrupted");
      expect(outcome.unfinished.map((row) => row.case)).toEqual(["bad"]);
      expect(outcome.unfinished[0]!.error).toMatch(why);
      expect(casesOf(out)).toEqual(good.map(([name]) => name));
      expect(Deno.readTextFileSync(`${out}/rows.journal`).split("\n")).toHaveLength(
        good.length + 1,
      );
      await runStub(stubTable(good), `${folder}/good`);
      expect(lines(out)).toEqual(lines(`${folder}/good`));
      const record = JSON.parse(Deno.readTextFileSync(`${out}/run.json`));
      expect(record).toMatchObject({ status: "interrupted", unfinished: outcome.unfinished });
    });
  }

  it("that crashes once is forgiven: its row is solved by another", async () => {
    const out = `${folder}/out`, marker = `${folder}/crashed`;
    Deno.env.set("STUB_CRASH_ONCE", marker);
    try {
      const outcome = await runStub(among(CRASH, 5), out, limits);
      expect(outcome).toMatchObject({ status: "done", unfinished: [] });
      expect(casesOf(out)[5]).toBe("bad");
      expect(Deno.statSync(marker).isFile).toBe(true);
    } finally {
      Deno.env.delete("STUB_CRASH_ONCE");
    }
  });

  it("whose row throws or comes to NaN leaves that row out, at once", async () => {
    for (
      const [tolerance, why] of [[THROW, /thrown/], [NOT_A_NUMBER, /must not be NaN/]] as const
    ) {
      const out = `${folder}/out-${tolerance}`;
      const outcome = await runStub(among(tolerance, 3), out);
      expect(outcome.unfinished).toHaveLength(1);
      expect(outcome.unfinished[0]!.error).toMatch(why);
      expect(Deno.readTextFileSync(`${out}/results.csv`)).not.toContain("NaN");
      expect(casesOf(out)).toEqual(good.map(([name]) => name));
    }
  });

  it("that all rows bring down leaves them all out, and says so of each", async () => {
    const out = `${folder}/out`;
    const table = stubTable(Array.from({ length: 6 }, (_, i) => [`c${i}`, 2 + i, CRASH]));
    const outcome = await runStub(table, out, limits);
    expect(outcome).toMatchObject({ status: "interrupted", finished: 0 });
    expect(outcome.unfinished.map((row) => row.case)).toEqual(["c0", "c1", "c2", "c3", "c4", "c5"]);
    expect(casesOf(out)).toEqual([]);
  });

  it("gives the same bytes as any other number of workers", async () => {
    const texts = [];
    for (const workers of [1, 2, 5]) {
      await runStub(stubTable(good), `${folder}/${workers}`, { workers });
      texts.push(lines(`${folder}/${workers}`));
    }
    expect(texts[1]).toEqual(texts[0]);
    expect(texts[2]).toEqual(texts[0]);
  });

  it("solves rows of one stamp once, under each of their names", async () => {
    const out = `${folder}/out`;
    const table = stubTable([["a", 2.5], ["b", 2.5], ["c", 4], ["d", 2.5]]);
    await runStub(table, out, { profiles: "all" });
    expect(Deno.readTextFileSync(`${out}/rows.journal`).split("\n")).toHaveLength(3);
    const [a, b] = lines(out).slice(1);
    expect(b!.replace(/^b/, "a")).toBe(a);
    const profile = (name: string) => Deno.readTextFileSync(`${out}/profiles/${name}.csv`);
    expect(profile("d")).toBe(profile("a"));
    expect(casesOf(out)).toEqual(["a", "b", "c", "d"]);
  });
});
