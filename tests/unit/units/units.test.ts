import { describe, expect, test } from "vitest";
import { conversionTo, unitChoices } from "#shared/units/units.ts";

const convert = (value: number, canonical: string, spelling: string): number => {
  const { factor, offset } = conversionTo(canonical, spelling) ?? { factor: Number.NaN, offset: 0 };
  return value * factor + offset;
};

describe("units", () => {
  test.each([
    [1, "deg", "DEGREE", 1],
    [1, "deg", "hourangle", 15],
    [Math.PI, "deg", "rad", 180],
    [1, "mas", "arcsec", 1000],
    [1000, "mas", "µas", 1],
    [1000, "mas", "μas", 1],
    [1, "mas", "[mas]", 1],
    [1, "mas.yr-1", "mas/yr", 1],
    [1, "mas.yr-1", "mas yr**-1", 1],
    [1, "mas.yr-1", "arcsec / yr", 1000],
    [5, "dex(cm.s-2)", "log(cm.s**-2)", 5],
    [3, "dex(cm.s-2)", "dex(m.s-2)", 5],
    [0.5, "dex", "[-]", 0.5],
    [3.5, "K", "kK", 3500],
    [2451545, "yr", "JD", 2000],
    [57388.5, "yr", "MJD", 2016],
    [80, "", "%", 0.8],
  ])("%d in %s from %s is %d", (value, canonical, spelling, expected) =>
    expect(convert(value, canonical, spelling)).toBeCloseTo(expected, 9),
  );

  test("a spelling that measures something else, or nothing known, is not guessed at", () => {
    expect(conversionTo("mas", "K")).toBeUndefined();
    expect(conversionTo("mas", "furlong")).toBeUndefined();
    expect(conversionTo("mas", "")).toBeUndefined();
    expect(conversionTo("mag", "mag(AB)")).toBeUndefined();
  });

  test("every choice that forms offer is one that is understood", () => {
    for (const canonical of ["deg", "mas", "mas.yr-1", "K", "mag", "dex(cm.s-2)", "dex", "yr", ""])
      for (const choice of unitChoices(canonical))
        expect(conversionTo(canonical, choice), choice).toBeDefined();
  });
});
