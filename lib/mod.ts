/** @module */
export * from "./expr/tree.ts";
export * from "./expr/parse.ts";
export * from "./show/mod.ts";
