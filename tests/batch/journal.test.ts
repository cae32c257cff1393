import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { Journal, type Place } from "../../lib/batch/journal.ts";
import { StorageError } from "../../lib/batch/storage.ts";

let folder = "", path = "";
beforeEach(() => {
  folder = Deno.makeTempDirSync();
  path = `${folder}/rows.journal`;
});
afterEach(() => {
  vi.restoreAllMocks();
  Deno.removeSync(folder, { recursive: true });
});

const stamp = (digit: string) => digit.repeat(64);

function open() {
  const found = new Map<string, Place>();
  const journal = Journal.open(path, (name, place) => found.set(name, place));
  const texts = Object.fromEntries(
    [...found].map(([name, place]) => [name[0], journal.read(place)]),
  );
  return { journal, texts };
}

function write(...records: readonly (readonly [digit: string, text: string])[]): void {
  const { journal } = open();
  for (const [digit, text] of records) journal.append({ stamp: stamp(digit), text });
  journal.flush();
  journal.close();
}

describe("A journal", () => {
  it("reads back what was flushed, of two records with one stamp the later", () => {
    write(["a", "one"], ["b", "zwei, größer als \u{1f600}"], ["a", "three"]);
    const { journal, texts } = open();
    expect(texts).toEqual({ a: "three", b: "zwei, größer als \u{1f600}" });
    expect(journal.damaged).toBe(0);
    journal.close();
  });

  it("is a line of length, checksum (GNU coreutils sha256sum), stamp and text a record", () => {
    write(["a", "one"]);
    // printf '%s one' aaa... (64) | sha256sum
    expect(Deno.readTextFileSync(path)).toBe(`00000044 7366ed8ad67bfa8b ${stamp("a")} one\n`);
  });

  it("cuts a torn end off, wherever it is torn, and goes on after the last whole record", () => {
    write(["a", "one"], ["b", "two"]);
    const whole = Deno.readFileSync(path), first = whole.indexOf(10) + 1;
    for (let length = first; length < whole.length; length++) {
      Deno.writeFileSync(path, whole.subarray(0, length));
      const { journal, texts } = open();
      expect(texts).toEqual({ a: "one" });
      expect(journal.damaged).toBe(length === first ? 0 : 1);
      journal.close();
      write(["c", "four"]);
      const after = open();
      expect(after.texts).toEqual({ a: "one", c: "four" });
      after.journal.close();
    }
  });

  it("passes over a record in which any one byte changed, and over no other", () => {
    write(["a", "one"], ["b", "two"], ["c", "six"]);
    const whole = Deno.readFileSync(path), line = whole.indexOf(10) + 1;
    for (let at = line; at < 2 * line - 1; at++) {
      const bytes = whole.slice();
      bytes[at]! ^= 1;
      Deno.writeFileSync(path, bytes);
      const { journal, texts } = open();
      expect(texts).toEqual({ a: "one", c: "six" });
      expect(journal.damaged).toBe(1);
      journal.close();
    }
  });

  it("takes random bytes for damage and not for records", () => {
    Deno.writeFileSync(path, crypto.getRandomValues(new Uint8Array(50_000)));
    const { journal, texts } = open();
    expect(texts).toEqual({});
    expect(journal.damaged).toBeGreaterThan(0);
    journal.close();
  });

  it("says that the disk is full, and loses nothing that was flushed before", () => {
    write(["a", "one"]);
    const before = Deno.readFileSync(path), { journal } = open();
    const real = Deno.FsFile.prototype.writeSync;
    let room = 50; // bytes: half a record still fits
    vi.spyOn(Deno.FsFile.prototype, "writeSync").mockImplementation(function (
      this: Deno.FsFile,
      bytes: Uint8Array,
    ) {
      if (room === 0) throw Object.assign(new Error("No space left on device"), { code: "ENOSPC" });
      const n = real.call(this, bytes.subarray(0, room));
      room -= n;
      return n;
    });
    journal.append({ stamp: stamp("b"), text: "two" });
    expect(() => journal.flush()).toThrow(StorageError);
    expect(Deno.readFileSync(path)).toEqual(before);
    expect(() => journal.flush()).toThrow(
      /Cannot add rows to .*rows\.journal as the disk must have room: No space left/,
    );
    room = 1000;
    journal.flush();
    journal.close();
    const after = open();
    expect(after.texts).toEqual({ a: "one", b: "two" });
    after.journal.close();
  });

  it("says that the folder vanished or the file was replaced", () => {
    const { journal } = open();
    journal.append({ stamp: stamp("a"), text: "one" });
    Deno.removeSync(path);
    expect(() => journal.flush()).toThrow(/as it must be there/);
    Deno.writeTextFileSync(path, "another");
    expect(() => journal.flush()).toThrow(/as it must be the file that was opened/);
    journal.close();
  });
});
