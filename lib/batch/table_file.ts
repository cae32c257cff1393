/**
 * Tables and lists from files that may be anything: what is no table is refused after the first bytes that
 * say so, and never held.
 *
 * @module
 */
import { TableError } from "./fault.ts";

/** Limits of a file. */
export interface FileLimits {
  /** Bytes of a line. */
  readonly line: number;
  /** Bytes of the file. */
  readonly size: number;
}

/** Limits of a table: a line has 14 columns; a million rows of 250 bytes. */
export const TABLE_LIMITS: FileLimits = { line: 1 << 16, size: 1 << 28 };
const PIECE = 1 << 16; // bytes read at once

function refuse(what: string, line: number, text: string): never {
  throw new TableError([{ line, text }], what);
}

/**
 * Reads a file.
 *
 * @param path The file.
 * @param what What it is, for messages.
 * @param limits Its limits.
 * @returns Its bytes.
 * @throws {TableError} at the first byte, line or character that no table has.
 */
export function readTableFile(
  path: string,
  what: string = "the table",
  limits: FileLimits = TABLE_LIMITS,
): Uint8Array {
  const file = Deno.openSync(path), decoder = new TextDecoder("utf-8", { fatal: true });
  const pieces: Uint8Array[] = [];
  let size = 0, lines = 1, lineLength = 0;
  try {
    for (;;) {
      const buffer = new Uint8Array(PIECE), n = file.readSync(buffer);
      if (n === null) break;
      const piece = buffer.subarray(0, n);
      for (let from = 0; from < n;) {
        const end = piece.indexOf(10, from), to = end < 0 ? n : end;
        const nul = piece.subarray(from, to).indexOf(0);
        if (nul >= 0) refuse(what, lines, "must be text: current value has a byte 0");
        lineLength += to - from;
        if (lineLength > limits.line) {
          refuse(what, lines, `must be at most ${limits.line} bytes long: current value is longer`);
        }
        if (end >= 0) {
          lines++;
          lineLength = 0;
        }
        from = to + 1;
      }
      try {
        decoder.decode(piece, { stream: true });
      } catch {
        refuse(
          what,
          lines,
          "must be UTF-8 text: at or before it, current value has bytes that are not",
        );
      }
      size += n;
      if (size > limits.size) {
        refuse(what, lines, `must be in a file of at most ${limits.size} bytes: it is longer`);
      }
      pieces.push(piece);
    }
  } finally {
    file.close();
  }
  const bytes = new Uint8Array(size);
  let at = 0;
  for (const piece of pieces) {
    bytes.set(piece, at);
    at += piece.length;
  }
  return bytes;
}
