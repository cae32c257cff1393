/**
 * A ZMTP 3.0 connection (ZeroMQ Message Transport Protocol, rfc.zeromq.org/spec/23) with the NULL
 * mechanism, client side, over loopback TCP. Enough of it for Jupyter: one peer, DEALER and SUB sockets.
 *
 * @module
 */

/** Socket types that a Jupyter client needs. */
export type SocketType = "DEALER" | "SUB";

/** One connection: whole messages in, whole messages out. */
export interface Socket {
  /** Sends one message of one or more frames; calls are written in the order in which they are made. */
  send(frames: readonly Uint8Array[]): Promise<void>;
  /** Next message, or `null` once the peer has closed the connection or broken the protocol. */
  receive(): Promise<Uint8Array[] | null>;
  /** Closes the connection; safe to call twice. */
  close(): void;
}

const MORE = 0x01;
const LONG = 0x02;
const COMMAND = 0x04;
/** A frame length above this (64 MiB) is a broken stream, not a message: nothing here sends as much. */
const LONGEST_FRAME = 1 << 26;

/**
 * Connects to a ZeroMQ socket on 127.0.0.1 and completes the handshake. A SUB socket subscribes to
 * everything.
 *
 * @param port TCP port of the peer
 * @param type own socket type
 * @returns the open connection
 * @throws {Error} if nothing listens there or the peer does not speak ZMTP 3
 */
export async function connectSocket(port: number, type: SocketType): Promise<Socket> {
  const connection = await Deno.connect({ hostname: "127.0.0.1", port });
  connection.setNoDelay(true);
  try {
    const read = reader(connection);
    await writeAll(connection, greeting());
    const peer = await read(64);
    if (peer[0] !== 0xff || (peer[9] & 1) === 0 || peer[10] < 3) {
      throw new Error(`Cannot talk to port ${port} as the peer must speak ZMTP 3 or later`);
    }
    await writeAll(connection, ready(type));
    const answer = await readFrame(read);
    if ((answer.flags & COMMAND) === 0 || answer.body[0] !== 5) {
      throw new Error(`Cannot talk to port ${port} as the peer must answer with READY`);
    }
    // ZMTP 3.0 subscribes by a message: octet 1 and the prefix, here the empty one
    if (type === "SUB") await writeAll(connection, encodeFrame(Uint8Array.of(1), 0));
    return open(connection, read);
  } catch (error) {
    connection.close();
    throw error;
  }
}

type Read = (count: number) => Promise<Uint8Array>;

function open(connection: Deno.Conn, read: Read): Socket {
  let closed = false;
  let writing: Promise<unknown> = Promise.resolve();
  return {
    send(frames) {
      const bytes = concatenate(
        frames.map((body, i) => encodeFrame(body, i < frames.length - 1 ? MORE : 0)),
      );
      const write = writing.then(() => writeAll(connection, bytes));
      writing = write.catch(() => {});
      return write;
    },
    async receive() {
      try {
        const frames: Uint8Array[] = [];
        while (true) {
          const { flags, body } = await readFrame(read);
          if ((flags & COMMAND) !== 0) continue;
          frames.push(body);
          if ((flags & MORE) === 0) return frames;
        }
      } catch {
        return null;
      }
    },
    close() {
      if (closed) return;
      closed = true;
      connection.close();
    },
  };
}

/** Signature, version 3.0, mechanism NULL, as-server 0. */
function greeting(): Uint8Array {
  const bytes = new Uint8Array(64);
  bytes[0] = 0xff;
  bytes[9] = 0x7f;
  bytes[10] = 3;
  bytes.set(new TextEncoder().encode("NULL"), 12);
  return bytes;
}

/** READY command with the one property Socket-Type: name length (1 octet), value length (4 octets). */
function ready(type: SocketType): Uint8Array {
  const text = new TextEncoder();
  const value = text.encode(type);
  const body = concatenate([
    text.encode("\x05READY\x0bSocket-Type"),
    Uint8Array.of(0, 0, 0, value.length),
    value,
  ]);
  return encodeFrame(body, COMMAND);
}

function encodeFrame(body: Uint8Array, flags: number): Uint8Array {
  if (body.length < 256) return concatenate([Uint8Array.of(flags, body.length), body]);
  const head = new Uint8Array(9);
  head[0] = flags | LONG;
  new DataView(head.buffer).setBigUint64(1, BigInt(body.length));
  return concatenate([head, body]);
}

async function readFrame(read: Read): Promise<{ flags: number; body: Uint8Array }> {
  const [flags] = await read(1);
  if ((flags & ~(MORE | LONG | COMMAND)) !== 0) throw new Error("Broken ZMTP stream");
  const head = await read((flags & LONG) !== 0 ? 8 : 1);
  const length = head.reduce((sum, octet) => sum * 256 + octet, 0);
  if (length > LONGEST_FRAME) throw new Error("Broken ZMTP stream");
  return { flags, body: await read(length) };
}

/** Reads exactly `count` bytes through a 64 KiB buffer; throws at the end of the stream. */
function reader(connection: Deno.Conn): Read {
  const buffer = new Uint8Array(1 << 16);
  let start = 0;
  let end = 0;
  return async (count) => {
    const bytes = new Uint8Array(count);
    let filled = 0;
    while (filled < count) {
      if (start === end) {
        const got = await connection.read(buffer);
        if (got === null) throw new Error("Connection closed");
        start = 0;
        end = got;
      }
      const part = buffer.subarray(start, Math.min(end, start + count - filled));
      bytes.set(part, filled);
      filled += part.length;
      start += part.length;
    }
    return bytes;
  };
}

async function writeAll(connection: Deno.Conn, bytes: Uint8Array): Promise<void> {
  for (let sent = 0; sent < bytes.length;) sent += await connection.write(bytes.subarray(sent));
}

function concatenate(parts: readonly Uint8Array[]): Uint8Array {
  const bytes = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let offset = 0;
  for (const part of parts) {
    bytes.set(part, offset);
    offset += part.length;
  }
  return bytes;
}
