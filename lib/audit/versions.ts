/**
 * Programs that take part in an audit, with their pinned versions.
 *
 * @module
 */
import CONFIG from "../../deno.json" with { type: "json" };

const pinned = (name: "mathjs" | "nerdamer") => CONFIG.imports[name].replace(/^.*@/, "");

/** Versions by program. */
export const AUDIT_VERSIONS: Readonly<Record<string, string>> = {
  backstamp: CONFIG.version,
  deno: typeof Deno === "undefined" ? "" : Deno.version.deno,
  mathjs: pinned("mathjs"),
  nerdamer: pinned("nerdamer"),
};
