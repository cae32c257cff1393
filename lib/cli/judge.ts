/**
 * The work of `deno task audit`, in a process that may read the program and the claims file and write the
 * output folder, and nothing else.
 *
 * @module
 */
import { ClaimsError } from "../audit/claims_file.ts";
import { type Ledger, ledgerOf, type LedgerPart, ledgerText } from "../audit/ledger.ts";
import { ledgerDocument, ledgerTex } from "../audit/ledger_tex.ts";
import { runClaims } from "../audit/run_claims.ts";
import { runReady } from "../audit/run_ready.ts";
import { AUDIT_VERSIONS } from "../audit/versions.ts";
import { writeWhole } from "../batch/whole_file.ts";
import { closeAlgebra } from "../expr/proposer.ts";
import type { AuditRequest } from "./audit_options.ts";
import { UsageError } from "./options.ts";
import { closing, STATUS } from "./status.ts";

/** Files of a ledger, in its folder. */
const FILES = {
  ledger: "ledger.json",
  appendix: "ledger.tex",
  document: "ledger-document.tex",
  times: "times.json",
} as const;

interface Judged {
  readonly ledger: Ledger;
  /** Milliseconds by part; not in the ledger, which is the same each time. */
  readonly times: Readonly<Record<string, number>>;
}

async function claims({ file, seed }: AuditRequest): Promise<Judged> {
  let text: string;
  try {
    text = await Deno.readTextFile(file!);
  } catch (error) {
    throw new UsageError([`Cannot read the claims file ${file}: ${(error as Error).message}`]);
  }
  const times: Record<string, number> = {};
  const ledger = await runClaims(text, {
    ...(seed === undefined ? {} : { seed }),
    onPart: (part, milliseconds) => times[part.name] = milliseconds,
  });
  return { ledger, times };
}

async function ready({ model, workers, seed }: AuditRequest): Promise<Judged> {
  const shown = (part: LedgerPart, done: number, total: number) =>
    console.error(`${done} of ${total}: ${part.title}`);
  const { parts, times } = await runReady({
    workers,
    judge: seed === undefined ? {} : { seed },
    onPart: shown,
    ...(model === undefined ? {} : { model }),
  });
  const title = `Derivation audit${model === undefined ? "" : ` of ${model}`}`;
  return {
    ledger: ledgerOf(parts, { title, input: "", versions: AUDIT_VERSIONS }),
    times: Object.fromEntries(parts.map((part, i) => [part.name, times[i]!])),
  };
}

/** One line for each claim, more where it does not hold. */
function report({ parts, counts }: Ledger): void {
  for (const { title, steps } of parts) {
    console.log(title);
    for (const s of steps) {
      console.log(`  ${s.verdict.padEnd(17)} ${s.id}: ${s.statement}`);
      const more = { factor: s.factor, repair: s.repair, why: s.why };
      for (const [name, text] of Object.entries(more)) {
        if (text) console.log(`    ${name}: ${text}`);
      }
      const { at, left, right } = s.evidence;
      if (!at) continue;
      console.log(`    at ${Object.entries(at).map(([n, v]) => `${n} = ${v}`).join(", ")}`);
      console.log(`    left ${left}, right ${right}`);
    }
  }
  console.log(Object.entries(counts).map(([name, n]) => `${name}: ${n}`).join(", "));
}

async function main(request: AuditRequest): Promise<number> {
  const { out, strict } = request;
  let judged: Judged;
  try {
    judged = await (request.file === undefined ? ready(request) : claims(request));
  } catch (error) {
    if (error instanceof ClaimsError) throw new UsageError(error.faults);
    if (error instanceof RangeError && request.model !== undefined) {
      throw new UsageError([error.message]);
    }
    throw error;
  } finally {
    closeAlgebra();
  }
  const { ledger, times } = judged;
  report(ledger);
  await Deno.mkdir(out, { recursive: true });
  writeWhole(`${out}/${FILES.ledger}`, ledgerText(ledger));
  writeWhole(`${out}/${FILES.appendix}`, ledgerTex(ledger));
  writeWhole(`${out}/${FILES.document}`, ledgerDocument(FILES.appendix));
  writeWhole(`${out}/${FILES.times}`, `${JSON.stringify(times, null, 2)}\n`);
  console.log(`Ledger: ${out}/${FILES.ledger}`);
  const { refuted, undecided } = ledger.counts;
  return refuted > 0 || (strict && undecided > 0) ? STATUS.failed : STATUS.done;
}

if (import.meta.main) Deno.exit(await closing(() => main(JSON.parse(Deno.args[0]!))));
