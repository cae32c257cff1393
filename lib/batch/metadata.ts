/**
 * Metadata of the output tables after CSV on the Web (W3C Recommendations "Metadata Vocabulary for Tabular
 * Data" and "Model for Tabular Data and Metadata on the Web", 17 December 2015).
 *
 * Names of units and notes on empty cells use the prefixes `schema` and `skos` of the RDFa initial
 * context, which that vocabulary allows on every column.
 *
 * @module
 */
import { type OutputColumn, PROFILE_OUTPUT_COLUMNS, RESULT_COLUMNS } from "./result_columns.ts";

/** A JSON object. */
export type Json = { readonly [key: string]: unknown };

// The name of the vocabulary, which its section 5.2 requires literally; nothing is fetched.
const CONTEXT = ["http://www.w3.org/ns/csvw", { "@language": "en" }];
const DIALECT = { encoding: "utf-8", header: true, lineTerminators: ["\n"] };

function column(c: OutputColumn): Json {
  return {
    name: c.name,
    titles: c.title === c.name ? c.name : [c.name, c.title],
    "dc:description": c.description,
    datatype: c.datatype === "double" ? "double" : { base: "string", format: c.datatype.format },
    ...(c.unit === undefined ? {} : { "schema:unitText": c.unit }),
    ...(c.empty === undefined
      ? { required: true }
      : { required: false, null: "", "skos:note": `Empty: ${c.empty}.` }),
  };
}

/**
 * Metadata of results.csv, for `results.csv-metadata.json`.
 *
 * @returns A CSVW table description.
 */
export function resultsMetadata(): Json {
  return {
    "@context": CONTEXT,
    url: "results.csv",
    "dc:title": "Static back-reacted solutions, one a row",
    "dc:description":
      "Rows stand in the order of the parameter table. Units: hbar = c = G = k_B = 1. INF and -INF stand " +
      "for divergent quantities; a column x_err bounds the absolute error of column x.",
    dialect: DIALECT,
    tableSchema: { primaryKey: "case", columns: RESULT_COLUMNS.map(column) },
  };
}

/**
 * Metadata of the profiles, for `profiles/csv-metadata.json`.
 *
 * @param cases Cases that have a profile, in table order.
 * @returns A CSVW group of tables with one schema.
 */
export function profilesMetadata(cases: readonly string[]): Json {
  return {
    "@context": CONTEXT,
    "dc:title": "Profiles of static back-reacted solutions, one a file",
    "dc:description": "Points run from outside inwards. Units: hbar = c = G = k_B = 1.",
    dialect: DIALECT,
    tableSchema: { columns: PROFILE_OUTPUT_COLUMNS.map(column) },
    tables: cases.map((name) => ({ url: `${name}.csv` })),
  };
}
