/**
 * The journal of an output folder: finished rows in the order in which they finished, appended so that what
 * was flushed outlasts a kill and a power failure. The tables are made from it.
 *
 * @module
 */
import { frame, type Framed, stampOfLine, unframe } from "./framed.ts";
import { onDisk, StorageError } from "./storage.ts";
import { writeFully } from "./whole_file.ts";

/** Where a record stands. */
export interface Place {
  /** First byte of its line. */
  readonly offset: number;
  /** Bytes of its line without the end. */
  readonly length: number;
}

/** Bytes read at once. */
const WINDOW = 1 << 20;
/** Bytes gathered before they are written without being asked. */
const MOST_GATHERED = 1 << 20;

/** Calls back for each line of a file; returns the offset after the last line end. */
function eachLine(file: Deno.FsFile, onLine: (line: Uint8Array, offset: number) => void): number {
  let held = new Uint8Array(0), at = 0;
  const buffer = new Uint8Array(WINDOW);
  for (;;) {
    const n = file.readSync(buffer);
    if (n === null) return at;
    const joined = new Uint8Array(held.length + n);
    joined.set(held);
    joined.set(buffer.subarray(0, n), held.length);
    let from = 0;
    for (let end; (end = joined.indexOf(10, from)) >= 0; from = end + 1) {
      onLine(joined.subarray(from, end), at + from);
    }
    at += from;
    held = joined.subarray(from);
  }
}

/** An open journal. */
export class Journal {
  readonly #path: string;
  readonly #out: Deno.FsFile;
  readonly #in: Deno.FsFile;
  #gathered: Uint8Array[] = [];
  #flushed: number;
  #end: number;
  #window = new Uint8Array(0);
  #windowAt = 0;
  /** Records that were not whole and are left out. */
  readonly damaged: number;

  private constructor(path: string, files: [Deno.FsFile, Deno.FsFile], end: number, bad: number) {
    this.#path = path;
    [this.#in, this.#out] = files;
    this.#flushed = this.#end = end;
    this.damaged = bad;
  }

  /**
   * Opens a journal, or begins one. A torn end is cut off; a damaged record is passed over.
   *
   * @param path File.
   * @param onRecord Called for each whole record in order; of two with one stamp the later holds.
   * @returns The journal, to be appended to.
   * @throws {StorageError} if the disk refuses, here and in all methods.
   */
  static open(path: string, onRecord: (stamp: string, place: Place) => void): Journal {
    return onDisk(`open ${path}`, () => {
      const out = Deno.openSync(path, { append: true, create: true });
      const input = Deno.openSync(path, { read: true });
      let damaged = 0;
      const end = eachLine(input, (line, offset) => {
        const stamp = stampOfLine(line);
        if (stamp === undefined) damaged++;
        else onRecord(stamp, { offset, length: line.length });
      });
      if (out.statSync().size > end) {
        damaged++;
        out.truncateSync(end);
        out.syncSync();
      }
      return new Journal(path, [input, out], end, damaged);
    });
  }

  /**
   * Adds a record; it is durable after the next {@linkcode Journal.flush}.
   *
   * @param record Stamp and text.
   * @returns Where it will stand.
   */
  append(record: Framed): Place {
    const line = frame(record), offset = this.#end;
    this.#gathered.push(line);
    this.#end += line.length;
    if (this.#end - this.#flushed > MOST_GATHERED) this.flush();
    return { offset, length: line.length - 1 };
  }

  /** Makes all added records durable. */
  flush(): void {
    if (this.#gathered.length === 0) return;
    onDisk(`add rows to ${this.#path}`, () => {
      this.#demandPresent();
      const bytes = new Uint8Array(this.#end - this.#flushed);
      let at = 0;
      for (const line of this.#gathered) {
        bytes.set(line, at);
        at += line.length;
      }
      try {
        writeFully(this.#out, bytes);
      } catch (error) {
        this.#cut();
        throw error;
      }
      this.#out.syncDataSync();
      this.#flushed = this.#end;
      this.#gathered = [];
    });
  }

  #demandPresent(): void {
    const here = Deno.statSync(this.#path); // NotFound if the folder vanished
    const { ino } = this.#out.statSync();
    if (here.ino === ino && here.size >= this.#flushed) return;
    throw new StorageError(
      `Cannot add rows to ${this.#path} as it must be the file that was opened: it was replaced`,
    );
  }

  /** Takes half a record back; if that fails too, the next start does it. */
  #cut(): void {
    try {
      this.#out.truncateSync(this.#flushed);
    } catch { /* the first error is told */ }
  }

  /**
   * Reads a record back; neighbours in the file are cheap to read one after the other.
   *
   * @param place Where it stands; it must have been flushed.
   * @returns Its text.
   */
  read({ offset, length }: Place): string {
    const from = offset - this.#windowAt;
    if (from < 0 || from + length > this.#window.length) this.#load(offset, length);
    const at = offset - this.#windowAt;
    const record = unframe(this.#window.subarray(at, at + length));
    if (record !== undefined) return record.text;
    throw new StorageError(
      `Cannot read ${this.#path} as it must stay as it was written: byte ${offset} changed`,
    );
  }

  #load(offset: number, length: number): void {
    onDisk(`read ${this.#path}`, () => {
      const window = new Uint8Array(Math.max(WINDOW, length));
      this.#in.seekSync(offset, Deno.SeekMode.Start);
      let filled = 0;
      while (filled < window.length) {
        const n = this.#in.readSync(window.subarray(filled));
        if (n === null) break;
        filled += n;
      }
      this.#window = window.subarray(0, filled);
      this.#windowAt = offset;
    });
  }

  /** Closes the files; what was not flushed is lost. */
  close(): void {
    this.#in.close();
    this.#out.close();
  }
}
