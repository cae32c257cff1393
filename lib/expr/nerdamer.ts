/**
 * The algebra system as a proposer: text in, text out, nothing believed. The only file that imports
 * nerdamer, at the first call. Loaded by the algebra worker, or by the main thread where there are no
 * workers; never by anything that computes numbers.
 *
 * @module
 */

/** Operations used; everything else of the algebra system is not trusted even as a proposer. */
export type Operation = "diff" | "expand" | "simplify" | "factor" | "integrate";

/** One request: an expression text and, for diff and integrate, the variable. */
export interface Request {
  readonly op: Operation;
  readonly text: string;
  readonly name?: string;
}

// deno-lint-ignore no-explicit-any
type Nerdamer = any;
let library: Promise<Nerdamer> | undefined;

/**
 * Loads nerdamer with its derivative patched: `diff` writes into the argument of a shared square root
 * (jiggzson/nerdamer 610, 675), so it gets a freshly parsed copy of its input.
 */
function load(): Promise<Nerdamer> {
  library ??= import("nerdamer/all.js").then((m) => {
    const nerdamer: Nerdamer = (m as Nerdamer).default ?? m;
    const core = nerdamer.getCore(), original = core.Calculus.diff;
    const fresh = (s: Nerdamer, wrt: unknown, n: unknown) =>
      original(s?.clone ? core.PARSER.parse(s.toString()) : s, wrt, n);
    core.Calculus.diff = fresh;
    core.PARSER.functions.diff[0] = fresh;
    return nerdamer;
  });
  return library;
}

/** Asks the algebra system once; its history is emptied after every request, so memory stays flat. */
export async function ask(request: Request): Promise<string> {
  const nerdamer = await load();
  try {
    const argument = request.name === undefined ? request.text : `${request.text},${request.name}`;
    return nerdamer(`${request.op}(${argument})`).toString();
  } finally {
    nerdamer.flush();
  }
}
