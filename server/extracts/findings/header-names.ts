import type { Finding } from "#shared/api/extracts.ts";
import type { Sample } from "../sample.ts";
import { note, quoted } from "./finding.ts";
import { groupBy } from "./look.ts";

const LONGEST = 200;
const SHOWN = 5;

const renamed = (sample: Sample): Finding[] =>
  sample.renamed.length > 0
    ? [
        note(
          "headers-renamed",
          `${sample.renamed.length} columns share a name or have none; here they are called ${sample.renamed
            .slice(0, SHOWN)
            .map((r) => `“${r.to}”`)
            .join(", ")}.`,
          "Nothing needs to be done; the original keeps its names.",
          { count: sample.renamed.length },
        ),
      ]
    : [];

const differingByCase = ({ header }: Sample): Finding[] => {
  const groups = groupBy(header, (name) => name.toLowerCase());
  const pairs = [...groups.values()].filter((names) => new Set(names).size > 1);
  const [first] = pairs;
  if (!first) return [];
  return [
    note(
      "header-case",
      `${quoted(first)} differ only by capital letters.`,
      "Look which of them gives what; they are kept apart.",
      { count: pairs.length },
    ),
  ];
};

const tooLong = ({ header }: Sample): Finding[] => {
  const long = header.filter((name) => name.length > LONGEST);
  if (long.length === 0) return [];
  return [
    note(
      "header-long",
      `${long.length} ${long.length === 1 ? "column has a name" : "columns have names"} of more than ${LONGEST} characters: the first line may not be a line of names.`,
      "Look at the first lines of the file.",
      {
        count: long.length,
        examples: long.slice(0, 3).map((text) => ({ line: 1, text: text.slice(0, LONGEST) })),
      },
    ),
  ];
};

/** Names that share a spelling, lack one, or are none. */
export const headerFindings = (sample: Sample): Finding[] => [
  ...renamed(sample),
  ...differingByCase(sample),
  ...tooLong(sample),
];
