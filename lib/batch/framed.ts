/**
 * One record as one line that tells whether it is whole: length and checksum stand before it.
 *
 * `LLLLLLLL CCCCCCCCCCCCCCCC STAMP TEXT`: bytes of what follows the second space in hexadecimal, the first
 * 16 digits of their SHA-256, the stamp, and text without a line end.
 *
 * @module
 */
import { sha256 } from "./stamp.ts";

const LENGTH = 8, CHECK = 16, STAMP = 64;
/** Bytes before the stamp. */
const HEAD = LENGTH + 1 + CHECK + 1;
const decoder = new TextDecoder(), encoder = new TextEncoder();

/** A record that is whole. */
export interface Framed {
  /** Stamp, 64 hexadecimal digits. */
  readonly stamp: string;
  /** What the record says. */
  readonly text: string;
}

/**
 * Frames a record.
 *
 * @param record Stamp and text.
 * @returns One line, its end included.
 */
export function frame({ stamp, text }: Framed): Uint8Array {
  const body = encoder.encode(`${stamp} ${text}`);
  const length = body.length.toString(16).padStart(LENGTH, "0");
  const head = encoder.encode(`${length} ${sha256(body).slice(0, CHECK)} `);
  const line = new Uint8Array(HEAD + body.length + 1);
  line.set(head);
  line.set(body, HEAD);
  line[line.length - 1] = 10;
  return line;
}

/**
 * Checks a line.
 *
 * @param line Bytes without the line end.
 * @returns The stamp, or undefined if the line is not a whole record.
 */
export function stampOfLine(line: Uint8Array): string | undefined {
  if (line.length < HEAD + STAMP + 1) return undefined;
  const head = decoder.decode(line.subarray(0, HEAD + STAMP));
  const body = line.subarray(HEAD);
  if (!/^[0-9a-f]{8} [0-9a-f]{16} [0-9a-f]{64}$/.test(head)) return undefined;
  if (parseInt(head.slice(0, LENGTH), 16) !== body.length) return undefined;
  if (sha256(body).slice(0, CHECK) !== head.slice(LENGTH + 1, HEAD - 1)) return undefined;
  return head.slice(HEAD);
}

/**
 * Reads a line.
 *
 * @param line Bytes without the line end.
 * @returns Its record, or undefined if it is not whole.
 */
export function unframe(line: Uint8Array): Framed | undefined {
  const stamp = stampOfLine(line);
  if (stamp === undefined) return undefined;
  return { stamp, text: decoder.decode(line.subarray(HEAD + STAMP + 1)) };
}
