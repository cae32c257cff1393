/**
 * `deno task kernelspec`: lets notebook pages find this project's kernel, or no more.
 *
 * @module
 */
import { join } from "node:path";
import { KERNEL_NAME, kernelsFolder, kernelSpec } from "../show/notebook/kernelspec.ts";
import { type CommandOption, helpText, parseOptions } from "./options.ts";
import { closing, STATUS } from "./status.ts";

const PURPOSE = `Installs the kernel specification "${KERNEL_NAME}" for this user.`;

/** Options of `deno task kernelspec`. */
export const KERNELSPEC_OPTIONS: readonly CommandOption[] = [
  { name: "remove", meaning: "Remove the specification instead." },
];

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, KERNELSPEC_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("kernelspec", PURPOSE, KERNELSPEC_OPTIONS));
    return STATUS.done;
  }
  const folder = join(kernelsFolder((name) => Deno.env.get(name), Deno.build.os), KERNEL_NAME);
  if (values.has("remove")) {
    await Deno.remove(folder, { recursive: true }).catch((error) => {
      if (!(error instanceof Deno.errors.NotFound)) throw error;
    });
    console.log(`Removed: ${folder}`);
    return STATUS.done;
  }
  await Deno.mkdir(folder, { recursive: true });
  const text = JSON.stringify(kernelSpec(Deno.version.deno), null, 2);
  await Deno.writeTextFile(join(folder, "kernel.json"), `${text}\n`);
  console.log(`Installed: ${folder}; "deno task kernelspec --remove" removes it`);
  return STATUS.done;
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
