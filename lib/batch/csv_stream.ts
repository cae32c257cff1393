/**
 * Records of a CSV file that is read piece by piece, so that its size does not matter.
 *
 * @module
 */
import { type CsvRecord, readCsv } from "./csv.ts";
import type { Fault } from "./fault.ts";

const LINE_FEED = 10, QUOTE = 34;

function joined(pieces: readonly Uint8Array[]): Uint8Array {
  if (pieces.length === 1) return pieces[0];
  const all = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.length, 0));
  let at = 0;
  for (const piece of pieces) {
    all.set(piece, at);
    at += piece.length;
  }
  return all;
}

/** Cuts bytes after line ends that stand outside quotes. */
async function* wholeLines(bytes: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  let rest: Uint8Array[] = [], quoted = false;
  for await (const piece of bytes) {
    let end = 0;
    for (let i = 0; i < piece.length; i++) {
      if (piece[i] === QUOTE) quoted = !quoted;
      else if (piece[i] === LINE_FEED && !quoted) end = i + 1;
    }
    if (end > 0) {
      yield joined([...rest, piece.subarray(0, end)]);
      rest = [];
    }
    if (end < piece.length) rest.push(piece.subarray(end));
  }
  if (rest.length > 0) yield joined(rest);
}

/**
 * Reads records as they come.
 *
 * @param bytes Pieces of the file.
 * @param faults Where faults of encoding, line ends and quotes go; the file is not read on after the first
 * piece that has one.
 * @returns Records in order, the header first, with their lines in the file.
 */
export async function* csvRecords(
  bytes: AsyncIterable<Uint8Array>,
  faults: Fault[],
): AsyncGenerator<CsvRecord> {
  let before = 0; // lines
  for await (const lines of wholeLines(bytes)) {
    const read = readCsv(lines);
    for (const { fields, line } of read.records) yield { fields, line: before + line };
    faults.push(...read.faults.map((fault) => ({ ...fault, line: before + fault.line })));
    if (read.faults.length > 0) return;
    before += lines.reduce((count, byte) => byte === LINE_FEED ? count + 1 : count, 0);
  }
}
