/**
 * Program that stands between a command and its kernel: starts `deno jupyter` on the connection file named
 * as its argument and kills it as soon as its own standard input ends. The operating system closes that
 * pipe however the command ends, so that a kernel never outlives it, not even after a crash or SIGKILL.
 *
 * @module
 */

async function keep(connectionFile: string): Promise<number> {
  const kernel = new Deno.Command(Deno.execPath(), {
    args: ["jupyter", "--kernel", "--conn", connectionFile],
    stdin: "null",
  }).spawn();
  const kill = (): void => {
    try {
      kernel.kill("SIGKILL");
    } catch {
      // it has ended already
    }
  };
  // Ctrl-C reaches the whole process group; the command decides what becomes of the kernel
  Deno.addSignalListener("SIGINT", () => {});
  if (Deno.build.os !== "windows") Deno.addSignalListener("SIGTERM", kill);
  const drain = async (): Promise<void> => {
    for await (const _ of Deno.stdin.readable);
  };
  drain().then(kill, kill);
  return (await kernel.status).code;
}

if (import.meta.main) Deno.exit(await keep(Deno.args[0]));
