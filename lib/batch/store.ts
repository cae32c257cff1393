/**
 * A folder of finished rows that runs share, by stamp: `ab/STAMP.row` is the row, `ab/STAMP.csv` its
 * profile. Nothing in it is believed: every entry is checked when it is read.
 *
 * @module
 */
import { type Answer, readAnswer } from "./answer.ts";
import { readIfPresent } from "./folder.ts";
import { frame, type Framed, unframe } from "./framed.ts";
import { sha256 } from "./stamp.ts";
import { onDisk, StorageError } from "./storage.ts";
import { writeWhole } from "./whole_file.ts";

/** An entry that was found whole. */
export interface Entry extends Answer {
  /** The answer as text. */
  readonly text: string;
  /** Text of the profile, if it was wanted and there is one. */
  readonly profileText?: string;
}

/** Two processes may write one entry at the same time. */
const ENDING = `.${Deno.pid}.tmp`;
const decoder = new TextDecoder("utf-8", { fatal: true });

/** A shared folder of finished rows. If its disk refuses, the run goes on without it. */
export class Store {
  readonly #folder: string;
  readonly #notice: (text: string) => void;
  #usable = true;

  /**
   * @param folder The folder; made with the first entry.
   * @param notice Called with what the user should know: entries rejected, a disk that refuses.
   */
  constructor(folder: string, notice: (text: string) => void) {
    this.#folder = folder;
    this.#notice = notice;
  }

  #path(stamp: string, ending: string): string {
    return `${this.#folder}/${stamp.slice(0, 2)}/${stamp}.${ending}`;
  }

  /**
   * Reports an entry that is not believed.
   *
   * @param stamp Its stamp.
   * @param what What is wrong with it.
   */
  reject(stamp: string, what: string): undefined {
    this.#notice(`Rejected from the store, to be solved again: ${stamp}: ${what}`);
    return undefined;
  }

  /** Does something on the store's disk; one that refuses is left alone from then on. */
  #try<T>(act: () => T): T | undefined {
    if (!this.#usable) return undefined;
    try {
      return onDisk(`use the store ${this.#folder}`, act);
    } catch (error) {
      if (!(error instanceof StorageError)) throw error;
      this.#usable = false;
      this.#notice(`The store is left alone from now on: ${error.message}`);
      return undefined;
    }
  }

  /** Whether there is an entry, damaged or not. */
  has(stamp: string): boolean {
    const path = this.#path(stamp, "row");
    return this.#try(() => {
      try {
        return Deno.statSync(path).isFile;
      } catch (error) {
        if (error instanceof Deno.errors.NotFound) return false;
        throw error;
      }
    }) ?? false;
  }

  /**
   * Finds a row.
   *
   * @param stamp Its stamp.
   * @param profile Whether its profile is wanted.
   * @returns The entry, or undefined if there is none, it is damaged, or it lacks the profile.
   */
  find(stamp: string, profile: boolean): Entry | undefined {
    const bytes = this.#try(() => readIfPresent(this.#path(stamp, "row")));
    if (bytes === undefined) return undefined;
    const record = bytes.at(-1) === 10 ? unframe(bytes.subarray(0, -1)) : undefined;
    if (record === undefined) return this.reject(stamp, "length or checksum is not right");
    if (record.stamp !== stamp) return this.reject(stamp, "it is of another stamp");
    const answer = this.#answer(record);
    if (answer === undefined) return this.reject(stamp, "it is no answer");
    const entry = { ...answer, text: record.text };
    if (!profile || answer.profile === null) return entry;
    if (answer.profile === undefined) return undefined;
    const profileBytes = this.#try(() => readIfPresent(this.#path(stamp, "csv")));
    if (profileBytes === undefined) return undefined;
    if (sha256(profileBytes) !== answer.profile) return this.reject(stamp, "its profile changed");
    return { ...entry, profileText: decoder.decode(profileBytes) };
  }

  #answer({ text }: Framed): Answer | undefined {
    try {
      const answer = readAnswer(text);
      return typeof answer.result.outcome === "string" ? answer : undefined;
    } catch {
      return undefined;
    }
  }

  /**
   * Adds a row, or puts it in the place of a damaged one.
   *
   * @param record Stamp and answer.
   * @param profileText Text of its profile, if it has one.
   */
  add(record: Framed, profileText?: string): void {
    const path = this.#path(record.stamp, "row"), options = { durable: false, ending: ENDING };
    this.#try(() => {
      Deno.mkdirSync(path.slice(0, path.lastIndexOf("/")), { recursive: true });
      if (profileText !== undefined) {
        writeWhole(this.#path(record.stamp, "csv"), profileText, options);
      }
      writeWhole(path, frame(record), options);
    });
  }
}
