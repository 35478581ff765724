import { test } from "vitest";
import { moonElongation, moonIcrs, moonParallax } from "#shared/science/moon.ts";
import { separation } from "#shared/science/separation.ts";
import { sunDistance, sunIcrs } from "#shared/science/sun.ts";
import { at, expectWithin } from "./table.ts";

const place = new Float64Array(2);

const distance = (write: (target: Float64Array) => void, expected: readonly number[]): number => {
  write(place);
  return separation(at([...place], 0), at([...place], 1), at(expected, 0), at(expected, 1));
};

test("the Sun stands where get_sun has it, to 0.01° and 0.0001 au: the accuracy that the formula is given for", () => {
  expectWithin("sun", (row, answer) => distance((to) => sunIcrs(to, at(row, 0)), answer), 0.01);
  expectWithin("sun", (row, answer) => Math.abs(sunDistance(at(row, 0)) - at(answer, 2)), 1e-4);
});

test("the Moon stands where get_body has it, to 0.36°: 0.3° in longitude and 0.2° in latitude", () => {
  expectWithin(
    "moon",
    (row, answer) => distance((to) => moonIcrs(to, at(row, 0)), answer),
    Math.hypot(0.3, 0.2),
  );
  expectWithin(
    "moon",
    (row, answer) => Math.abs(moonElongation(at(row, 0)) - at(answer, 3)),
    Math.hypot(0.3, 0.2),
  );
});

test("the Moon's parallax is right to 0.003°, as the formula is given for", () => {
  expectWithin("moon", (row, answer) => Math.abs(moonParallax(at(row, 0)) - at(answer, 2)), 0.003);
});
