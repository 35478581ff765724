import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Campaign } from "#shared/api/instruments.ts";
import { count, fixed, plainNumber } from "#shared/format/numbers.ts";
import { campaignsOptions } from "#src/api/instruments.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { CampaignDialog } from "./campaign-dialog.tsx";

const inWords = ({ settings }: Campaign): string =>
  [
    `${plainNumber(settings.lengthDays)} d`,
    `${fixed(100 * settings.duty, 0)} % of the time`,
    settings.leastTransits === 1 ? "1 transit" : `${count(settings.leastTransits)} transits`,
    `S/N ${plainNumber(settings.snrLimit)}`,
    settings.statistic === "boxcar" ? "box" : settings.statistic,
  ].join(" · ");

/** The campaigns of the programme: how long is observed, and what counts as found. */
export const Campaigns = ({ programmeId }: { programmeId: string }) => {
  const mayEdit = useCan()("instrument.edit");
  const campaigns = useQuery(campaignsOptions(programmeId));
  const [open, setOpen] = useState<Campaign | "new" | null>(null);
  return (
    <section aria-labelledby="campaigns-title" className="mt-8">
      <div className="flex flex-wrap items-baseline justify-between gap-2">
        <h2 id="campaigns-title" className="text-[22px]">
          Campaigns
        </h2>
        {mayEdit ? <Button onClick={() => setOpen("new")}>New campaign</Button> : null}
      </div>
      <p className="text-xs text-soft">How long is observed, and what counts as found; for every card.</p>
      {campaigns.isPending ? <Loading /> : null}
      <ErrorNotice error={campaigns.error} onRetry={() => void campaigns.refetch()} />
      {campaigns.data?.length === 0 ? (
        <p className="mt-3 text-soft">No campaign yet. Without one there is noise, but no smallest planet.</p>
      ) : null}
      <ul className="mt-2">
        {campaigns.data?.map((campaign) => (
          <li
            key={campaign.id}
            className="flex items-start justify-between gap-3 border-t border-hair py-2.5 first:border-t-0"
          >
            <div className="min-w-0">
              <p className="wrap-anywhere">
                {campaign.name} <span className="text-xs text-soft">version {campaign.number}</span>
              </p>
              <p className="font-mono text-xs text-soft">{inWords(campaign)}</p>
            </div>
            {mayEdit ? (
              <Button aria-label={`Edit ${campaign.name}`} onClick={() => setOpen(campaign)}>
                Edit
              </Button>
            ) : null}
          </li>
        ))}
      </ul>
      {open ? (
        <CampaignDialog
          key={open === "new" ? "new" : open.versionId}
          programmeId={programmeId}
          campaign={open === "new" ? null : open}
          onClose={() => setOpen(null)}
        />
      ) : null}
    </section>
  );
};
