import { createWriteStream } from "node:fs";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { parseArgs } from "node:util";
import { astrometryExtract, spectraExtract } from "#server/demo/extract-files.ts";

const HELP = `Writes an extract of the invented sky: none of its stars exist.

  npm run generate -- --rows N --out FILE [--seed S] [--from N] [--layout astrometry|spectra]

  --rows    how many stars, 1 to 100 000 000
  --out     the file to write
  --seed    whole number; the same seed gives the same sky (default 1)
  --from    number of the first star (default 0); ranges that overlap hold the same stars
  --layout  astrometry (positions, motions, magnitudes; default) or spectra (magnitudes, spectra)
`;

const fail = (message: string): never => {
  process.stderr.write(`${message}\n\n${HELP}`);
  process.exit(1);
};

const wholeNumber = (text: string | undefined, name: string, least: number, most: number): number => {
  const value = Number(text);
  if (!Number.isInteger(value) || value < least || value > most)
    return fail(`--${name} takes a whole number from ${least} to ${most}.`);
  return value;
};

/** Some kilobytes at a time: a write for each line would cost more than the line. */
function* chunks(lines: Iterable<string>): Generator<Buffer> {
  let held: string[] = [];
  for (const line of lines) {
    held.push(line);
    if (held.length >= 1_000) {
      yield Buffer.from(`${held.join("\n")}\n`);
      held = [];
    }
  }
  if (held.length > 0) yield Buffer.from(`${held.join("\n")}\n`);
}

const options = {
  rows: { type: "string" },
  out: { type: "string" },
  seed: { type: "string", default: "1" },
  from: { type: "string", default: "0" },
  layout: { type: "string", default: "astrometry" },
  help: { type: "boolean", default: false },
} as const;

const { values } = parseArgs({ options });
if (values.help) process.stdout.write(HELP);
else {
  const seed = wholeNumber(values.seed, "seed", 0, 2 ** 31);
  const from = wholeNumber(values.from, "from", 0, 1e8);
  const to = from + wholeNumber(values.rows, "rows", 1, 1e8);
  const out = values.out ?? fail("--out names the file to write.");
  const layouts = { astrometry: astrometryExtract, spectra: spectraExtract };
  const layout = layouts[values.layout as keyof typeof layouts] ?? fail("--layout is astrometry or spectra.");
  await pipeline(Readable.from(chunks(layout({ seed, from, to }))), createWriteStream(out));
}
