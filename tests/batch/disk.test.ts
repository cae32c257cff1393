import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { FolderError } from "../../lib/batch/folder.ts";
import { StorageError } from "../../lib/batch/storage.ts";
import { casesOf, runStub, stubTable } from "./stub.ts";
import { SLOW } from "./stub_worker_rows.ts";

let folder = "";
beforeEach(() => void (folder = Deno.makeTempDirSync()));
afterEach(() => {
  vi.restoreAllMocks();
  Deno.removeSync(folder, { recursive: true });
});

const rows = Array.from({ length: 60 }, (_, i) => [`r${i}`, 1 + i / 7] as const);
const table = stubTable(rows);
const everything = (out: string) => ({
  results: Deno.readTextFileSync(`${out}/results.csv`),
  profiles: [...Deno.readDirSync(`${out}/profiles`)].map(({ name }) => name).sort()
    .map((name) => [name, Deno.readTextFileSync(`${out}/profiles/${name}`)]),
});

function fail(code: string, after: number) {
  let left = after;
  const real = Deno.FsFile.prototype.writeSync;
  vi.spyOn(Deno.FsFile.prototype, "writeSync").mockImplementation(function (
    this: Deno.FsFile,
    bytes: Uint8Array,
  ) {
    if (left <= 0) throw Object.assign(new Error(`${code} from the test`), { code });
    const n = real.call(this, bytes.subarray(0, left));
    left -= n;
    return n;
  });
}

describe("A run on a disk", () => {
  it("that becomes full at any time says so and comes to the same bytes when there is room", async () => {
    await runStub(table, `${folder}/whole`, { profiles: "all" });
    const expected = everything(`${folder}/whole`);
    // from before the lock is written to within the last file
    for (const room of [0, 100, 3000, 9000, 20_000, 40_000, 60_000, 90_000]) {
      const out = `${folder}/full-${room}`;
      fail("ENOSPC", room);
      await expect(runStub(table, out, { profiles: "all" }), String(room)).rejects.toThrow(
        /as the disk must have room: .*finished rows are kept/,
      );
      vi.restoreAllMocks();
      const { status } = await runStub(table, out, { profiles: "all" });
      expect(status).toBe("done");
      expect(everything(out)).toEqual(expected);
    }
  });

  it("that is read-only says so and writes nothing", async () => {
    for (const code of ["EROFS", "EACCES"]) {
      vi.spyOn(Deno, "mkdirSync").mockImplementation(() => {
        throw Object.assign(new Error(`${code} from the test`), { code });
      });
      await expect(runStub(table, `${folder}/out`)).rejects.toThrow(StorageError);
      await expect(runStub(table, `${folder}/out`)).rejects.toThrow(/Cannot write to .*\/out as /);
      vi.restoreAllMocks();
    }
    expect([...Deno.readDirSync(folder)]).toEqual([]);
  });

  it("from which the folder vanishes says so", async () => {
    const out = `${folder}/out`;
    let gone = false;
    const onProgress = ({ done }: { done: number }) => {
      if (done < 10 || gone) return;
      Deno.removeSync(out, { recursive: true });
      gone = true;
    };
    await expect(runStub(table, out, { onProgress })).rejects.toThrow(
      /Cannot add rows to .*as it must be there/,
    );
    expect((await runStub(table, out)).status).toBe("done");
    expect(casesOf(out)).toEqual(rows.map(([name]) => name));
  });

  it("refuses a folder in which a link leads elsewhere, and follows no link left for its files", async () => {
    const out = `${folder}/out`, victim = `${folder}/victim`;
    Deno.mkdirSync(victim);
    await runStub(table, out);
    Deno.removeSync(`${out}/profiles`, { recursive: true });
    Deno.symlinkSync(victim, `${out}/profiles`);
    await expect(runStub(table, out, { profiles: "all" })).rejects.toThrow(FolderError);
    expect([...Deno.readDirSync(victim)]).toEqual([]);
    Deno.removeSync(`${out}/profiles`);
    Deno.writeTextFileSync(`${victim}/file`, "kept");
    Deno.symlinkSync(`${victim}/file`, `${out}/results.csv.tmp`);
    Deno.removeSync(`${out}/results.csv`);
    expect((await runStub(table, out)).status).toBe("done");
    expect(Deno.readTextFileSync(`${victim}/file`)).toBe("kept");
  });

  it("keeps a run's folder from a second one at the same time", async () => {
    const out = `${folder}/out`;
    const slow = stubTable(Array.from({ length: 40 }, (_, i) => [`s${i}`, 1 + i, undefined, SLOW]));
    const stop = new AbortController();
    const first = runStub(slow, out, { signal: stop.signal });
    while (
      !(() => {
        try {
          return Deno.statSync(`${out}/run.json`).isFile;
        } catch {
          return false;
        }
      })()
    ) {
      await new Promise((resolve) => setTimeout(resolve, 5));
    }
    await expect(runStub(slow, out)).rejects.toThrow(/one run at a time/);
    stop.abort();
    expect((await first).status).toBe("interrupted");
  });

  it("completes a folder after being stopped, keeping every row that was finished", async () => {
    const out = `${folder}/out`, stop = new AbortController();
    let done = 0;
    const outcome = await runStub(table, out, {
      signal: stop.signal,
      onProgress: (p) => {
        done = p.done;
        if (done >= 20) stop.abort();
      },
    });
    expect(outcome).toMatchObject({ status: "interrupted", finished: done });
    expect(done).toBeGreaterThanOrEqual(20);
    let missing = 0;
    await runStub(table, out, { onProgress: ({ total }) => void (missing = total) });
    expect(missing).toBe(rows.length - done);
    expect(casesOf(out)).toEqual(rows.map(([name]) => name));
  });

  it("takes rows of an earlier table over when the folder is given to another", async () => {
    const out = `${folder}/out`;
    await runStub(table, out, { profiles: "all" });
    const more = [["new", 500] as const, ...rows.slice(5).map(([, m], i) => [`x${i}`, m] as const)];
    await expect(runStub(stubTable(more), out)).rejects.toThrow(/--replace/);
    let missing = 0;
    await runStub(stubTable(more), out, {
      replace: true,
      onProgress: ({ total }) => void (missing = total),
    });
    expect(missing).toBe(1);
    await runStub(stubTable(more), `${folder}/fresh`);
    expect(everything(out)).toEqual(everything(`${folder}/fresh`));
  });
});
