import { z } from "zod";
import { type Campaign, campaignBody } from "#shared/api/instruments.ts";
import { readFigure } from "./card-draft.ts";
import type { NumberField } from "./card-fields.ts";

/** A campaign as it is being typed. */
interface CampaignDraft {
  name: string;
  statistic: string;
  lengthDays: string;
  duty: string;
  leastTransits: string;
  snrLimit: string;
}

type Figure = "lengthDays" | "duty" | "leastTransits" | "snrLimit";

export const CAMPAIGN_FIELDS: readonly (NumberField & { key: Figure })[] = [
  { key: "lengthDays", label: "Length", unit: "d", hint: "From the first night to the last." },
  {
    key: "duty",
    label: "Share of time observed",
    unit: "",
    hint: "Above 0, at most 1; a third for dark nights at one site.",
  },
  { key: "leastTransits", label: "Transits needed", unit: "", hint: "Fewer do not count as found." },
  { key: "snrLimit", label: "Signal-to-noise limit", unit: "", hint: "Above it a planet counts as found." },
];

export const draftOfCampaign = (campaign: Campaign | null): CampaignDraft => {
  const settings = campaign?.settings ?? {
    lengthDays: 60,
    duty: 0.33,
    leastTransits: 2,
    snrLimit: 7.1,
    statistic: "trapezoid",
  };
  return {
    name: campaign?.name ?? "",
    statistic: settings.statistic,
    lengthDays: String(settings.lengthDays),
    duty: String(settings.duty),
    leastTransits: String(settings.leastTransits),
    snrLimit: String(settings.snrLimit),
  };
};

export type CampaignContent = z.infer<typeof campaignBody>;

/** Reads the draft; each refusal is named after its field. */
export const campaignSchema = z.custom<CampaignDraft>().transform((draft, context): CampaignContent => {
  const figures = CAMPAIGN_FIELDS.map(({ key }) => [key, readFigure(draft[key])] as const);
  const parsed = campaignBody.safeParse({
    name: draft.name,
    settings: { ...Object.fromEntries(figures), statistic: draft.statistic },
  });
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) {
    const name = String(issue.path.at(-1) ?? "name");
    const field = CAMPAIGN_FIELDS.find(({ key }) => key === name);
    const isUnread = field && !Number.isFinite(readFigure(draft[field.key]));
    const message = isUnread
      ? `Enter ${field.label.toLowerCase()} as a number, with a point for decimals.`
      : issue.code === "invalid_type"
        ? `${field?.label ?? "It"} is a whole number.`
        : issue.message;
    context.addIssue({ code: "custom", path: [name], message, input: draft });
  }
  return z.NEVER;
});
