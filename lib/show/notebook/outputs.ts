/**
 * Outputs of the cells of one notebook, built up from the kernel's messages as a notebook page does it.
 *
 * @module
 */
import type { MimeBundle, Output } from "./document.ts";
import type { Message } from "./message.ts";

/** Builds up the outputs of a notebook, cell after cell. */
export class OutputCollector {
  readonly #displays = new Map<string, Array<Output & { data: MimeBundle }>>();
  #outputs: Output[] = [];
  #clearOnNext = false;

  /**
   * Begins the next cell.
   *
   * @param outputs list that takes the outputs of that cell
   */
  begin(outputs: Output[]): void {
    this.#outputs = outputs;
    this.#clearOnNext = false;
  }

  /**
   * Applies one published message to the cell begun last: output, update of an earlier display (also one of
   * an earlier cell) or removal. Other messages change nothing.
   *
   * @param message published message
   */
  take(message: Message): void {
    const content = message.content as Record<string, never>;
    switch (message.type) {
      case "stream":
        return this.#stream(content.name, content.text);
      case "display_data":
      case "execute_result":
        return this.#display(message.type, content);
      case "update_display_data":
        return this.#update(content);
      case "error":
        return this.add({
          output_type: "error",
          ename: content.ename,
          evalue: content.evalue,
          traceback: content.traceback ?? [],
        });
      case "clear_output":
        this.#clearOnNext = content.wait === true;
        if (!this.#clearOnNext) this.#outputs.length = 0;
    }
  }

  /**
   * Adds an output to the cell begun last.
   *
   * @param output output
   */
  add(output: Output): void {
    if (this.#clearOnNext) this.#outputs.length = 0;
    this.#clearOnNext = false;
    this.#outputs.push(output);
  }

  /** Text of one stream that follows text of the same stream is one output. */
  #stream(name: string, text: string): void {
    const last = this.#outputs.at(-1);
    if (!this.#clearOnNext && last?.output_type === "stream" && last.name === name) {
      last.text += text;
    } else {
      this.add({ output_type: "stream", name, text });
    }
  }

  #display(type: "display_data" | "execute_result", content: Record<string, never>): void {
    const { data, metadata, transient, execution_count } = content;
    const shown: Output & { data: MimeBundle } = type === "display_data"
      ? { output_type: type, data, metadata: metadata ?? {} }
      : { output_type: type, data, metadata: metadata ?? {}, execution_count };
    this.add(shown);
    const id = (transient as { display_id?: string } | undefined)?.display_id;
    if (id !== undefined) this.#displays.set(id, [...(this.#displays.get(id) ?? []), shown]);
  }

  #update(content: Record<string, never>): void {
    const { data, metadata, transient } = content;
    const id = (transient as { display_id?: string } | undefined)?.display_id;
    for (const shown of this.#displays.get(id ?? "") ?? []) {
      Object.assign(shown, { data, metadata: metadata ?? {} });
    }
  }
}
