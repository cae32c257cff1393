/**
 * Formulas as MathML, made here: a page needs neither scripts nor the network.
 *
 * @module
 */
import temml from "temml";

/**
 * A formula in MathML.
 *
 * @param tex TeX in math mode, as made by `tex`.
 * @returns A `math` element.
 * @throws {Error} if the TeX is wrong.
 * @example
 * ```ts
 * import { mathMl, tex } from "@backstamp/backstamp";
 * if (!mathMl(tex("kappa/2")).includes("<mfrac>")) throw new Error("no fraction");
 * ```
 */
export function mathMl(tex: string): string {
  return temml.renderToString(tex, { throwOnError: true });
}
