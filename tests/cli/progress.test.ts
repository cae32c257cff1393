import { describe, expect, it } from "vitest";
import type { Counts } from "../../lib/batch/progress.ts";
import { progressDisplay } from "../../lib/cli/progress.ts";
import { progressLines } from "../../lib/cli/progress_lines.ts";

const counts = (done: number, total: number, more: Partial<Counts> = {}): Counts => ({
  done,
  total,
  kept: 7,
  kinds: {},
  unfinished: 0,
  ...more,
});

/** An output whose clock the test moves. */
function recorder(columns?: number) {
  const texts: string[] = [];
  const clock = { now: 0 };
  return {
    texts,
    clock,
    output: {
      ...(columns === undefined ? {} : { columns }),
      write: (text: string) => void texts.push(text),
      now: () => clock.now,
    },
  };
}

describe("Progress on standard error", () => {
  it("tells rows, rate, time left, kinds and failures, at each tenth where there is no terminal", () => {
    const { texts, clock, output } = recorder(), display = progressDisplay(output);
    display(counts(0, 200));
    clock.now = 10_000; // 25 rows in 10 s: 2.5 a second, 175 rows left: 70 s
    display(counts(25, 200, { kinds: { throat: 20, refused: 4 }, unfinished: 1 }));
    display(counts(26, 200));
    expect(texts).toEqual([
      "25 of 200 rows, 2.5 rows/s, 1 min 10 s left: 20 throat, 4 refused, 1 interrupted\n",
    ]);
    clock.now = 80_000;
    display(counts(200, 200));
    expect(texts[1]).toBe("200 of 200 rows, 2.5 rows/s\n");
  });

  it("draws over one line of a terminal, not wider than it, and not too often", () => {
    const { texts, clock, output } = recorder(60), display = progressDisplay(output);
    for (clock.now = 0; clock.now <= 1000; clock.now += 10) {
      display(counts(clock.now, 2000, { kinds: { throat: clock.now, horizon: 12345 } }));
    }
    expect(texts).toHaveLength(11);
    for (const text of texts) {
      // deno-lint-ignore no-control-regex
      expect(text).toMatch(/^\r[^\r\n]{1,59}\x1b\[K$/);
    }
    display(counts(2000, 2000));
    expect(texts.at(-1)).toMatch(/\n$/);
  });

  it("says nothing where there is nothing to do", () => {
    const { texts, output } = recorder();
    progressDisplay(output)(counts(0, 0));
    expect(texts).toEqual([]);
  });
});

describe("Progress lines", () => {
  it("are JSON objects: the first row, the last, between them two a second, and the end", () => {
    const { texts, clock, output } = recorder(), lines = progressLines(output);
    for (let done = 0; done <= 100; done++) {
      clock.now = 100 * done;
      lines.rows(counts(done, 100, { kinds: { throat: done } }));
    }
    lines.end("done");
    const events = texts.map((text) => {
      expect(text).toMatch(/^[^\n]*\n$/);
      return JSON.parse(text);
    });
    expect(events).toHaveLength(22);
    expect(events[0]).toEqual({ event: "rows", ...counts(0, 100, { kinds: { throat: 0 } }) });
    expect(events[10]).toEqual({
      event: "rows",
      ...counts(50, 100, { kinds: { throat: 50 } }),
      rate: 10,
      left: 5,
    });
    expect(events[21]).toEqual({ event: "end", status: "done" });
  });
});
