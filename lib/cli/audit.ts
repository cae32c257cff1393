/**
 * `deno task audit`: claims about models, or the ready audits, into a ledger.
 *
 * @module
 */
import { AUDIT_OPTIONS, auditRequest } from "./audit_options.ts";
import { launch } from "./launch.ts";
import { helpText, parseOptions } from "./options.ts";
import { closing, STATUS } from "./status.ts";

const PURPOSE = "Proves or refutes claims; exit status 1 if one is refuted.";

async function main(args: readonly string[]): Promise<number> {
  const values = parseOptions(args, AUDIT_OPTIONS);
  if (values.has("help")) {
    console.log(helpText("audit", PURPOSE, AUDIT_OPTIONS));
    return STATUS.done;
  }
  const request = auditRequest(values);
  const read = [request.out, ...(request.file === undefined ? [] : [request.file])];
  // the reader of YAML asks for two variables of its own debugging
  const grant = { read, write: [request.out], env: ["LOG_TOKENS", "LOG_STREAM"] };
  return await launch("judge.ts", grant, request);
}

if (import.meta.main) Deno.exit(await closing(() => main(Deno.args)));
