import { createHmac } from "node:crypto";
import { describe, expect, it } from "vitest";
import { Codec } from "../../../lib/show/notebook/message.ts";
import { connectSocket } from "../../../lib/show/notebook/zmtp.ts";

const text = new TextDecoder();
const bytes = new TextEncoder();

describe("Codec", () => {
  it("signs the four parts with HMAC-SHA256, as another implementation does", async () => {
    const { frames } = await (await Codec.create("secret")).encode("a_request", { x: 1 });
    const [delimiter, signature, ...parts] = frames.map((frame) => text.decode(frame));
    expect(delimiter).toBe("<IDS|MSG>");
    const hmac = createHmac("sha256", "secret");
    for (const part of parts) hmac.update(part);
    expect(signature).toBe(hmac.digest("hex"));
  });

  it("reads its own messages, behind any routing frames", async () => {
    const codec = await Codec.create("secret");
    const { id, frames } = await codec.encode("a_request", { x: "phi \u03c6" });
    expect(await codec.decode([bytes.encode("peer"), ...frames])).toEqual({
      type: "a_request",
      id,
      parent: "",
      metadata: {},
      content: { x: "phi \u03c6" },
    });
  });

  it("refuses a message whose content, key, signature or number of frames is wrong", async () => {
    const codec = await Codec.create("secret");
    const { frames } = await codec.encode("a_request", { x: 1 });
    const forged = [...frames.slice(0, 5), bytes.encode('{"x":2}')];
    expect(await codec.decode(forged)).toBeNull();
    expect(await (await Codec.create("other")).decode(frames)).toBeNull();
    expect(await codec.decode([frames[0], bytes.encode("no hex"), ...frames.slice(2)])).toBeNull();
    expect(await codec.decode(frames.slice(0, 5))).toBeNull();
  });
});

describe("connectSocket", () => {
  it("refuses a peer that does not speak ZMTP", async () => {
    const listener = Deno.listen({ hostname: "127.0.0.1", port: 0 });
    const answering = listener.accept().then(async (peer) => {
      await peer.write(bytes.encode("HTTP/1.1 400 Bad Request\r\n\r\n".padEnd(64)));
      return peer;
    });
    await expect(connectSocket(listener.addr.port, "DEALER")).rejects.toThrow("must speak ZMTP 3");
    (await answering).close();
    listener.close();
  });
});
