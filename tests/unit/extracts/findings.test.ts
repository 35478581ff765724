import { describe, expect, test } from "vitest";
import { FINDING_CODES, type FindingCode } from "#server/extracts/findings/finding.ts";
import { type Knowledge, NOTHING_KNOWN } from "#server/extracts/findings/look.ts";
import { planFindings } from "#server/extracts/findings.ts";
import { namedColumn, type Sample, sampleOf } from "#server/extracts/sample.ts";
import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { acceptedKey, answered } from "#shared/catalogue/answers.ts";
import { lines, sharedValues, suggestedFor, tableOf } from "./cases.ts";

interface Case {
  readonly code: FindingCode;
  readonly level: Finding["level"];
  readonly sample: Sample;
  readonly plan?: (plan: ReadingPlan) => ReadingPlan;
  readonly knowledge?: Knowledge;
  /** How many rows, columns or texts it is about. */
  readonly count?: number;
  readonly says?: RegExp;
}

const PLACED = "source_id\tra\tdec\tepoch";
const placed = (i: number): (string | number)[] => [1000 + i, 100.5 + i, 20 - i / 10, 2016];
/** A table of placed stars with further columns. */
const stars = (columns: string, count: number, of: (i: number) => readonly (string | number)[]): Sample =>
  tableOf(
    `${PLACED}\t${columns}`,
    lines(count, (i) => [...placed(i), ...of(i)]),
  );
const plain = tableOf(PLACED, lines(5, placed));

const withCard =
  (header: string, change: object) =>
  (plan: ReadingPlan): ReadingPlan => ({
    ...plan,
    columns: plan.columns.map((card) => (card.header === header ? { ...card, ...change } : card)),
  });

const motions = (dec: number, scale: number): Sample =>
  tableOf(
    "source_id\tra\tdec\tepoch\tpmra|mas/yr\tpmdec|mas/yr",
    lines(8, (i) => [i, 10 * i, dec + i / 10, 2016, (500 + 10 * i) * scale, 20 + i]),
  );
const eight = (of: (i: number) => number): number[] => Array.from({ length: 8 }, (_, i) => of(i));
const cosine = (i: number): number => Math.cos(((72 + i / 10) * Math.PI) / 180);

const CASES: readonly Case[] = [
  { code: "empty-file", level: "stop", sample: sampleOf([], [], { isEmpty: true }) },
  { code: "unread-encoding", level: "stop", sample: sampleOf([], [], { isBigEndian: true }) },
  { code: "not-a-table", level: "stop", sample: sampleOf([], [], { instead: "a PDF document" }) },
  {
    code: "file-cut-off",
    level: "stop",
    sample: tableOf(PLACED, lines(3, placed), { cutLine: { cells: ["1"], line: 9, text: "1" } }),
    says: /1 of 4 values/,
  },
  { code: "no-header", level: "stop", sample: tableOf("1\t2.5", ["3\t4"]) },
  { code: "header-only", level: "stop", sample: tableOf(PLACED, []) },
  {
    code: "uneven-rows",
    level: "note",
    sample: tableOf(PLACED, lines(3, placed), { uneven: [{ cells: ["1"], line: 7, text: "1" }] }),
    count: 1,
  },
  {
    code: "encoding-guessed",
    level: "ask",
    sample: tableOf(`${PLACED}\tname`, [`${placed(0).join("\t")}\tÉtoile`], { isEncodingGuessed: true }),
    count: 1,
  },
  {
    code: "stray-bytes",
    level: "ask",
    sample: stars("name", 5, (i) => [i < 2 ? "\ufffdtoile" : "A"]),
    count: 2,
  },
  {
    code: "headers-renamed",
    level: "note",
    sample: tableOf(PLACED, lines(3, placed), { renamed: [{ from: "ra", to: "ra (2)" }] }),
    count: 1,
  },
  { code: "header-case", level: "note", sample: stars("Plx\tPLX", 3, () => [5, 5]), says: /“Plx” and “PLX”/ },
  { code: "header-long", level: "note", sample: stars("x".repeat(201), 3, () => [5]), count: 1 },
  {
    code: "delimiter-doubt",
    level: "ask",
    sample: tableOf(
      "source_id;x\tra;y\tdec;z\tepoch;w",
      lines(5, (i) => [`${i};1`, `${i};2`, `${i};3`, "2016;4"]),
    ),
  },
  {
    code: "decimal-mark",
    level: "ask",
    sample: tableOf(
      `${PLACED}\tTeff`,
      lines(5, (i) => [i, 100, 20, 2016, `${i + 3},500`]),
      { decimalMark: "," },
    ),
    says: /3,500 can be read in two ways: as 3.5, or as 3500/,
  },
  {
    code: "round-number",
    level: "ask",
    sample: tableOf(PLACED, lines(3, placed), { declaredRows: 100_000 }),
    count: 100_000,
    says: /exactly 100,000 rows/,
  },
  {
    code: "unknown-meaning",
    level: "stop",
    sample: plain,
    plan: withCard("epoch", { means: "shape" }),
  },
  {
    code: "meaning-twice",
    level: "stop",
    sample: stars("x", 3, () => [5]),
    plan: withCard("x", { means: "ra" }),
  },
  { code: "half-a-position", level: "stop", sample: plain, plan: withCard("dec", { means: "kept" }) },
  { code: "nothing-usable", level: "stop", sample: tableOf("colour\tshape", ["red\tround"]) },
  {
    code: "meaning-doubtful",
    level: "ask",
    sample: stars("parallax|K|phys.temperature.effective", 3, () => [5000]),
    says: /spelled like Parallax/,
  },
  {
    code: "damaged-identifiers",
    level: "stop",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [`3141592653589${i}0000`, 100, 20, 2016]),
    ),
    count: 4,
    says: /100 % of them/,
  },
  {
    code: "ra-unit",
    level: "ask",
    sample: tableOf(
      PLACED,
      lines(60, (i) => [i, i / 2.6, 80 - 2.5 * i, 2016]),
    ),
    says: /one strip/,
  },
  {
    code: "frame-missing",
    level: "ask",
    sample: plain,
    plan: (plan) => ({ ...plan, frame: null }),
  },
  {
    code: "frame-unread",
    level: "stop",
    sample: sampleOf(
      ["ra", "dec", "epoch"].map((name) => ({
        ...namedColumn(name),
        frame: name === "ra" ? { system: "eq_FK4", equinox: "B1950", epoch: null } : null,
      })),
      [{ cells: ["100", "20", "1950"], line: 2, text: "" }],
    ),
  },
  {
    code: "j2000-doubt",
    level: "ask",
    sample: tableOf(
      "ID\tRAJ2000|deg\tDEJ2000|deg",
      lines(3, (i) => [i, 100, 20]),
    ),
  },
  {
    code: "epoch-missing",
    level: "ask",
    sample: tableOf(
      "ID\tra\tdec\tpmra\tpmdec",
      lines(3, (i) => [i, 100, 20, 1250, 3]),
    ),
    says: /misplaced by 20″ in 16 years/,
  },
  {
    code: "cos-dec",
    level: "ask",
    sample: stars("pmRA|mas/yr\tpmDE|mas/yr", 3, () => [50, 5]),
    says: /5\.0″/,
  },
  {
    code: "cos-dec-doubt",
    level: "ask",
    sample: motions(72, 1),
    knowledge: sharedValues({ pmra: eight((i) => (500 + 10 * i) * cosine(i)) }),
    count: 8,
  },
  {
    code: "motions-swapped",
    level: "ask",
    sample: motions(10, 1),
    knowledge: sharedValues({ pmra: eight((i) => 20 + i), pmdec: eight((i) => 500 + 10 * i) }),
    count: 8,
  },
  { code: "magnitude-system", level: "ask", sample: stars("Jmag\tKsmag", 3, () => [9, 8]), count: 2 },
  {
    code: "magnitude-system-mixed",
    level: "ask",
    sample: stars("ks_m", 8, (i) => [9.85 + i / 10]),
    knowledge: sharedValues({ ks_mag: eight((i) => 8 + i / 10) }),
    says: /differ by 1\.85 mag/,
  },
  { code: "unit-unknown", level: "ask", sample: stars("plx|furlong", 3, () => [5]), says: /“furlong”/ },
  { code: "unit-doubt", level: "ask", sample: stars("plx", 30, (i) => [0.1 + i / 100]), count: 30 },
  {
    code: "unit-unknown-unused",
    level: "note",
    sample: stars("colour|furlong", 3, () => [5]),
    count: 1,
  },
  {
    code: "unit-slip",
    level: "ask",
    sample: stars("plx|mas", 8, (i) => [0.06 + i / 1000]),
    knowledge: sharedValues({ parallax: eight((i) => 60 + i) }),
    says: /1000 × smaller than in the other extracts for 100 % of 8 shared stars/,
  },
  {
    code: "values-shifted",
    level: "ask",
    sample: stars("plx|mas", 8, (i) => [0.05 + i / 1000]),
    knowledge: { shared: null, earlier: { name: "South", profile: { plx: 60 } } },
    says: /header is that of “South”.*1000 × smaller/,
  },
  {
    code: "blank-mark",
    level: "ask",
    sample: stars("plx|mas", 12, (i) => [i % 3 === 0 ? -999 : 20 + i]),
    count: 4,
    says: /-999 stands 4 times in “plx”.*from 21 to 31/,
  },
  {
    code: "marked-numbers",
    level: "note",
    sample: stars("plx|mas", 5, (i) => [["<0.5", "~7", "1.2±0.1", "12.3a", "8"][i] ?? ""]),
    count: 4,
  },
  {
    code: "thousands-marks",
    level: "note",
    sample: stars("Teff", 5, (i) => [["3,500.5", "5 200.1", "4'100", "4000", "5000"][i] ?? ""]),
    count: 3,
  },
  {
    code: "unread-numbers",
    level: "note",
    sample: stars("plx|mas", 4, (i) => [i === 0 ? "saturated" : 8]),
    count: 1,
  },
  {
    code: "no-numbers",
    level: "stop",
    sample: stars("x", 3, () => ["round"]),
    plan: withCard("x", { means: "parallax", unit: "mas" }),
    count: 3,
  },
  { code: "unicode-minus", level: "note", sample: stars("pmdec", 4, (i) => [`\u2212${i + 5}.5`]), count: 4 },
  {
    code: "minus-zero",
    level: "note",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [i, "12:00:00", i < 2 ? "-00 12 14.966" : "05 12 14.9", 2016]),
    ),
    count: 2,
  },
  {
    code: "seconds-carried",
    level: "note",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [i, i < 1 ? "11:59:60.00" : "12:00:01", "05 12 14.9", 2016]),
    ),
    count: 1,
  },
  {
    code: "mixed-marks",
    level: "note",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [i, "00:42:44.3s", "05 12 14.9", 2016]),
    ),
    count: 4,
  },
  {
    code: "ra-out-of-range",
    level: "note",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [i, i === 0 ? 361 : 30, 5, 2016]),
    ),
    count: 1,
  },
  {
    code: "dec-beyond-pole",
    level: "note",
    sample: tableOf(
      PLACED,
      lines(4, (i) => [i, 30, i === 0 ? 91 : 5, 2016]),
    ),
    count: 1,
  },
  {
    code: "out-of-range",
    level: "ask",
    sample: stars("Teff", 10, (i) => [i < 5 ? 100_000 + i : 5000 + 10 * i]),
    count: 5,
  },
  {
    code: "error-zero",
    level: "note",
    sample: stars("plx|mas\te_plx|mas", 4, (i) => [20 + i, i === 0 ? 0 : 0.1]),
    count: 1,
  },
  {
    code: "error-negative",
    level: "note",
    sample: stars("plx|mas\te_plx|mas", 4, (i) => [20 + i, i === 0 ? -1 : 0.1]),
    count: 1,
  },
  { code: "parallax-not-positive", level: "note", sample: stars("plx|mas", 6, (i) => [i - 1.5]), count: 2 },
  {
    code: "parallax-blank",
    level: "note",
    sample: stars("plx|mas", 6, (i) => [i < 2 ? "" : 20 + i]),
    count: 2,
  },
  { code: "formula-text", level: "note", sample: stars("name", 3, () => ['=HYPERLINK("x")']), count: 3 },
];

const planFor = async ({ sample, plan }: Case): Promise<ReadingPlan> => {
  const suggested = await suggestedFor(sample);
  return plan ? plan(suggested) : suggested;
};

const TYPED = ["epoch-missing", "unit-unknown"];

describe.each(CASES.map((each) => [each.code, each] as const))("%s", (code, each) => {
  const found = async (plan: ReadingPlan): Promise<Finding[]> =>
    planFindings(each.sample, plan, each.knowledge ?? NOTHING_KNOWN);

  test("is found once, with its count, and says what, why and what to do", async () => {
    const all = (await found(await planFor(each))).filter((f) => f.code === code);
    expect(all).toHaveLength(1);
    const [only] = all;
    expect(only?.level).toBe(each.level);
    expect(only?.message).toMatch(/\w.*[.?]$/s);
    expect(only?.hint).toMatch(/\w.*\.$/s);
    expect(only?.examples.length).toBeLessThanOrEqual(3);
    if (each.count !== undefined) expect(only?.count).toBe(each.count);
    if (each.says) expect(only?.message).toMatch(each.says);
  });

  test("is settled by any of its answers", async () => {
    const plan = await planFor(each);
    const finding = (await found(plan)).find((f) => f.code === code);
    if (finding?.level !== "ask") return expect(finding?.answers).toEqual([]);
    if (TYPED.includes(code)) expect(finding.answers).toEqual([]);
    else expect(finding.answers.length).toBeGreaterThan(0);
    const values = TYPED.includes(code)
      ? [code === "epoch-missing" ? "2016" : "mas"]
      : finding.answers.map((a) => a.value);
    for (const value of values) {
      const after = await found(answered(plan, finding, value));
      expect(after.map(acceptedKey), value).not.toContain(acceptedKey(finding));
    }
  });
});

test("every code that can be found is held to an action above", () =>
  expect([...new Set(CASES.map((each) => each.code))].toSorted()).toEqual([...FINDING_CODES].toSorted()));

test("a plain table of stars has nothing to say", async () =>
  expect(planFindings(plain, await suggestedFor(plain))).toEqual([]));

test("what a reader found keeps its words, and is settled when the file is taken as it is", async () => {
  const overflow = {
    key: "votable-overflow",
    level: "ask",
    message: "The service cut the answer.",
    hint: "Ask again.",
    count: 1,
    examples: [],
  } as const;
  const sample = tableOf(PLACED, lines(3, placed), { found: [overflow] });
  const plan = await suggestedFor(sample);
  const [finding] = planFindings(sample, plan);
  expect(finding).toMatchObject({
    code: "votable-overflow",
    message: "The service cut the answer.",
    answers: [{ value: "accept", label: "Keep as partial" }],
  });
  expect(finding && planFindings(sample, answered(plan, finding, "accept"))).toEqual([]);
});

test("the gravest comes first, and 800 hits are one finding", async () => {
  const sample = stars("plx|mas\tx", 800, () => [-3, "round"]);
  const plan = withCard("x", { means: "teff", unit: "K" })(await suggestedFor(sample));
  const found = planFindings(sample, plan);
  expect(found[0]?.level).toBe("stop");
  expect(found.filter((f) => f.code === "parallax-not-positive").map((f) => f.count)).toEqual([800]);
});
