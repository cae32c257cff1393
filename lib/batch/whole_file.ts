/**
 * A file that is written piece by piece under another name and takes its own when it is whole: its name
 * never stands for half of it.
 *
 * @module
 */
import { createHash } from "node:crypto";
import { onDisk } from "./storage.ts";

/** Ending of a file that is not whole yet. */
export const UNFINISHED = ".tmp";
const PIECE = 1 << 18; // bytes gathered before they are written

/** Forgets a file that may be absent. */
export function removeIfPresent(path: string): void {
  try {
    Deno.removeSync(path);
  } catch (error) {
    if (!(error instanceof Deno.errors.NotFound)) throw error;
  }
}

/**
 * Writes all bytes of a piece.
 *
 * @param file Open file.
 * @param bytes Piece.
 */
export function writeFully(file: Deno.FsFile, bytes: Uint8Array): void {
  for (let at = 0; at < bytes.length;) at += file.writeSync(bytes.subarray(at));
}

/** A file in the making. */
export class WholeFile {
  readonly #path: string;
  readonly #unfinished: string;
  readonly #file: Deno.FsFile;
  readonly #hash = createHash("sha256");
  readonly #encoder = new TextEncoder();
  #pieces: string[] = [];
  #gathered = 0;

  /**
   * Begins a file; what was left unfinished under its name is dropped.
   *
   * @param path Its name once it is whole.
   * @param ending What is added to its name until then. @default .tmp
   * @throws {StorageError} if the disk refuses, here and in all methods.
   */
  constructor(path: string, ending: string = UNFINISHED) {
    this.#path = path;
    this.#unfinished = path + ending;
    this.#file = onDisk(`write ${path}`, () => {
      removeIfPresent(this.#unfinished);
      return Deno.openSync(this.#unfinished, { write: true, createNew: true }); // follows no link
    });
  }

  /** Adds text. */
  write(text: string): void {
    this.#pieces.push(text);
    this.#gathered += text.length;
    if (this.#gathered >= PIECE) this.#out();
  }

  #out(): void {
    const text = this.#pieces.join("");
    this.#pieces = [];
    this.#gathered = 0;
    this.#put(this.#encoder.encode(text));
  }

  /** Adds bytes. */
  writeBytes(bytes: Uint8Array): void {
    this.#out();
    this.#put(bytes);
  }

  #put(bytes: Uint8Array): void {
    this.#hash.update(bytes);
    try {
      onDisk(`write ${this.#path}`, () => writeFully(this.#file, bytes));
    } catch (error) {
      this.discard();
      throw error;
    }
  }

  /**
   * Gives the file its name.
   *
   * @param durable Whether it must outlast a power failure from now on.
   * @returns SHA-256 of its bytes.
   */
  commit(durable = true): string {
    this.#out();
    try {
      onDisk(`write ${this.#path}`, () => {
        if (durable) this.#file.syncSync();
        this.#file.close();
        Deno.renameSync(this.#unfinished, this.#path);
      });
    } catch (error) {
      this.discard();
      throw error;
    }
    return this.#hash.digest("hex");
  }

  /** Drops the file; the one that had its name before stays. */
  discard(): void {
    try {
      this.#file.close();
    } catch { /* closed already */ }
    try {
      removeIfPresent(this.#unfinished);
    } catch { /* the first error is told */ }
  }
}

/**
 * Writes a file so that its name never stands for half of it.
 *
 * @param path File.
 * @param data Text or bytes.
 * @param options `durable`: whether it must outlast a power failure from now on; `ending` of its name until
 * it is whole.
 * @throws {StorageError} if the disk refuses; the old file stays.
 */
export function writeWhole(
  path: string,
  data: string | Uint8Array,
  options: { readonly durable?: boolean; readonly ending?: string } = {},
): void {
  const file = new WholeFile(path, options.ending);
  file.writeBytes(typeof data === "string" ? new TextEncoder().encode(data) : data);
  file.commit(options.durable);
}
