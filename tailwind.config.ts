import type { Config } from "tailwindcss";

/** Names of the palette; the themes in src/index.css give them their values. */
const color = (name: string): string => `var(--${name})`;

export default {
  content: ["./src/**/*.{ts,tsx}"],
  theme: {
    extend: {
      colors: {
        paper: color("paper"),
        sheet: color("sheet"),
        ink: color("ink"),
        soft: color("soft"),
        faint: color("faint"),
        rule: color("rule"),
        hair: color("hair"),
        edge: color("edge"),
        mark: color("mark"),
        "mark-soft": color("mark-soft"),
        blue: color("blue"),
        "blue-soft": color("blue-soft"),
        zone: color("zone"),
        "zone-soft": color("zone-soft"),
        gold: color("gold"),
        sel: color("sel"),
      },
      fontFamily: {
        sans: ['"Instrument Sans Variable"', "sans-serif"],
        serif: ['"Instrument Serif"', "serif"],
        mono: ['"Roboto Mono"', "monospace"],
      },
      borderRadius: { DEFAULT: "6px" },
    },
  },
} satisfies Config;
