/**
 * Names of cases. They become names of files, on every system.
 *
 * @module
 */

/** What a name looks like. */
export const CASE_FORMAT = "[A-Za-z0-9][A-Za-z0-9._-]{0,63}";
const CASE = new RegExp(`^${CASE_FORMAT}$`);
/** Names that stand for devices on Windows, whatever follows their first dot. */
const DEVICE = /^(con|prn|aux|nul|com\d|lpt\d)(\.|$)/i;

/**
 * Tells what is wrong with a name.
 *
 * @param text The name.
 * @returns What must hold, or undefined if it does.
 */
export function caseFault(text: string): string | undefined {
  if (!CASE.test(text)) {
    return "must be at most 64 ASCII letters, digits, dots, underscores or hyphens and start with a " +
      "letter or digit";
  }
  if (DEVICE.test(text)) return "must not be the name of a device, such as CON or COM1";
  return undefined;
}
