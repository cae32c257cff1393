/**
 * Messages of the Jupyter wire protocol 5.3 (jupyter-client documentation, "Messaging in Jupyter", "The
 * Wire Protocol"): frames, JSON parts and their HMAC-SHA256 signature.
 *
 * @module
 */

/** A decoded message; `content` is as the kernel sent it. */
export interface Message {
  /** Message type, such as `execute_reply` or `stream`. */
  readonly type: string;
  /** Identifier of this message. */
  readonly id: string;
  /** Identifier of the request that it answers, or empty. */
  readonly parent: string;
  /** Metadata of the message. */
  readonly metadata: Readonly<Record<string, unknown>>;
  /** Body; fields depend on the type. */
  readonly content: Readonly<Record<string, unknown>>;
}

const DELIMITER = "<IDS|MSG>";
const encoder = new TextEncoder();
const decoder = new TextDecoder();

/** Signs, encodes, decodes and checks the messages of one session. */
export class Codec {
  readonly #key: CryptoKey;
  readonly #session = crypto.randomUUID();

  private constructor(key: CryptoKey) {
    this.#key = key;
  }

  /**
   * Makes a codec.
   *
   * @param key the secret of the connection file
   * @returns a codec with a fresh session identifier
   */
  static async create(key: string): Promise<Codec> {
    const algorithm = { name: "HMAC", hash: "SHA-256" };
    const bytes = encoder.encode(key);
    return new Codec(
      await crypto.subtle.importKey("raw", bytes, algorithm, false, ["sign", "verify"]),
    );
  }

  /**
   * Encodes and signs a message.
   *
   * @param type message type
   * @param content body
   * @returns the frames to send and the identifier of the message
   */
  async encode(
    type: string,
    content: Record<string, unknown>,
  ): Promise<{ id: string; frames: Uint8Array[] }> {
    const id = crypto.randomUUID();
    const header = {
      msg_id: id,
      session: this.#session,
      username: "client",
      date: new Date().toISOString(),
      msg_type: type,
      version: "5.3",
    };
    const parts = [header, {}, {}, content].map((part) => encoder.encode(JSON.stringify(part)));
    const signature = await crypto.subtle.sign("HMAC", this.#key, joined(parts));
    const hex = Array.from(new Uint8Array(signature), (b) => b.toString(16).padStart(2, "0"));
    return {
      id,
      frames: [encoder.encode(DELIMITER), encoder.encode(hex.join("")), ...parts],
    };
  }

  /**
   * Checks and decodes a message.
   *
   * @param frames frames of one received message
   * @returns the message, or `null` if it is malformed or its signature is wrong
   */
  async decode(frames: readonly Uint8Array[]): Promise<Message | null> {
    const start = frames.findIndex((f) => f.length === 9 && decoder.decode(f) === DELIMITER);
    if (start < 0 || frames.length < start + 6) return null;
    const parts = frames.slice(start + 2, start + 6);
    const signature = fromHex(decoder.decode(frames[start + 1]));
    if (signature === null) return null;
    if (!await crypto.subtle.verify("HMAC", this.#key, signature, joined(parts))) return null;
    const [header, parent, metadata, content] = parts.map((p) => JSON.parse(decoder.decode(p)));
    return {
      type: header.msg_type,
      id: header.msg_id,
      parent: parent.msg_id ?? "",
      metadata,
      content,
    };
  }
}

function joined(parts: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const bytes = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let offset = 0;
  for (const part of parts) {
    bytes.set(part, offset);
    offset += part.length;
  }
  return bytes;
}

function fromHex(text: string): Uint8Array<ArrayBuffer> | null {
  if (!/^([0-9a-f]{2})+$/.test(text)) return null;
  return Uint8Array.from(text.match(/../g) ?? [], (pair) => parseInt(pair, 16));
}
