import { describe, expect, test } from "vitest";
import { LIMITS } from "#shared/limits.ts";
import { binned } from "#src/features/receiving/bins.ts";
import { figureText, readingOf, shareOf, yearOf } from "#src/features/receiving/extract-words.ts";
import { pastedRefusal, pastedRows } from "#src/features/receiving/pasted.ts";
import { differencesFrom, planFor, suggestedPlan } from "#src/features/receiving/plan-answers.ts";
import { skyWords } from "#src/features/receiving/position-map.tsx";
import { histogramWords } from "#src/features/receiving/value-histogram.tsx";
import { column, preview } from "./fixtures.ts";

describe("pasted rows", () => {
  test("are counted below the names, blank lines aside", () => {
    expect(pastedRows("name\tra\r\nA\t1\r\n\r\nB\t2\r\n")).toBe(2);
    expect(pastedRefusal("name\tra\nA\t1")).toBeUndefined();
  });

  test.each([
    ["", "Paste the rows first"],
    ["name,ra\n\n", "There is one line"],
    [`name\n${"A\n".repeat(LIMITS.pastedRows + 1)}`, "may be pasted"],
  ])("are refused with words when %j", (text, words) => {
    expect(pastedRefusal(text)).toContain(words);
  });
});

describe("bars", () => {
  test("hold every finite value once, the greatest too", () => {
    const bins = binned([0, 1, 2, 3, 4, Number.NaN], 4);
    expect(bins).toEqual({ low: 0, high: 4, counts: [1, 1, 1, 2] });
  });

  test("are one for one value, none for none", () => {
    expect(binned([7, 7], 10)).toEqual({ low: 7, high: 7, counts: [2] });
    expect(binned([Number.NaN], 10)).toBeNull();
  });

  test("are told in words", () => {
    expect(histogramWords({ low: 0, high: 4, counts: [1, 1, 1, 2] }, "mag")).toBe(
      "5 values from 0 to 4 mag; the highest bar is between 3 and 4.",
    );
  });
});

test("a figure keeps six digits and a true minus", () => {
  expect([-999, 0.0031, 23.9962341, 3.5e9, 0].map(figureText)).toEqual([
    "\u2212999",
    "0.0031",
    "23.9962",
    "3.50e+9",
    "0",
  ]);
});

test("a year takes a comma and nothing that is no year", () => {
  expect(["2016,5", "1991.25", "J2000", "", "3000"].map(yearOf)).toEqual([
    2016.5,
    1991.25,
    undefined,
    undefined,
    undefined,
  ]);
});

test("a share is whole only when all is there", () => {
  expect(shareOf({ receivedBytes: 999, bytes: 1000 })).toBe("99 %");
  expect(shareOf({ receivedBytes: 0, bytes: 0 })).toBe("0 %");
});

test("what is read is named for each format as far as it is anyone's choice", () => {
  const plan = suggestedPlan(preview);
  expect(readingOf(plan)).toBe("Delimited text, semicolon, decimal comma, UTF-8");
  expect(readingOf({ ...plan, format: "described" })).toBe("Byte-by-byte table, UTF-8");
  expect(readingOf({ ...plan, format: "fits" })).toBe("FITS table");
});

test("a map is told in words: how many, from where to where", () => {
  const strip = [0, 5, 14].map((ra) => [ra, -80 + ra] as const);
  expect(skyWords(strip)).toBe(
    "3 sampled positions drawn, declination \u221280.0° to \u221266.0°, in 1 of 24 hours of right ascension.",
  );
  expect(skyWords(Array.from({ length: 24 }, (_, h) => [h * 15, h] as const))).toContain("all around");
});

describe("a plan made for another file", () => {
  const named = {
    ...suggestedPlan(preview),
    epoch: 2016,
    columns: [
      { ...column(0, "gone", "teff"), samples: undefined },
      { index: 1, header: "RA", means: "ra", unit: "h", blankMarks: ["-9"] },
    ],
  };

  test("knows its columns again by their headers and leaves the others as suggested", () => {
    const plan = planFor(preview, named);
    expect(plan.epoch).toBe(2016);
    expect(plan.columns.map((c) => [c.index, c.header, c.unit])).toEqual([
      [0, "RA", "h"],
      [1, "e_Ks", "mag"],
      [2, "note", ""],
    ]);
  });

  test("says what differs", () => {
    expect(differencesFrom(preview, named)).toEqual([
      "“e_Ks” is new in this file.",
      "“note” is new in this file.",
      "“gone” is not in this file.",
    ]);
  });
});
