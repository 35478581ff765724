import { usage } from "./trouble.ts";

const SECONDS: Readonly<Record<string, number>> = { "": 1, s: 1, min: 60, h: 3600, d: 86_400 };

const AMOUNT = /^(\d+\.?\d*|\.\d+)\s*([a-z]*)$/;

const listOf = (text: string, option: string): string[] => {
  const items = text.split(",").map((item) => item.trim());
  if (items.every((item) => item !== "")) return items;
  throw usage(`--${option} is “${text}”.`, "It takes values with commas between them.");
};

/** Diameters in metres: `0.1,0.5,2`. */
export const readDiameters = (text: string): number[] =>
  listOf(text, "diameters").map((item) => {
    const value = AMOUNT.exec(item)?.[2] === "" ? Number(item) : Number.NaN;
    if (value > 0 && value <= 100) return value;
    throw usage(`“${item}” is no diameter.`, "--diameters takes metres, above 0 to 100, such as 0.1,0.5,2.");
  });

/** Times in seconds; `min`, `h` and `d` may follow the number: `60,30min,6.5h`. */
export const readTimes = (text: string): number[] =>
  listOf(text, "exposures").map((item) => {
    const parts = AMOUNT.exec(item);
    const seconds = Number(parts?.[1]) * (SECONDS[parts?.[2] ?? ""] ?? Number.NaN);
    if (seconds > 0 && seconds <= 36_525 * 86_400) return seconds;
    throw usage(`“${item}” is no time.`, "--exposures takes seconds, or a unit behind: 60,600s,30min,6.5h.");
  });

export const readMagnitude = (text: string): number => {
  const value = /^[+-]?(\d+\.?\d*|\.\d+)$/.test(text) ? Number(text) : Number.NaN;
  if (value >= -5 && value <= 40) return value;
  throw usage(`--magnitude is “${text}”.`, "It takes a magnitude from -5 to 40; write --magnitude=-1.5.");
};

/** `60 s`, `1 h`, `6.5 h`. */
export const timeText = (seconds: number): string =>
  seconds >= 3600 && (seconds / 3600) % 0.5 === 0 ? `${seconds / 3600} h` : `${seconds} s`;
