import { useQuery } from "@tanstack/react-query";
import type { Catalogue, ViewSummary } from "#shared/api/stars.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { campaignsOptions, cardsOptions } from "#src/api/instruments.ts";
import { meritsOptions } from "#src/api/merits.ts";
import { catalogueOptions } from "#src/api/stars.ts";
import { Chooser } from "./chooser.tsx";

const NUMBERS = ["no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten"];
const inWords = (n: number): string => NUMBERS[n] ?? String(n);

interface Props {
  programmeId: string;
  view: ViewSpec;
  summary: ViewSummary;
  ask: (change: Partial<ViewSpec>) => void;
}

interface Version {
  versionId: string;
  name: string;
  number: number;
}

/** A version that is not the newest any more stays choosable while it is in use. */
const withChosen = (versions: readonly Version[], chosen: Version | null, none: string) => [
  { value: null, label: none },
  ...(chosen && !versions.some((v) => v.versionId === chosen.versionId) ? [chosen] : [])
    .concat(versions)
    .map((v) => ({
      value: v.versionId,
      label: `${v.name}, version ${v.number}`,
    })),
];

/** "Edition 2: extract 2, Motions, by Default v1 · 3f2a91c0"; a recompute names its recipe itself. */
const editionWords = ({ number, reason, recipe }: Catalogue["editions"][number]): string => {
  const label = recipeLabel(recipe);
  return `Edition ${number}: ${reason}${reason.includes(label) ? "" : `, by ${label}`}`;
};

/** The one sentence that says what is on screen; its underlined parts change it. The page's heading. */
export const Lede = ({ programmeId, view, summary, ask }: Props) => {
  const catalogue = useQuery(catalogueOptions(programmeId));
  const merits = useQuery(meritsOptions(programmeId));
  const cards = useQuery(cardsOptions(programmeId));
  const campaigns = useQuery(campaignsOptions(programmeId));
  // Of the answer, not of a question that is still open: count and cuts belong together.
  const cuts = summary.ladder.length;
  return (
    <h1 className="max-w-[820px] text-[22px] leading-snug">
      {count(summary.total)} {summary.total === 1 ? "star" : "stars"} in{" "}
      <Chooser
        label="Catalogue edition"
        text={`edition ${summary.edition ?? 0}`}
        value={view.edition === null ? null : String(view.edition)}
        choices={[
          { value: null, label: "The newest edition" },
          ...(catalogue.data?.editions ?? []).map((e) => ({
            value: String(e.number),
            label: editionWords(e),
          })),
        ]}
        onChoose={(edition) => ask({ edition: edition === null ? null : Number(edition) })}
      />
      . <em className="text-mark">{count(summary.count)}</em> {summary.count === 1 ? "passes" : "pass"}{" "}
      {inWords(cuts)} {cuts === 1 ? "cut" : "cuts"}
      {", ranked by "}
      <Chooser
        label="Figure of merit"
        text={summary.merit ? summary.merit.name : "no figure of merit"}
        value={summary.merit?.versionId ?? null}
        choices={withChosen(merits.data ?? [], summary.merit, "No figure of merit")}
        onChoose={(merit) =>
          ask({
            merit,
            sort: merit
              ? { key: "merit", direction: "desc" }
              : view.sort.key === "merit"
                ? { key: "designation", direction: "asc" }
                : view.sort,
          })
        }
      />
      {" as "}
      <Chooser
        label="Instrument card"
        text={summary.card ? summary.card.name : "no instrument"}
        value={summary.card?.versionId ?? null}
        choices={withChosen(cards.data ?? [], summary.card, "No instrument")}
        onChoose={(card) => ask({ card })}
      />
      {summary.card ? (
        <>
          {" in "}
          <Chooser
            label="Campaign"
            text={summary.campaign ? summary.campaign.name : "no campaign"}
            value={summary.campaign?.versionId ?? null}
            choices={withChosen(campaigns.data ?? [], summary.campaign, "No campaign")}
            onChoose={(campaign) => ask({ campaign })}
          />
          {" would see them."}
        </>
      ) : (
        " sees them."
      )}
    </h1>
  );
};
