/**
 * Things that a notebook page shows richly, with a limit: a display of more than about 4 MB can break the
 * kernel's stream of outputs for good, so that large ones go to files with a link in their place.
 *
 * @module
 */
import { basename, join } from "node:path";
import { sha256 } from "../../batch/stamp.ts";
import type { MimeBundle } from "./document.ts";
import { DISPLAYS_VARIABLE } from "./variables.ts";

/** Largest display that goes through the kernel: characters of all its representations together. */
export const DISPLAY_LIMIT = 1_000_000;
/** Of a display above the limit, representations up to this length stay (characters). */
const KEPT = 10_000;

/** Key under which Deno's kernel looks for a representation. */
export const DISPLAY: unique symbol = Symbol.for("Jupyter.display");

/** Something that shows itself in a notebook. */
export interface Displayable {
  /** Representations by media type. */
  [DISPLAY](): MimeBundle;
}

const EXTENSIONS: Readonly<Record<string, string>> = {
  "image/svg+xml": "svg",
  "image/png": "png",
  "text/html": "html",
  "text/plain": "txt",
};

/**
 * Makes representations displayable. Above {@linkcode DISPLAY_LIMIT} they are written to files when shown,
 * named by their digest, and a link is shown. The folder is the one beside the executed notebook, or
 * `displays` in the working directory of a notebook that is run by hand.
 *
 * @param bundle text by media type; `image/png` in base 64
 * @returns an object to be the last value of a cell, or to be given to `Deno.jupyter.display`
 * @example
 * ```ts
 * import { DISPLAY, displayable } from "@backstamp/backstamp";
 * const shown = displayable({ "text/plain": "kappa = 1" })[DISPLAY]();
 * if (shown["text/plain"] !== "kappa = 1") throw new Error();
 * ```
 */
export function displayable(bundle: Readonly<Record<string, string>>): Displayable {
  return { [DISPLAY]: () => limited(bundle) };
}

/**
 * Representations as they may go through the kernel, see {@linkcode displayable}.
 *
 * @param bundle text by media type
 * @returns the same, or links to files that were written
 */
export function limited(bundle: Readonly<Record<string, string>>): MimeBundle {
  const size = Object.values(bundle).reduce((sum, text) => sum + text.length, 0);
  if (size <= DISPLAY_LIMIT) return { ...bundle };
  const folder = Deno.env.get(DISPLAYS_VARIABLE) || join(Deno.cwd(), "displays");
  Deno.mkdirSync(folder, { recursive: true });
  const large = Object.entries(bundle).filter(([, text]) => text.length > KEPT);
  const links = large.map(([type, text]) => {
    const name = `${sha256(text).slice(0, 16)}.${EXTENSIONS[type] ?? "dat"}`;
    Deno.writeFileSync(join(folder, name), bytesOf(type, text));
    return { path: `${basename(folder)}/${name}`, type };
  });
  const small = Object.entries(bundle).filter(([, text]) => text.length <= KEPT);
  return {
    "text/plain": links.map(({ path, type }) => `${type}: ${path}`).join("\n"),
    ...Object.fromEntries(small.filter(([type]) => type === "text/plain")),
    "text/html": links.map(({ path, type }) => `<p>${type}: <a href="${path}">${path}</a></p>`)
      .join("\n"),
  };
}

function bytesOf(type: string, text: string): Uint8Array {
  if (type !== "image/png") return new TextEncoder().encode(text);
  return Uint8Array.from(atob(text), (character) => character.charCodeAt(0));
}
