/**
 * Plain text for LaTeX: what has a meaning there is escaped, Greek and a few signs become commands, letters
 * of Latin-1 stay, anything else is shown by its code.
 *
 * @module
 */

const SPECIAL: Readonly<Record<string, string>> = {
  "\\": "$\\backslash$",
  "{": "\\{",
  "}": "\\}",
  "$": "\\$",
  "&": "\\&",
  "%": "\\%",
  "#": "\\#",
  "_": "\\_",
  "^": "\\^{}",
  "~": "\\~{}",
  "<": "$<$",
  ">": "$>$",
  "|": "$|$",
  '"': "''",
  "–": "--",
  "—": "---",
  "’": "'",
  "‘": "`",
  "“": "``",
  "”": "''",
  "→": "$\\to$",
  "∞": "$\\infty$",
  "≤": "$\\le$",
  "≥": "$\\ge$",
  "±": "$\\pm$",
  "×": "$\\times$",
  "∂": "$\\partial$",
  "∇": "$\\nabla$",
  "√": "$\\surd$",
  "²": "$^2$",
  "³": "$^3$",
  "·": "$\\cdot$",
};

const LOWER =
  "alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma sigma tau upsilon phi chi psi omega"
    .split(" ");
const UPPER = "ΓΔΘΛΞΠΣΥΦΨΩ",
  UPPER_NAMES = "Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega"
    .split(" ");

function character(c: string): string {
  if (Object.hasOwn(SPECIAL, c)) return SPECIAL[c]!;
  const code = c.codePointAt(0)!;
  if (code >= 32 && code < 127) return c;
  if (code === 9 || code === 10 || code === 13) return " ";
  if (code >= 0x3b1 && code <= 0x3c9) {
    const name = LOWER[code - 0x3b1]!;
    return name === "omicron" ? "o" : `$\\${name}$`;
  }
  const upper = UPPER.indexOf(c);
  if (upper >= 0) return `$\\${UPPER_NAMES[upper]}$`;
  if (/\p{Letter}/u.test(c) && code >= 0xc0 && code <= 0xff) return c;
  return `\\texttt{U+${code.toString(16).toUpperCase().padStart(4, "0")}}`;
}

/**
 * Text that LaTeX prints as it is.
 *
 * @param text Any text.
 */
export function escapeTex(text: string): string {
  return [...text.normalize("NFC")].map(character).join("");
}
