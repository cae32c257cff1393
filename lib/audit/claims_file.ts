/**
 * Claims files: YAML or JSON, checked against `data/schema/claims.schema.json`. All faults are reported at once,
 * with line and column.
 *
 * @module
 */
import type { ErrorObject } from "ajv";
import { Ajv2020 } from "ajv/dist/2020.js";
import { isNode, LineCounter, parseDocument } from "yaml";
import SCHEMA from "../../data/schema/claims.schema.json" with { type: "json" };
import type { Quantity } from "./conventions.ts";

/** A claim as it stands in a file. */
export interface FileClaim {
  /** Short name, unique in the file. */
  readonly id: string;
  /** What is claimed, in words. */
  readonly statement: string;
  /** Left side, in the grammar of expressions with `d(e, x)` for derivatives. */
  readonly left: string | number;
  /** Right side. */
  readonly right: string | number;
  /** Where the claim comes from. */
  readonly source?: string;
  /** Claimed modulo the equations only. @default false */
  readonly on_shell?: boolean;
  /** Claimed up to a factor that vanishes nowhere. @default false */
  readonly up_to_factor?: boolean;
  /** Convention in which it is stated. @default that of the file */
  readonly convention?: string;
}

/** What a claims file holds; the schema says what each part means. */
export interface ClaimsFile {
  /** What is audited, in words. */
  readonly title: string;
  /** Static gauge, conformal gauge, or coordinates and fields of your own. */
  readonly setting: "static" | "light-cone" | "free";
  /** Catalogue model, `any`, or an action of your own over phi and kappa. */
  readonly model?: string | {
    readonly H: string | number;
    readonly K: string | number;
    readonly V: string | number;
    readonly source?: string;
  };
  /** Exact values of parameters of the model. */
  readonly values?: Readonly<Record<string, string | number>>;
  /** Leave the quantum part out. @default false */
  readonly classical?: boolean;
  /** Fields of a static solution as expressions of one coordinate, held against the equations. */
  readonly solution?: {
    readonly coordinate: string;
    readonly pace?: string | number;
    readonly phi: string | number;
    readonly rho: string | number;
    readonly c: string | number;
  };
  /** Setting `free`: coordinates. */
  readonly coordinates?: readonly string[];
  /** Setting `free`: functions of all coordinates. */
  readonly fields?: readonly string[];
  /** Setting `free`: open functions, each with what it depends on. */
  readonly functions?: Readonly<Record<string, string>>;
  /** Setting `free`: equations on shell. */
  readonly rules?: Readonly<Record<string, string | number>>;
  /** Constants besides those of the model. */
  readonly constants?: readonly string[];
  /** Open intervals for the numeric witness. */
  readonly ranges?: Readonly<Record<string, readonly [number, number]>>;
  /** Abbreviations, each may use those before it. */
  readonly define?: Readonly<Record<string, string | number>>;
  /** Convention of the whole file. @default house */
  readonly convention?: string;
  /** Constants and abbreviations that other conventions write with another factor. */
  readonly quantities?: Readonly<Record<string, Quantity>>;
  /** Seed of the numeric witness. */
  readonly seed?: number;
  /** The claims, in order. */
  readonly claims: readonly FileClaim[];
}

/** Where in a file something stands. */
export type Path = readonly (string | number)[];

/** A file that was read, with the places of its parts. */
export interface ReadClaims {
  readonly file: ClaimsFile;
  /** Line and column of a part, or of the nearest part around it. */
  readonly at: (path: Path) => string;
}

/** A claims file that cannot be used. */
export class ClaimsError extends Error {
  /** Tells this error from others. */
  override readonly name = "ClaimsError";
  /** Every fault, one line each. */
  readonly faults: readonly string[];

  /**
   * Makes an error of faults.
   *
   * @param faults Every fault, one line each.
   */
  constructor(faults: readonly string[]) {
    super(faults.join("\n"));
    this.faults = faults;
  }
}

const LONGEST = 1_000_000; // characters of a claims file

const validate = new Ajv2020({ allErrors: true, strict: true, allowUnionTypes: true })
  .compile<ClaimsFile>(SCHEMA);

/**
 * Reads a claims file.
 *
 * @param text YAML 1.2, so JSON as well.
 * @throws {ClaimsError} with every fault of form.
 */
export function readClaims(text: string): ReadClaims {
  if (text.length > LONGEST) {
    throw new ClaimsError([
      `Cannot read the claims as the file may have at most ${LONGEST} characters: current length is ${text.length}`,
    ]);
  }
  const lines = new LineCounter();
  const document = parseDocument(text, { lineCounter: lines, prettyErrors: false, strict: true });
  const place = (offset: number) => {
    const { line, col } = lines.linePos(offset);
    return `line ${line}, column ${col}`;
  };
  if (document.errors.length > 0) {
    throw new ClaimsError(
      document.errors.map((e) => `Cannot read the claims, ${place(e.pos[0])}: ${e.message}`),
    );
  }
  const at = (path: Path): string => {
    for (let n = path.length; n >= 0; n--) {
      const node = n === 0 ? document.contents : document.getIn(path.slice(0, n), true);
      if (isNode(node) && node.range) return place(node.range[0]);
    }
    return place(0);
  };
  let file: unknown;
  try {
    file = document.toJS({ maxAliasCount: 100 });
  } catch (error) { // aliases that unfold without end
    throw new ClaimsError([`Cannot read the claims: ${(error as Error).message}`]);
  }
  if (!validate(file)) {
    throw new ClaimsError((validate.errors ?? []).filter(telling).map((e) => fault(e, file, at)));
  }
  return { file, at };
}

/** An error of `oneOf` repeats those of its branches. */
const telling = (e: ErrorObject) => e.keyword !== "oneOf" && e.keyword !== "propertyNames";

function fault(e: ErrorObject, file: unknown, at: (path: Path) => string): string {
  const path = e.instancePath.split("/").slice(1)
    .map((part) => part.replaceAll("~1", "/").replaceAll("~0", "~"))
    .map((part) => /^\d+$/.test(part) ? Number(part) : part);
  const value = path.reduce<unknown>((x, key) => (x as Record<string, unknown>)?.[key], file);
  const extra = e.params["additionalProperty"] as string | undefined;
  const where = extra === undefined ? at(path) : at([...path, extra]);
  const what = path.length === 0 ? "the file" : path.join(".");
  const must = extra !== undefined
    ? "it must not have the part"
    : e.keyword === "enum"
    ? `it must be one of ${(e.params["allowedValues"] as string[]).join(", ")}`
    : `it ${e.message}`;
  const now = extra ?? (e.keyword === "required" ? "none" : JSON.stringify(value)?.slice(0, 60));
  return `Cannot use ${what}, ${where}, as ${must}: current value is ${now}`;
}
