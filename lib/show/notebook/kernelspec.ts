/**
 * The kernel specification under which notebook pages find this project's kernel (jupyter-client
 * documentation, "Making kernels for Jupyter", "Kernel specs").
 *
 * @module
 */
import { join } from "node:path";

/** Name of the kernel; notebooks name it in their metadata. */
export const KERNEL_NAME = "backstamp";

/** A kernel specification. */
export interface KernelSpec {
  /** Command that starts the kernel. */
  readonly argv: readonly string[];
  /** Name in menus. */
  readonly display_name: string;
  /** Language of the cells. */
  readonly language: string;
  /** `message`: Stop asks the kernel to interrupt; without it pages send a signal, which kills this one. */
  readonly interrupt_mode: "message";
}

/**
 * The specification for one version of Deno, started through npx so that no Deno need be installed.
 *
 * @param version version of Deno
 * @returns contents of `kernel.json`
 * @example
 * ```ts
 * import { kernelSpec } from "@backstamp/backstamp";
 * if (kernelSpec("2.9.6").interrupt_mode !== "message") throw new Error();
 * ```
 */
export function kernelSpec(version: string): KernelSpec {
  return {
    argv: ["npx", "-y", `deno@${version}`, "jupyter", "--kernel", "--conn", "{connection_file}"],
    display_name: "Backstamp (Deno)",
    language: "typescript",
    interrupt_mode: "message",
  };
}

/**
 * Folder of a user's kernel specifications (Jupyter documentation, "Data files").
 *
 * @param env value of an environment variable, or undefined
 * @param os operating system
 * @returns absolute path
 * @throws {Error} if the environment does not tell where the user's files are
 * @example
 * ```ts
 * import { kernelsFolder } from "@backstamp/backstamp";
 * const home = (name: string) => ({ HOME: "/h" } as Record<string, string>)[name];
 * if (kernelsFolder(home, "linux") !== "/h/.local/share/jupyter/kernels") throw new Error();
 * ```
 */
export function kernelsFolder(env: (name: string) => string | undefined, os: string): string {
  const base = (variable: string, ...parts: string[]): string => {
    const folder = env(variable);
    if (folder === undefined || folder === "") {
      throw new Error(`Cannot find Jupyter's folder as ${variable} must be set: it is not`);
    }
    return join(folder, ...parts);
  };
  const data = env("JUPYTER_DATA_DIR");
  if (data) return join(data, "kernels");
  if (os === "windows") return base("APPDATA", "jupyter", "kernels");
  if (os === "darwin") return base("HOME", "Library", "Jupyter", "kernels");
  if (env("XDG_DATA_HOME")) return base("XDG_DATA_HOME", "jupyter", "kernels");
  return base("HOME", ".local", "share", "jupyter", "kernels");
}
