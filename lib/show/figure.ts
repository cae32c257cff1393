/**
 * The frame that all figures share: journal widths, fonts, colours, caption with the short stamp, and the
 * SVG text. One user unit is one point (1/72 inch), so type keeps its size in print.
 *
 * @module
 */

/** Widths of a journal's single and double column, in millimetres (common practice, no source). */
export const COLUMN_WIDTHS = { single: 86, double: 178 } as const;

/** Colour of text, axes and rules. */
export const INK = "#222222";
/** Colour of secondary rules and marks. */
export const QUIET = "#6b6b6b";
/** Colour of grid lines and of bands behind marks. */
export const FAINT = "#e6e6e6";
/** Font stack: sans-serif faces that hold Greek letters, minus and infinity signs. */
export const FONT = "Arial, Helvetica, 'Liberation Sans', 'DejaVu Sans', sans-serif";
/** Font size of axis labels and captions, in points. */
export const FONT_SIZE = 7;
/** Font size of tick labels, in points. */
export const TICK_SIZE = 6.5;
/** Upper estimate of the mean width of a character, in units of the font size. */
export const CHARACTER_WIDTH = 0.58;

/** Number of hexadecimal digits of a short stamp. */
export const SHORT_STAMP = 12;

/** A drawn part of a figure. */
export interface Part {
  /** Distance from the left edge, in points. */
  readonly x: number;
  /** Distance from the top edge, in points. */
  readonly y: number;
  /** SVG elements, drawn from (0, 0). */
  readonly svg: string;
}

/** What {@linkcode figureSvg} puts together. */
export interface FigureOptions {
  /** Title for readers' software; not drawn. */
  readonly title: string;
  /** Width in millimetres, one of {@linkcode COLUMN_WIDTHS}. */
  readonly widthMm: number;
  /** Height of the parts, in points, without the caption. */
  readonly height: number;
  /** Drawn parts. */
  readonly parts: readonly Part[];
  /** Caption, may use `^{...}` and `_{...}`. */
  readonly caption: string;
  /** Hexadecimal stamp or digest of what is shown; its first digits end the caption. */
  readonly stamp: string;
  /** What the stamp is called in the caption. @default "Stamp" */
  readonly stampName?: string;
}

/** Millimetres in points. */
export function points(millimetres: number): number {
  return millimetres * 72 / 25.4;
}

/**
 * Puts parts and caption together to a stand-alone SVG text. The same input gives the same bytes.
 *
 * @param options Title, width, parts, caption, stamp.
 * @returns SVG with `xmlns`, a `title`, a `desc` and no identifiers.
 */
export function figureSvg(options: FigureOptions): string {
  const width = points(options.widthMm);
  const caption = `${options.caption} ${options.stampName ?? "Stamp"} ${
    options.stamp.slice(0, SHORT_STAMP)
  }`;
  const lines = wrap(caption, (width - 8) / (FONT_SIZE * CHARACTER_WIDTH * 0.93));
  const leading = 1.35 * FONT_SIZE;
  const height = options.height + 6 + leading * lines.length + 3;
  const text = lines.map((line, i) =>
    `<text x="4" y="${options.height + 4 + leading * (i + 1)}">${escapeXml(line)}</text>`
  );
  const parts = options.parts.map((part) =>
    `<g transform="translate(${part.x},${part.y})">${part.svg}</g>`
  );
  const body = [
    `<title>${escapeXml(plain(options.title))}</title>`,
    `<desc>${escapeXml(plain(caption))}</desc>`,
    `<rect width="${width}" height="${height}" fill="white"/>`,
    ...parts,
    `<g text-anchor="start" aria-label="caption">${text.join("\n")}</g>`,
  ].join("\n");
  const size = `width="${options.widthMm}mm" height="${height * 25.4 / 72}mm"`;
  const box = `viewBox="0 0 ${width} ${height}"`;
  const font = `font-family="${FONT}" font-size="${FONT_SIZE}" fill="${INK}"`;
  const open = `<svg xmlns="http://www.w3.org/2000/svg" ${size} ${box} ${font}>`;
  return `${rounded(raised(`${open}\n${body}\n</svg>`))}\n`;
}

/** Escapes text for an XML element. */
export function escapeXml(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;");
}

/** Text without the marks for raised and lowered parts. */
export function plain(text: string): string {
  return text.replace(/([\^_])\{([^}]*)\}/g, (_, mark, part) => mark === "^" ? `^${part}` : part);
}

/** Estimated width of a text, in points. */
export function textWidth(text: string, size: number): number {
  return text.replace(/[\^_]\{([^}]*)\}/g, "$1").length * size * CHARACTER_WIDTH;
}

function wrap(text: string, columns: number): string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (plain(longer).length > columns && line !== "") {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  return [...lines, line];
}

/** Turns `^{...}` and `_{...}` in text elements into shifted, smaller spans. */
function raised(svg: string): string {
  return svg.replace(
    />([^<>]*[\^_]\{[^<>]*)</g,
    (_, text: string) => `>${text.replace(/([\^_])\{([^}]*)\}([^^_]?)/g, span)}<`,
  );
  function span(_: string, mark: string, part: string, next: string): string {
    const shift = mark === "^" ? -0.4 : 0.25; // of the font size
    const small = `<tspan dy="${shift}em" font-size="72%">${part}</tspan>`;
    // The shift is undone in ems of the full size: 0.72 of the small span's.
    // a plain space at the edge of a part is dropped by some readers of SVG
    return next === ""
      ? small
      : `${small}<tspan dy="${-shift * 0.72}em">${next.replace(/^ /, "\u00a0")}</tspan>`;
  }
}

/** Rounds the coordinates to 1/100 point: the last bits of a logarithm may not change the bytes. */
function rounded(svg: string): string {
  return svg.replace(
    / (?:d|transform|x|y|x1|x2|y1|y2|width|height|viewBox|r)="[^"]*"/g,
    (attribute) =>
      attribute.replace(/-?\d+\.\d+(?:e[+-]?\d+)?/g, (n) => {
        const value = Number(Number(n).toFixed(2));
        return String(value === 0 ? 0 : value);
      }),
  );
}
