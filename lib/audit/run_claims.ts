/**
 * Judges a claims file into a ledger.
 *
 * @module
 */
import { claimsAudits } from "./claims.ts";
import { readClaims } from "./claims_file.ts";
import type { JudgeOptions } from "./judge.ts";
import { type Ledger, ledgerOf, type LedgerPart, ledgerPart } from "./ledger.ts";
import { AUDIT_VERSIONS } from "./versions.ts";

/** How a claims file is judged. */
export interface RunClaimsOptions extends JudgeOptions {
  /** Is told of each part as it is done. */
  readonly onPart?: (part: LedgerPart, milliseconds: number) => void;
}

/**
 * Judges a claims file.
 *
 * @param text The file, YAML or JSON; see `data/schema/claims.schema.json`.
 * @param options Seed (the file's own comes first), points, digits.
 * @throws {ClaimsError} with every fault of the file.
 */
export async function runClaims(text: string, options: RunClaimsOptions = {}): Promise<Ledger> {
  const { onPart, ...judge } = options, read = readClaims(text);
  const { title, convention = "house", seed } = read.file;
  const parts: LedgerPart[] = [];
  for (const audit of claimsAudits(read)) {
    const begin = performance.now(), home = audit.name === "claims" ? convention : "house";
    const part = await ledgerPart(audit, home, {
      ...judge,
      ...(seed === undefined ? {} : { seed }),
    });
    onPart?.(part, performance.now() - begin);
    parts.push(part);
  }
  return ledgerOf(parts, { title, input: await digest(text), versions: AUDIT_VERSIONS });
}

async function digest(text: string): Promise<string> {
  const bytes = await crypto.subtle.digest("SHA-256", new TextEncoder().encode(text));
  return [...new Uint8Array(bytes)].map((b) => b.toString(16).padStart(2, "0")).join("");
}
