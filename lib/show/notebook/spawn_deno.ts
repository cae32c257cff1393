/**
 * Starting the Deno that runs this program once more.
 *
 * @module
 */

/**
 * Starts Deno. Under `--allow-run=deno` only the name on PATH may be started (npx puts its Deno there);
 * under `--allow-run` and `-A` its own path may, which also works where PATH has no Deno.
 *
 * @param options arguments and streams
 * @returns the running process
 * @throws {Error} if this Deno may not start itself
 */
export function spawnDeno(options: Deno.CommandOptions): Deno.ChildProcess {
  try {
    return new Deno.Command(Deno.execPath(), options).spawn();
  } catch (error) {
    if (!(error instanceof Deno.errors.NotCapable)) throw error;
    return new Deno.Command("deno", options).spawn();
  }
}
