/**
 * A client of one `deno jupyter` kernel: starts it on free ports of 127.0.0.1, talks to it over its shell,
 * control and iopub channels, and ends it.
 *
 * @module
 */
import { type KernelPlace, type KernelProcess, startProcess } from "./child.ts";
import { connectionText, freePorts } from "./connection.ts";
import { Codec, type Message } from "./message.ts";
import { connectSocket, type Socket } from "./zmtp.ts";

/** A kernel that answers. */
export interface Kernel {
  /** What the kernel said of its language, for the metadata of a notebook. */
  readonly languageInfo: Readonly<Record<string, unknown>>;
  /** Settles with a sentence when the kernel can no longer be talked to. */
  readonly lost: Promise<string>;
  /** Called with every message of the iopub channel, in the order of arrival. */
  onPublished: (message: Message) => void;
  /** Sends a request on the shell channel; settles with the reply. */
  request(type: string, content: Record<string, unknown>): Promise<Message>;
  /** Asks the kernel to stop what it runs. */
  interrupt(): Promise<void>;
  /** Asks the kernel to end by itself. */
  shutdown(): Promise<void>;
  /** What the process wrote past the protocol. */
  strayText(): string;
  /** Ends the kernel and waits until it is gone; safe to call twice. */
  stop(): Promise<void>;
}

/** Starts of the kernel tried: another program may take a free port before the kernel binds it. */
const STARTS = 3;
/** Longest wait for a kernel that answers (milliseconds): a start takes 0.9 to 2.3 s here. */
const START_LIMIT = 60_000;

/**
 * Starts a kernel and waits until it answers and its published messages arrive.
 *
 * @param place working directory and environment of the kernel
 * @returns the kernel
 * @throws {Error} if it does not start
 */
export async function startKernel(place: KernelPlace): Promise<Kernel> {
  let failure = "";
  for (let start = 0; start < STARTS; start++) {
    const ports = freePorts(5);
    const file = await Deno.makeTempFile({
      prefix: ".kernel-",
      suffix: ".json",
      ...(place.scratch === undefined ? {} : { dir: place.scratch }),
    });
    try {
      const key = crypto.randomUUID();
      await Deno.writeTextFile(file, connectionText(ports, key));
      const process = startProcess(file, place);
      try {
        return await connectKernel(process, ports, key);
      } catch (error) {
        failure = `${(error as Error).message} ${process.strayText()}`.trim();
        await process.kill();
      }
    } finally {
      await Deno.remove(file);
    }
  }
  throw new Error(`Cannot start a kernel as "deno jupyter" must run: ${failure}`);
}

/**
 * Connects to a kernel that is being started.
 *
 * @param process its process
 * @param ports ports of its connection file: shell, control, iopub
 * @param key secret of its connection file
 * @returns the kernel, as soon as it answers and its published messages arrive
 * @throws {Error} if it ends or does not answer
 */
export async function connectKernel(
  process: KernelProcess,
  [shellPort, controlPort, iopubPort]: readonly number[],
  key: string,
): Promise<Kernel> {
  const codec = await Codec.create(key);
  const sockets = await beforeLimit(
    Promise.all([
      connectWhenUp(shellPort, "DEALER", process),
      connectWhenUp(controlPort, "DEALER", process),
      connectWhenUp(iopubPort, "SUB", process),
    ]),
  );
  const [shell, control, iopub] = sockets;
  const broken = Promise.withResolvers<string>();
  const waiting = new Map<string, (reply: Message) => void>();
  const answer = (message: Message): void => waiting.get(message.parent)?.(message);
  listen(shell, codec, answer, broken.resolve);
  listen(control, codec, answer, broken.resolve);
  const drained = listen(iopub, codec, (message) => kernel.onPublished(message), broken.resolve);
  // the last outputs of a kernel that died are still on their way when its exit code is known
  const died = process.ended.then(async (code) => {
    await Promise.race([drained, after(500, null)]);
    return `it ended with exit code ${code}`;
  });
  const send = async (socket: Socket, type: string, content: Record<string, unknown>) => {
    const { id, frames } = await codec.encode(type, content);
    const reply = new Promise<Message>((resolve) => waiting.set(id, resolve));
    await socket.send(frames).catch(() => {}); // a broken connection is told by `lost`
    return await reply.finally(() => waiting.delete(id));
  };
  const kernel = {
    languageInfo: {} as Readonly<Record<string, unknown>>,
    // a death closes the connections too: give the exit code the time to arrive and to win
    lost: Promise.race([
      died,
      broken.promise.then((why) => Promise.race([died, after(1000, why)])),
    ]),
    onPublished: (_: Message): void => {},
    request: (type: string, content: Record<string, unknown>) => send(shell, type, content),
    interrupt: async () => {
      await send(control, "interrupt_request", {});
    },
    shutdown: async () => {
      await send(control, "shutdown_request", { restart: false });
    },
    strayText: process.strayText,
    stop: async () => {
      for (const socket of sockets) socket.close();
      await process.kill();
    },
  };
  await beforeLimit(untilPublished(kernel));
  return kernel;
}

/** A subscription takes effect some time after it was sent: asks until a published message arrives. */
async function untilPublished(kernel: {
  languageInfo: Readonly<Record<string, unknown>>;
  lost: Promise<string>;
  onPublished: (message: Message) => void;
  request: Kernel["request"];
}): Promise<void> {
  let seen = false;
  kernel.onPublished = () => seen = true;
  const lost = kernel.lost.then((why) => {
    throw new Error(why);
  });
  while (!seen) {
    const reply = await Promise.race([kernel.request("kernel_info_request", {}), lost]);
    kernel.languageInfo = reply.content.language_info as Record<string, unknown>;
    await after(20, null);
  }
  kernel.onPublished = () => {};
  lost.catch(() => {});
}

/** Reads on without waiting for anybody: a kernel whose published messages nobody reads blocks. */
async function listen(
  socket: Socket,
  codec: Codec,
  take: (message: Message) => void,
  fail: (why: string) => void,
): Promise<void> {
  let decoding: Promise<void> = Promise.resolve();
  while (true) {
    const frames = await socket.receive();
    if (frames === null) break;
    decoding = decoding.then(async () => {
      const message = await codec.decode(frames).catch(() => null);
      if (message === null) fail("a message of it was broken, as after a display above 4 MB");
      else take(message);
    });
  }
  await decoding;
  fail("its stream of messages broke off");
}

async function connectWhenUp(
  port: number,
  type: "DEALER" | "SUB",
  process: KernelProcess,
): Promise<Socket> {
  let ended: number | undefined;
  process.ended.then((code) => ended = code);
  for (const start = Date.now(); Date.now() - start < START_LIMIT;) {
    try {
      return await connectSocket(port, type);
    } catch (error) {
      if (!(error instanceof Deno.errors.ConnectionRefused)) throw error;
    }
    if (ended !== undefined) throw new Error(`it ended with exit code ${ended}`);
    await after(20, null);
  }
  throw new Error("it did not listen in time");
}

function after<T>(milliseconds: number, value: T): Promise<T> {
  return new Promise((resolve) => setTimeout(resolve, milliseconds, value));
}

async function beforeLimit<T>(work: Promise<T>): Promise<T> {
  let timer: ReturnType<typeof setTimeout> | undefined;
  const limit = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error("it did not answer in time")), START_LIMIT);
  });
  return await Promise.race([work, limit]).finally(() => clearTimeout(timer));
}
