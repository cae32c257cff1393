/**
 * The identity of the numeric core: a digest of the files that the row solver and the model compiler
 * consist of, the packages they import with their pinned versions, and the runtime.
 *
 * Imports are followed statically. The catalogue of models is left out: a model enters a stamp by its
 * expressions, so that a new model leaves the stamps of the others alone.
 *
 * @module
 */
import { sha256 } from "./stamp.ts";

/** Where the row solver begins, relative to lib. */
export const CORE_ENTRIES: readonly string[] = ["observe/row.ts", "model/compile.ts"];
/** What is left out, relative to lib. */
const CATALOGUE = "model/catalogue/";

const STATEMENT =
  /(?:^|[;}\s])(?:import|export)\s*(?:type\s)?(?:[\w$*\s{},]*?\sfrom\s*|)["']([^"'\n]+)["']/;
const DYNAMIC = /\bimport\(\s*["']([^"'\n]+)["']/;
const WORKER = /\bnew URL\(\s*["'](\.[^"'\n]+\.ts)["']\s*,\s*import\.meta\.url/;
const IMPORT = new RegExp([STATEMENT, DYNAMIC, WORKER].map((r) => r.source).join("|"), "g");

/**
 * Specifiers a module imports, exports from, or names by a literal for a dynamic import or a worker.
 *
 * @param source Text of a TypeScript module.
 * @returns Specifiers in order of appearance, without those in comments.
 */
export function importsOf(source: string): readonly string[] {
  const code = source.replace(/\/\*[\s\S]*?\*\//g, "").replace(/^\s*\/\/.*$/gm, "");
  return [...code.matchAll(IMPORT)].map((m) => (m[1] ?? m[2] ?? m[3])!);
}

/** Files and packages that a set of modules consists of. */
export interface Reach {
  /** Paths relative to the root with their text, line ends as LF, in order of path. */
  readonly files: ReadonlyMap<string, string>;
  /** Bare specifiers, sorted. */
  readonly bare: readonly string[];
}

/**
 * Follows relative imports from `entries`.
 *
 * @param root Folder all paths are relative to, as a URL that ends with a slash.
 * @param entries Paths of the first modules.
 * @param options `read` reads a file's text; `skip` tells paths to leave out.
 * @returns All files and bare specifiers reached.
 * @throws {Error} if an import leaves the root or a file cannot be read.
 */
export async function reach(
  root: URL,
  entries: readonly string[],
  options: {
    readonly read?: (url: URL) => Promise<string>;
    readonly skip?: (path: string) => boolean;
  } = {},
): Promise<Reach> {
  const { read = (url: URL) => Deno.readTextFile(url), skip = () => false } = options;
  const texts = new Map<string, string>(), bare = new Set<string>();
  const queue = [...entries];
  while (queue.length > 0) {
    const path = queue.pop()!;
    if (texts.has(path) || skip(path)) continue;
    const url = new URL(path, root);
    const text = (await read(url)).replaceAll("\r\n", "\n");
    texts.set(path, text);
    for (const specifier of importsOf(text)) {
      if (!specifier.startsWith(".")) {
        bare.add(specifier);
        continue;
      }
      const target = new URL(specifier, url).href;
      if (!target.startsWith(root.href)) {
        throw new Error(
          `Cannot follow ${specifier} of ${path} as it must stay within ${root.href}`,
        );
      }
      queue.push(target.slice(root.href.length));
    }
  }
  return { files: new Map([...texts].sort(([a], [b]) => a < b ? -1 : 1)), bare: [...bare].sort() };
}

/** Package name of a bare specifier: `mathjs/number` is of `mathjs`. */
export function packageOf(specifier: string): string {
  return specifier.split("/").slice(0, specifier.startsWith("@") ? 2 : 1).join("/");
}

/**
 * Pinned versions of packages.
 *
 * @param bare Bare specifiers; `node:` built-ins are part of the runtime and have no pin.
 * @param imports Import map, name to `npm:name@version`.
 * @returns Version by package.
 * @throws {Error} if a package has no exact pin.
 */
export function pinsOf(
  bare: readonly string[],
  imports: Readonly<Record<string, string>>,
): Readonly<Record<string, string>> {
  const pins: Record<string, string> = {};
  for (const name of new Set(bare.filter((s) => !s.startsWith("node:")).map(packageOf))) {
    const version = /^npm:.+@(\d[^/]*)$/.exec(imports[name] ?? "")?.[1];
    if (version === undefined) {
      throw new Error(
        `Cannot pin package ${name} as the import map must map it to one exact version: ` +
          `current value is ${imports[name]}`,
      );
    }
    pins[name] = version;
  }
  return pins;
}

/** Identity of the numeric core. */
export interface CoreIdentity {
  /** Digest of the files. */
  readonly core: string;
  /** Version of each package they import. */
  readonly pins: Readonly<Record<string, string>>;
  /** Versions of the runtime and its engine. */
  readonly runtime: Readonly<Record<string, string>>;
}

/**
 * Digest of files: SHA-256 over one line `digest  path` a file, in order of path.
 *
 * @param files Text by path.
 * @returns Lower-case hexadecimal digest.
 */
export function digestFiles(files: ReadonlyMap<string, string>): string {
  return sha256([...files].map(([path, text]) => `${sha256(text)}  ${path}\n`).join(""));
}

/**
 * Reads the identity of the core that runs.
 *
 * @returns Digest, pins and runtime.
 */
export async function coreIdentity(): Promise<CoreIdentity> {
  const lib = new URL("../", import.meta.url);
  const { files, bare } = await reach(lib, CORE_ENTRIES, {
    skip: (path) => path.startsWith(CATALOGUE),
  });
  const config = JSON.parse(await Deno.readTextFile(new URL("../deno.json", lib)));
  return {
    core: digestFiles(files),
    pins: pinsOf(bare, config.imports),
    runtime: { deno: Deno.version.deno, v8: Deno.version.v8 },
  };
}
