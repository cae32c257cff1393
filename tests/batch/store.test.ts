import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { RunOptions } from "../../lib/batch/run.ts";
import { runStub, stubTable } from "./stub.ts";

let folder = "", store = "";
beforeEach(() => {
  folder = Deno.makeTempDirSync();
  store = `${folder}/store`;
});
afterEach(() => Deno.removeSync(folder, { recursive: true }));

const rows = Array.from({ length: 30 }, (_, i) => [`r${i}`, 1 + i / 7] as const);
const table = stubTable(rows);

/** Runs with the store; tells how many rows were solved and what was said. */
async function run(out: string, bytes = table, options: Partial<RunOptions> = {}) {
  let solved = -1;
  const notices: string[] = [];
  const { status, taken } = await runStub(bytes, `${folder}/${out}`, {
    store,
    onProgress: ({ total }) => void (solved = total),
    onNotice: (text) => notices.push(text),
    ...options,
  });
  return { status, solved, taken, notices };
}

const results = (out: string) => Deno.readTextFileSync(`${folder}/${out}/results.csv`);
const profiles = (out: string) =>
  Object.fromEntries(
    [...Deno.readDirSync(`${folder}/${out}/profiles`)]
      .map(({ name }) => [name, Deno.readTextFileSync(`${folder}/${out}/profiles/${name}`)]),
  );

function entries(ending: string): string[] {
  return [...Deno.readDirSync(store)].flatMap(({ name }) =>
    [...Deno.readDirSync(`${store}/${name}`)].map((entry) => `${store}/${name}/${entry.name}`)
  ).filter((path) => path.endsWith(ending)).sort();
}

describe("A store", () => {
  it("gives another folder the same bytes without a row solved", async () => {
    expect((await run("one")).solved).toBe(rows.length);
    expect(entries(".row")).toHaveLength(rows.length);
    expect(await run("two")).toEqual({
      status: "done",
      solved: 0,
      taken: rows.length,
      notices: [],
    });
    expect(results("two")).toBe(results("one"));
  });

  it("serves rows under other names, next to new ones", async () => {
    await run("one");
    const renamed = [["x", 2.5] as const, ...rows.slice(3).map(([n, m]) => [`${n}b`, m] as const)];
    expect((await run("two", stubTable(renamed))).solved).toBe(1);
    await runStub(stubTable(renamed), `${folder}/fresh`);
    expect(results("two")).toBe(results("fresh"));
  });

  it("keeps profiles, and solves a row again of which it lacks the profile that is wanted", async () => {
    await run("one");
    expect((await run("two", table, { profiles: "all" })).solved).toBe(rows.length);
    expect((await run("three", table, { profiles: "all" })).solved).toBe(0);
    expect(profiles("three")).toEqual(profiles("two"));
    expect(Object.keys(profiles("two")).length).toBeGreaterThan(5);
    expect(results("three")).toBe(results("one"));
  });

  it("is filled by a folder that holds what it lacks", async () => {
    await runStub(table, `${folder}/one`, { profiles: "all" });
    expect((await run("one", table, { profiles: "all" })).status).toBe("nothing-to-do");
    expect((await run("two", table, { profiles: "all" })).solved).toBe(0);
    expect(profiles("two")).toEqual(profiles("one"));
  });

  it("has damaged entries rejected, reported and solved again, whatever the damage", async () => {
    await run("one", table, { profiles: "all" });
    const paths = entries(".row"),
      [first, second] = [0, 1].map((i) => Deno.readFileSync(paths[i]!));
    const change = (at: number) => {
      const bytes = first!.slice();
      bytes[at]! ^= 1;
      return bytes;
    };
    const damages: [string, Uint8Array, RegExp][] = [
      ["a bit of the answer", change(120), /checksum/],
      ["a bit of the checksum", change(12), /checksum/],
      ["cut", first!.subarray(0, 100), /checksum/],
      ["empty", new Uint8Array(0), /checksum/],
      ["another row's entry", second!, /another stamp/],
      ["binary junk", crypto.getRandomValues(new Uint8Array(5000)), /checksum/],
    ];
    for (const [what, bytes, why] of damages) {
      Deno.writeFileSync(paths[0]!, bytes);
      const { solved, notices } = await run(`damaged by ${what}`, table, { profiles: "all" });
      expect(solved, what).toBe(1);
      expect(notices[0], what).toMatch(
        /^Rejected from the store, to be solved again: [0-9a-f]{64}: /,
      );
      expect(notices[0], what).toMatch(why);
      expect(results(`damaged by ${what}`)).toBe(results("one"));
      expect(Deno.readFileSync(paths[0]!), "mended").toEqual(first);
    }
    const profile = entries(".csv")[0]!;
    Deno.writeTextFileSync(profile, Deno.readTextFileSync(profile).replace("1", "2"));
    const { solved, notices } = await run("profile", table, { profiles: "all" });
    expect([solved, notices[0]]).toEqual([1, expect.stringMatching(/its profile changed/)]);
    expect(profiles("profile")).toEqual(profiles("one"));
  });

  it("that cannot be used does not stop a run", async () => {
    Deno.writeTextFileSync(store, "a file");
    const { status, solved, notices } = await run("one");
    expect([status, solved]).toEqual(["done", rows.length]);
    expect(notices).toHaveLength(1);
    expect(notices[0]).toMatch(/The store is left alone .* as its parent must be a folder/);
  });
});
