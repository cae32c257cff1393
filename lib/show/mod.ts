/**
 * Results shown: figures, solutions by hand, finished runs in notebooks.
 *
 * @module
 */
export * from "./bounded_text.ts";
export * from "./notebook/display.ts";
export * from "./notebook/document.ts";
export * from "./notebook/kernelspec.ts";
export * from "./notebook/progress.ts";
export * from "./notebook/stray_errors.ts";
export * from "./run_reader.ts";
export * from "./run_tables.ts";
export * from "./small_profile.ts";
export * from "./solution.ts";
export * from "./solve.ts";
export * from "./solve_options.ts";
export * from "./table_bundle.ts";
