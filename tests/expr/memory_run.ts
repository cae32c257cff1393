/**
 * Prints the algebra worker's heap in bytes after 2,000 and after 10,000 derivatives, and how much the
 * algebra system grows per derivative if its history is not emptied.
 *
 *     deno run -A --v8-flags=--expose-gc memory_run.ts
 *
 * @module
 */
import nerdamer from "nerdamer/all.js";

const { gc } = globalThis as unknown as { gc(): void };
const worker = new Worker(new URL("memory_worker.ts", import.meta.url).href, { type: "module" });
const send = (message: unknown) =>
  new Promise<unknown>((resolve) => {
    worker.onmessage = (event) => resolve(event.data);
    worker.postMessage(message);
  });

const text = (i: number) => `v0^${2 + i % 5}*exp(${i}*v0)/(v1+${i})+log(v0+${i})`;
const heaps: unknown[] = [];
for (let i = 1; i <= 10_000; i++) {
  await send({ op: "diff", text: text(i), name: "v0" });
  if (i === 2000 || i === 10_000) heaps.push(await send("heap"));
}
worker.terminate();

const used = () => (gc(), Deno.memoryUsage().heapUsed);
for (let i = 1; i <= 100; i++) nerdamer(`diff(${text(i)},v0)`);
const before = used();
for (let i = 101; i <= 600; i++) nerdamer(`diff(${text(i)},v0)`);
console.log(JSON.stringify({ heaps, kept: (used() - before) / 500 }));
