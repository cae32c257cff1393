/** A run with the stub worker in a process of its own, to be killed: arguments are table, folder and cases. */
import { runTable } from "../../lib/batch/run.ts";

const [table, folder, cases] = Deno.args;
const stop = new AbortController();
for (const signal of ["SIGINT", "SIGTERM"] as const) {
  Deno.addSignalListener(signal, () => stop.abort());
}
try {
  const { status } = await runTable({
    table: Deno.readFileSync(table!),
    folder: folder!,
    workers: 2,
    profiles: { lines: Deno.readTextFileSync(cases!) },
    signal: stop.signal,
    worker: new URL("./stub_worker.ts", import.meta.url),
    onNotice: (text) => console.error(text),
  });
  Deno.exit(status === "interrupted" ? 3 : 0);
} catch (error) {
  console.error((error as Error).message);
  Deno.exit(2);
}
