import type { ReactNode } from "react";
import { Link } from "react-router-dom";
import type { TargetList } from "#shared/api/lists.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import { type Cut, type ViewSpec, viewFromParams } from "#shared/catalogue/view.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { paths } from "#src/app/paths.ts";
import { Moment } from "#src/ui/moment.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";

const Line = ({ name, children }: { name: string; children: ReactNode }) => (
  <div className="contents">
    <dt className="text-soft">{name}</dt>
    <dd className="text-right wrap-anywhere">{children}</dd>
  </div>
);

const orderWords = ({ sort }: ViewSpec): string => {
  const label = sort.key === "merit" ? "merit" : (findColumn(sort.key)?.label ?? sort.key);
  return `${label}, ${sort.direction === "desc" ? "highest" : "lowest"} first`;
};

const named = (thing: { name: string; number: number } | null): string =>
  thing ? `${thing.name}, version ${thing.number}` : "none";

const CutLine = ({ cut, index }: { cut: Cut; index: number }) => (
  <li className="border-t border-hair py-2">
    {cut.label ? <span className="font-medium">{`${index + 1}. ${cut.label}`}</span> : `${index + 1}.`}
    <code className="block text-[12.5px] text-blue wrap-anywhere">{cut.expression}</code>
    <span className="text-xs text-soft">{cut.blanks === "keep" ? "blanks kept" : "blanks dropped"}</span>
  </li>
);

/** All that a list was made from, so that it can be made again. */
export const Provenance = ({ programmeId, list }: { programmeId: string; list: TargetList }) => {
  const { view } = viewFromParams(new URLSearchParams(list.viewParams));
  return (
    <section aria-label="Where the list comes from">
      <h2 className="text-[21px]">Where it comes from</h2>
      <p className="text-xs text-soft">
        the values of its stars are those of that moment and stay as they are
      </p>
      <dl className="mt-3 grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-[13px]">
        <Line name="Catalogue edition">
          <span className="font-mono">{list.catalogueEdition}</span>
        </Line>
        <Line name="Figure of merit">{named(list.merit)}</Line>
        <Line name="Instrument card">{named(list.card)}</Line>
        <Line name="Campaign">{named(list.campaign)}</Line>
        <Line name="Recipe">{recipeLabel(list.recipe)}</Line>
        <Line name="Order">{orderWords(view)}</Line>
        <Line name="Set fingerprint">
          <span className="font-mono">{list.fingerprint}</span>
        </Line>
        <Line name="Made by">{list.madeBy.name}</Line>
        <Line name="Made">
          <Moment at={list.madeAt} isShort />
        </Line>
      </dl>
      <SectionTitle>
        {view.cuts.length === 0
          ? "No cuts"
          : `${view.cuts.length} ${view.cuts.length === 1 ? "cut" : "cuts"}`}
      </SectionTitle>
      {view.cuts.length === 0 ? (
        <p className="text-soft">Every star of the edition could come in.</p>
      ) : (
        <ol>
          {view.cuts.map((cut, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: the cuts of a list never change
            <CutLine key={i} cut={cut} index={i} />
          ))}
        </ol>
      )}
      <p className="mt-3">
        <Link
          to={paths.programme.to(programmeId, "catalogue", `?${list.viewParams}`)}
          className="underline decoration-edge underline-offset-4 hover:decoration-ink"
        >
          Open this view in the catalogue
        </Link>
      </p>
      <SectionTitle>Before it is used</SectionTitle>
      <ul className="flex flex-col gap-1.5 text-xs text-soft">
        <li>Chance of transit is geometric; it says nothing about whether planets exist.</li>
        <li>Habitable zone is a model range of received light, not a promise.</li>
        <li>Positions stand at the epoch given beside them; fast stars have moved since.</li>
        {list.isInvented ? (
          <li className="text-mark">◆ The sky of this programme is invented: none of these stars exist.</li>
        ) : null}
      </ul>
    </section>
  );
};
