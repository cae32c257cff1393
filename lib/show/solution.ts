/**
 * A solution as an object that shows itself: card, observables, figures.
 *
 * @module
 */
import { RESULT_COLUMNS } from "../batch/result_columns.ts";
import type { RowInput } from "../model/input.ts";
import {
  type Bounded,
  type InnerEnd,
  type Kind,
  NUMERIC_COLUMNS,
  type NumericColumn,
  type Profile,
  PROFILE_COLUMNS,
  type RowResult,
} from "../observe/result.ts";
import { boundedText } from "./bounded_text.ts";
import { escapeXml, SHORT_STAMP } from "./figure.ts";
import { DISPLAY, type Displayable, displayable, limited } from "./notebook/display.ts";
import type { MimeBundle } from "./notebook/document.ts";
import { profilePanels } from "./profile_panels.ts";
import type { ProfileRows } from "./result_rows.ts";
import { smallProfile } from "./small_profile.ts";
import { tableBundle } from "./table_bundle.ts";

/** One number of a solution. */
export interface Observable extends Bounded {
  /** Column of the results table. */
  readonly name: NumericColumn;
  /** Title for people. */
  readonly title: string;
  /** Unit with hbar = c = G = k_B = 1. */
  readonly unit: string;
}

/** A drawn figure. */
export interface Figure extends Displayable {
  /** Title. */
  readonly title: string;
  /** SVG text. */
  readonly svg: string;
}

/** What a solution is made of. */
export interface SolutionParts {
  /** Validated input. */
  readonly input: RowInput;
  /** Result of the row. */
  readonly result: RowResult;
  /** Stamp of the row. */
  readonly stamp: string;
  /** Profile, where there is one. */
  readonly profile?: Profile;
}

/** One solution; shows itself as a card in a notebook. */
export class Solution implements Displayable {
  /** Validated input with defaults. */
  readonly input: RowInput;
  /** solved, refused (the physics says no) or failed (the solver gave up). */
  readonly outcome: RowResult["outcome"];
  /** `code: prose`, empty for a plain solution. */
  readonly reason: string;
  /** Kind of solution; absent unless solved. */
  readonly kind: Kind | undefined;
  /** Numbers with absolute bounds by column of the results table; those that do not apply are absent. */
  readonly numbers: RowResult["numbers"];
  /** What ends the inner side, where it applies. */
  readonly innerEnd: InnerEnd | undefined;
  /** `inside` or codes joined by `;`; absent unless solved. */
  readonly validity: string | undefined;
  /** Provenance stamp: 64 hexadecimal digits, the same as in a results table. */
  readonly stamp: string;
  readonly #profile: Profile | undefined;

  /**
   * Puts a solution together.
   *
   * @param parts input, result, stamp, profile
   */
  constructor({ input, result, stamp, profile }: SolutionParts) {
    this.input = input;
    this.outcome = result.outcome;
    this.reason = result.reason;
    this.kind = result.kind;
    this.numbers = result.numbers;
    this.innerEnd = result.innerEnd;
    this.validity = result.validity;
    this.stamp = stamp;
    this.#profile = profile;
  }

  /**
   * The profile.
   *
   * @returns equally long columns from outside inwards, or undefined where there is no profile (refused,
   * failed)
   */
  profile(): Profile | undefined {
    return this.#profile;
  }

  /**
   * The numbers with titles and units, in the order of the results table.
   *
   * @returns a list that shows itself as a table
   */
  observables(): readonly Observable[] & Displayable {
    const list = NUMERIC_COLUMNS.flatMap((name): Observable[] => {
      const number = this.numbers[name];
      const column = RESULT_COLUMNS.find((c) => c.name === name);
      if (number === undefined || column === undefined) return [];
      return [{ name, title: column.title, unit: column.unit ?? "", ...number }];
    });
    const rows = list.map((o) => [o.title, boundedText(o), o.unit]);
    return Object.assign(list, displayable(tableBundle(["Quantity", "Value", "Unit"], rows)));
  }

  /**
   * The figures of this solution: its profile, or none.
   *
   * @returns a list that shows them all
   */
  figures(): readonly Figure[] & Displayable {
    const title = `${this.input.model}, ${this.input.state}`;
    const svg = this.#profile === undefined ? undefined : this.#figure(title, this.#profile);
    const list = svg === undefined
      ? []
      : [{ title, svg, ...displayable({ "image/svg+xml": svg, "text/plain": title }) }];
    const all = {
      "text/html": list.map((figure) => figure.svg).join("\n"),
      "text/plain": list.map((figure) => figure.title).join("\n") || "no figures",
    };
    return Object.assign(list, displayable(all));
  }

  /**
   * The card.
   *
   * @returns HTML and plain text
   */
  [DISPLAY](): MimeBundle {
    const { model, state } = this.input;
    const head = `${model}, ${state}: ${this.kind ?? this.outcome}`;
    const facts = [
      ...(this.reason === "" ? [] : [["Reason", this.reason]]),
      ...this.observables().map((o) => [o.title, boundedText(o)]),
      ...(this.innerEnd === undefined ? [] : [["Inner end", this.innerEnd]]),
      ...(this.validity === undefined ? [] : [["Validity", this.validity]]),
      ["Stamp", this.stamp.slice(0, SHORT_STAMP)],
    ];
    const small = this.#profile === undefined ? "" : smallProfile(this.#profile);
    const { "text/html": table, "text/plain": plain } = tableBundle([], facts);
    return limited({
      "text/html": `<div><strong>${escapeXml(head)}</strong>${table}${small}</div>`,
      "text/plain": `${head}\n${plain}`,
    });
  }

  #figure(name: string, profile: Profile): string {
    const { input } = this;
    const given = Object.entries({
      kappa: input.kappa,
      lambda: input.lambda,
      a: input.a,
      wall_radius: input.wallRadius,
    }).filter((entry): entry is [string, number] => entry[1] !== undefined);
    const found = Object.entries(this.numbers).map(([key, { value }]) => [key, value] as const);
    const row = {
      case: name,
      model: input.model,
      state: input.state,
      outcome: this.outcome,
      kind: this.kind ?? "",
      stamp: this.stamp,
      numbers: Object.fromEntries([...given, ...found]),
    };
    const columns = PROFILE_COLUMNS.map((column) => [column, [...profile[column]]]);
    return profilePanels(row, Object.fromEntries(columns) as ProfileRows);
  }
}
