import { once } from "node:events";
import { resolve } from "node:path";
import type { Writable } from "node:stream";
import { unprocessable } from "../errors.ts";
import { csvLine } from "../handover/csv.ts";
import { ecsvHeader, ecsvLine, type MetaValue } from "../handover/ecsv.ts";
import { needed, oneOf, oneOperand, readOptions } from "./options.ts";
import { OUTPUT_COLUMNS } from "./output-columns.ts";
import { isSameFile } from "./same-file.ts";
import { type Named, type NamedRecipe, readCampaign, readCard, readRecipe } from "./settings-files.ts";
import { type RowCounts, readStars, type StarRows } from "./stars.ts";
import { type Surroundings, write } from "./surroundings.ts";
import { usage } from "./trouble.ts";
import { beginFile } from "./unfinished-file.ts";
import { type Settings, type WorkedOut, workOut } from "./worked-out.ts";

export const DERIVE_HELP = `Derives every star of an extract and says what one instrument could find around it in one campaign.

  shortlight derive FILE --card CARD --campaign CAMPAIGN [--recipe RECIPE] [--plan PLAN.json]
                    [--out FILE] [--format ecsv|csv]

  FILE        the extract: text between commas, semicolons, tabs or bars, ECSV, a VOTable or a FITS table. What it is
              is told by its content.
  --card      the instrument card: a JSON file, or the name of one that comes along (practice-30, heron-04)
  --campaign  the campaign: a JSON file, or a name (practice-180d, sixty-nights)
  --recipe    default, practice (the simpler choices of the practice stars), or a JSON file {"name", "settings"}
  --plan      answers to what the file cannot say; see below
  --out       the file to write; without it the table goes to the standard output
  --format    ecsv (names, units, descriptions, UCDs and what it was made with in the header; the default) or csv
              (the keys alone in the first line; the units are those of the ECSV header)

There is one row for each star, with every column of the catalogue under its key; KEY_err is its error, KEY_blank the
reason where it is blank. Identifiers stay the texts that they are. The same file and settings give the same bytes.
A star that is named again is skipped, and a row that cannot be read is refused and named on the standard error.

Columns are taken by their names, units and UCDs where these leave no doubt. Otherwise the command names the questions
and ends with code 2. A plan answers them; everything in it is optional:

  {
    "delimiter": ";", "decimalMark": ",", "encoding": "latin1",
    "epoch": 2016.0, "release": "Survey DR1", "accept": ["votable-overflow"],
    "columns": {
      "RAJ2000": { "key": "ra", "unit": "hourangle" },
      "plx": { "key": "parallax", "unit": "arcsec", "blankMarks": ["-999"] },
      "Kmag2": { "key": "kept" }
    }
  }

Columns are named as the file spells them, keys as the catalogue does; "kept" leaves a column unused. delimiter: one of
, ; | and \\t. decimalMark: . or a comma. encoding: utf-8, utf-16le or latin1. keptNumbers lists numbers that look like
marks for "no value" and are none; accept lists findings about the file that do not keep it from being read.
`;

const OPTIONS = {
  card: { type: "string" },
  campaign: { type: "string" },
  recipe: { type: "string", default: "default" },
  plan: { type: "string" },
  out: { type: "string" },
  format: { type: "string", default: "ecsv" },
} as const;

type Format = "ecsv" | "csv";

const linesOf = (block: WorkedOut, format: Format): string => {
  const cells = OUTPUT_COLUMNS.map((c) => c.bind(block));
  let text = "";
  for (let row = 0; row < block.rows.length; row++) {
    const values = cells.map((cell) => cell(row));
    text += format === "ecsv" ? ecsvLine(values) : csvLine(values, OUTPUT_COLUMNS);
  }
  return text;
};

interface Choice {
  readonly card: Named<Settings["card"]>;
  readonly campaign: Named<Settings["campaign"]>;
  readonly recipe: NamedRecipe;
}

/** What the table was made with. No times: the same file and settings give the same bytes. */
const metaOf = ({ card, campaign, recipe }: Choice, counts: RowCounts): Record<string, MetaValue> => ({
  recipe: recipe.name,
  recipe_version: recipe.number,
  recipe_hash: recipe.hash,
  card: card.name,
  card_settings: JSON.stringify(card.settings),
  campaign: campaign.name,
  campaign_settings: JSON.stringify(campaign.settings),
  rows_read: counts.read,
  rows_written: counts.accepted,
  rows_refused: counts.refused,
  rows_skipped: counts.skipped,
});

const headerOf = (format: Format, choice: Choice, counts: RowCounts): string =>
  format === "ecsv"
    ? ecsvHeader(OUTPUT_COLUMNS, metaOf(choice, counts))
    : csvLine(OUTPUT_COLUMNS.map((c) => c.name));

const send = async (to: Writable, text: string): Promise<void> => {
  if (!to.write(text)) await once(to, "drain");
};

const summary = (stars: StarRows): string => {
  const { counts, refusals } = stars;
  const { read, accepted, refused, skipped } = counts;
  const first = refusals.map(({ row, line, why }) =>
    line === null ? `  row ${row}: ${why}\n` : `  line ${line}: ${why}\n`,
  );
  const more = refused > refusals.length ? `  and ${refused - refusals.length} more\n` : "";
  const twice = skipped > 0 ? "; skipped rows name a star that an earlier row names" : "";
  const line = `${read} rows read: ${accepted} written, ${refused} refused, ${skipped} skipped${twice}.\n`;
  const notes = stars
    .findings()
    .map(({ message, examples }) => `  ${[message, ...examples].join("\n    ")}\n`);
  return [line, ...first, more, ...notes].join("");
};

/** The extract is the only copy that the command knows of. */
const refuseToReplace = async (folder: string, file: string, out: string | undefined): Promise<void> => {
  if (out === undefined || !(await isSameFile(resolve(folder, file), resolve(folder, out)))) return;
  throw usage(`--out names the extract itself, ${file}.`, "Name another file: the extract would be lost.");
};

export const derive = async (args: readonly string[], at: Surroundings): Promise<void> => {
  const { values, positionals } = readOptions(args, OPTIONS, "derive");
  const file = oneOperand(positionals, "The file to read", "derive");
  const format = oneOf(values.format, ["ecsv", "csv"], "format");
  await refuseToReplace(at.folder, file, values.out);
  const choice: Choice = {
    card: await readCard(at.folder, needed(values.card, "card", "derive")),
    campaign: await readCampaign(at.folder, needed(values.campaign, "campaign", "derive")),
    recipe: await readRecipe(at.folder, values.recipe),
  };
  const settings: Settings = {
    card: choice.card.settings,
    campaign: choice.campaign.settings,
    recipe: choice.recipe.settings,
  };
  const stars = await readStars(at.folder, file, values.plan);
  const draft = await beginFile(at.folder, values.out, at.out);
  try {
    for await (const rows of stars.blocks()) await send(draft.rows, linesOf(workOut(rows, settings), format));
    if (stars.counts.accepted === 0)
      throw unprocessable("no-row-accepted", `No row could be accepted. ${summary(stars).trimEnd()}`, {
        hint: "Look at the units and names of the columns, or at the file itself.",
      });
    await draft.finish(headerOf(format, choice, stars.counts));
  } finally {
    await draft.discard();
  }
  await write(at.err, summary(stars));
};
