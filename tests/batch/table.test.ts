import { describe, expect, it } from "vitest";
import { TableError } from "../../lib/batch/fault.ts";
import { readTable } from "../../lib/batch/table.ts";

const read = (text: string) => readTable(new TextEncoder().encode(text));

function faults(text: string): readonly string[] {
  try {
    read(text);
  } catch (error) {
    if (error instanceof TableError) return error.message.split("\n").slice(1);
    throw error;
  }
  return [];
}

// Each line breaks one rule; the expected text names line, column, and what would be right.
const HEADER =
  "case,model,state,kappa,n_scalars,mass,mass_above_critical,horizon_dilaton,bath_ratio,bath_ratio_minus_one,lambda,a,wall_radius,tolerance";
const RULES: readonly (readonly [row: string, expected: RegExp])[] = [
  ["-bad,rst,boulware,1,,1,,,,,,,,", /column case: must be at most 64 ASCII letters, digits/],
  [
    "m,rts,boulware,1,,1,,,,,,,,",
    /column model: must be one of .* \(nearest: rst\): current value is "rts"/,
  ],
  ["s,rst,boulwere,1,,1,,,,,,,,", /column state: must be one of .* \(nearest: boulware\)/],
  [
    "n,rst,boulware,one,,1,,,,,,,,",
    /column kappa: must be a decimal number .*current value is "one"/,
  ],
  [
    "n,rst,boulware,NaN,,1,,,,,,,,",
    /column kappa: must be a finite number: current value is "NaN"/,
  ],
  ["n,rst,boulware,Infinity,,1,,,,,,,,", /column kappa: must be a finite number/],
  ["n,rst,boulware,1e999,,1,,,,,,,,", /column kappa: must be/],
  ["n,rst,boulware,0,,1,,,,,,,,", /column kappa: must be > 0: current value is "0"/],
  ["n,rst,boulware,1,,1,,,,,-1,,,", /column lambda: must be > 0/],
  ["n,rst,thermal,1,,1,,,-0.1,,,,,", /column bath_ratio: must be >= 0/],
  ["n,rst,boulware,1,12,1,,,,,,,,", /exactly one of kappa, n_scalars .*current count is 2/],
  ["n,rst,boulware,,,1,,,,,,,,", /exactly one of kappa, n_scalars .*current count is 0/],
  ["n,rst,boulware,1,,1,1,,,,,,,", /exactly one of mass, mass_above_critical .*current count is 2/],
  [
    "n,rst,thermal,1,,1,,,,,,,,",
    /exactly one of bath_ratio, bath_ratio_minus_one .*current count is 0/,
  ],
  [
    "n,rst,thermal,1,,1,,,1,0,,,,",
    /exactly one of bath_ratio, bath_ratio_minus_one .*current count is 2/,
  ],
  [
    "n,rst,boulware,1,,,,-1,,,,,,",
    /column horizon_dilaton: must be empty as state boulware has no horizon_dilaton/,
  ],
  ["n,swave,boulware,1,,1,,,,,1,,,", /column lambda: must be empty as model swave has no lambda/],
  ["n,rst,boulware,1,,1,,,,,,0.5,,", /column a: must be empty as model rst has no a/],
  ["n,solvable,boulware,1,,1,,,,,,,,", /column a: must be given for model solvable/],
  ["n,solvable,boulware,1,,1,,,,,,3,,", /column a: must be in \[0, 2\]/],
  ["n,swave,thermal,1,,1,,,1,,,,,", /column wall_radius: must be given/],
  [
    "n,swave,thermal,1,,10,,,1,,,,15,",
    /column wall_radius: must be > 2 \* mass = 20, outside the hole/,
  ],
  ["n,swave,thermal,1,,-1,,,1,,,,15,", /column mass: must be > 0 for model swave with a bath/],
  ["n,swave,boulware,1,,1,,,,,,,15,", /column wall_radius: must be empty as state boulware/],
  ["n,rst,boulware,1,,1,,,0,,,,,", /column bath_ratio: must be empty as state boulware/],
  ["n,rst,boulware,1,,1,,,,,,,,-1", /column tolerance: must be > 0/],
  ["n,cghs,boulware,1,,,1,,,,,,,", /column mass_above_critical: must be empty as model cghs/],
];

describe("A parameter table with a fault", () => {
  for (const [row, expected] of RULES) {
    it(`says what would be right: ${row}`, () => {
      const [first] = faults(`${HEADER}\n${row}\n`);
      expect(first).toMatch(expected);
      expect(first).toMatch(/^line 2, /);
    });
  }

  it("reports all faults at once, each with its line", () => {
    const text = [
      HEADER,
      ...RULES.map(([row], i) => row.replace(/^[^,]*/, (n) => n === "-bad" ? n : `c${i}`)),
    ].join("\n");
    const all = faults(text);
    RULES.forEach(([, expected], i) => {
      expect(
        all.some((line) => line.startsWith(`line ${i + 2}, `) && expected.test(line)),
        String(expected),
      ).toBe(true);
    });
  });

  it("names unknown, missing and repeated columns and repeated cases", () => {
    expect(faults("case,model,state,kappa,mass,colour\n")[0]).toMatch(
      /line 1, column colour: must be one of .*unknown/,
    );
    expect(faults("case,model,kappa,mass\nx,rst,1,1\n").join("\n")).toMatch(
      /line 1, column state: is missing in the header/,
    );
    expect(faults("case,case,model,state,kappa,mass\n").join("\n")).toMatch(/once only/);
    const twice = "case,model,state,kappa,mass\nx,rst,boulware,1,1\nX,rst,boulware,1,1\n";
    expect(faults(twice)[0]).toMatch(
      /line 3, column case: must be unique, ignoring case, and line 2 has it/,
    );
  });

  it("with a quotation mark astray in the header has that fault and no other", () => {
    expect(faults('case,mo"del,state,kappa,mass\nx,rst,boulware,1,1\n')).toEqual([
      "line 1: a quotation mark must begin a field and be doubled inside it",
    ]);
  });

  it("gives line breaks inside quoted cells their lines", () => {
    const text = 'case,model,state,kappa,mass\n"a\nb",rst,boulware,1,1\nx,rst,boulware,0,1\n';
    expect(faults(text).join("\n")).toMatch(/line 4, column kappa/);
  });
});

describe("A parameter table", () => {
  const rows = "case,model,state,kappa,mass\na,rst,boulware,1,2\nb,cghs,boulware,3,4\n";
  it("may have CRLF, a byte-order mark, quoted cells and a blank last line", () => {
    const plain = read(rows).map(({ input }) => input);
    for (
      const text of [
        rows.replaceAll("\n", "\r\n"),
        `\ufeff${rows}`,
        `${rows}\n`,
        rows.replace("1,2", '"1","2"'),
      ]
    ) {
      expect(read(text).map(({ input }) => input)).toEqual(plain);
    }
  });

  it("fills in lambda = 1 and the tolerance 1e-10, kappa from n_scalars, and keeps the bath as difference from one", () => {
    const [row] = read("case,model,state,n_scalars,mass,bath_ratio\nx,rst,thermal,24,5,0.75\n");
    expect(row!.input).toEqual({
      model: "rst",
      state: "thermal",
      kappa: 2,
      lambda: 1,
      mass: 5,
      bathRatioMinusOne: -0.25,
      tolerance: 1e-10,
    });
    expect(row!.bathRatio).toBe(0.75);
    const [exact] = read(
      "case,model,state,kappa,mass,bath_ratio_minus_one\nx,rst,thermal,2,5,-1e-12\n",
    );
    expect(exact!.input.bathRatioMinusOne).toBe(-1e-12);
  });

  it("may hold any finite mass", () => {
    for (const mass of ["0", "-1e300", "5e-324", "1e60"]) {
      expect(faults(`case,model,state,kappa,mass\nx,rst,boulware,1,${mass}\n`)).toEqual([]);
    }
  });
});
