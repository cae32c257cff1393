import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { Lock } from "../../lib/batch/lock.ts";

let folder = "";
beforeEach(() => void (folder = Deno.makeTempDirSync()));
afterEach(() => Deno.removeSync(folder, { recursive: true }));

/** A process that takes the folder and keeps it until it is killed. */
async function owner(): Promise<Deno.ChildProcess> {
  const code = `import { Lock } from ${
    JSON.stringify(new URL("../../lib/batch/lock.ts", import.meta.url).href)
  };
    await Lock.take(${JSON.stringify(folder)}); console.log("taken"); setInterval(() => {}, 1000);`;
  const child = new Deno.Command(Deno.execPath(), {
    args: ["eval", "--no-check", code],
    stdout: "piped",
  }).spawn();
  await child.stdout.getReader().read();
  return child;
}

describe("The lock of a folder", () => {
  it("refuses a second owner by host, process and time, and is free again after release", async () => {
    const lock = await Lock.take(folder, 0);
    const started = /since \d{4}-\d\d-\d\dT/;
    await expect(Lock.take(folder, 0)).rejects.toThrow(
      `one run at a time must do so: process ${Deno.pid} on ${Deno.hostname()}`,
    );
    await expect(Lock.take(folder, 0)).rejects.toThrow(started);
    lock.release();
    const again = await Lock.take(folder, 0);
    expect(again.stale).toBeUndefined();
    again.release();
    expect([...Deno.readDirSync(folder)]).toEqual([]);
  });

  it("refuses while another process lives, and is taken over when it was killed", async () => {
    const child = await owner();
    await expect(Lock.take(folder, 0)).rejects.toThrow(`process ${child.pid} on`);
    child.kill("SIGKILL");
    await child.status;
    const lock = await Lock.take(folder, 0);
    expect(lock.stale?.pid).toBe(child.pid);
    expect(lock.stale?.host).toBe(Deno.hostname());
    lock.release();
  });

  it("takes over what says nothing, and what names a process that does not have it", async () => {
    for (const text of ["", "{", `{"host":"elsewhere","pid":${Deno.ppid},"started":"2020"}`]) {
      Deno.writeTextFileSync(`${folder}/run.lock`, text);
      const lock = await Lock.take(folder, 0);
      lock.release();
    }
  });

  it("has one owner of many that try at once", async () => {
    const tries = await Promise.allSettled(Array.from({ length: 20 }, () => Lock.take(folder, 0)));
    const taken = tries.filter((t) => t.status === "fulfilled");
    expect(taken).toHaveLength(1);
    taken[0]!.value.release();
  });
});
