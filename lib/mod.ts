/** @module */
export * from "./expr/tree.ts";
export * from "./expr/parse.ts";
