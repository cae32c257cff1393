/**
 * Facts about where a run took place, for its record. None of them enters a stamp.
 *
 * @module
 */

/** The machine of a run. */
export interface Host {
  /** Host name. */
  readonly name: string;
  /** Operating system and its release. */
  readonly system: string;
  /** Processor architecture. */
  readonly architecture: string;
  /** Logical cores. */
  readonly cores: number;
  /** Memory in bytes. */
  readonly memory: number;
}

/**
 * Reads the facts of this machine. Needs the permission to read host name, release and memory size.
 *
 * @returns Facts.
 */
export function hostFacts(): Host {
  return {
    name: Deno.hostname(),
    system: `${Deno.build.os} ${Deno.osRelease()}`,
    architecture: Deno.build.arch,
    cores: navigator.hardwareConcurrency,
    memory: Deno.systemMemoryInfo().total,
  };
}

async function readText(url: URL): Promise<string | undefined> {
  try {
    return (await Deno.readTextFile(url)).trim();
  } catch {
    return undefined; // no repository here, or packed otherwise: a run needs none
  }
}

/**
 * Reads the commit that a checkout is at, without running git.
 *
 * @param root Folder of the checkout, as a URL that ends with a slash.
 * @returns The commit, or undefined where there is no repository.
 */
export async function gitCommit(root: URL): Promise<string | undefined> {
  const head = await readText(new URL(".git/HEAD", root));
  const name = /^ref: (refs\/[\w./-]+)$/.exec(head ?? "")?.[1];
  if (name === undefined) return /^[0-9a-f]{40,64}$/.test(head ?? "") ? head : undefined;
  const loose = await readText(new URL(`.git/${name}`, root));
  if (loose !== undefined) return loose;
  const packed = await readText(new URL(".git/packed-refs", root));
  return packed?.split("\n").find((line) => line.endsWith(` ${name}`))?.split(" ")[0];
}
