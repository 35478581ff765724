import type { ListMember as MemberJson, TargetList } from "#shared/api/lists.ts";
import type { StarRow } from "#shared/api/stars.ts";
import type { ListMember } from "../database/entities/list-member.entity.ts";
import { joinedRef } from "../recipes/queries.ts";
import type { ListRecord } from "./queries.ts";

const named = (versionId: string | null, name: string | null, number: number | null) =>
  versionId === null || name === null || number === null ? null : { versionId, name, number };

const termLabels = (terms: ListRecord["merit_terms"]): string[] => {
  const parsed = typeof terms === "string" ? (JSON.parse(terms) as { label: string }[]) : (terms ?? []);
  return parsed.map((term) => term.label);
};

/** Eight characters of a hash, for people. */
export const shortFingerprint = (hash: string): string => `${hash.slice(0, 4)}-${hash.slice(4, 8)}`;

export const presentList = (row: ListRecord): TargetList => {
  const byState = {
    in: Number(row.stars_in),
    reserve: Number(row.stars_reserve),
    held: Number(row.stars_held),
    out: Number(row.stars_out),
  };
  const merit = named(row.merit_version_id, row.merit_name, row.merit_number);
  return {
    id: String(row.target_list_id),
    name: row.name,
    note: row.note,
    state: row.state,
    catalogueEdition: row.catalogue_edition,
    viewParams: row.view_params,
    merit: merit && { ...merit, terms: termLabels(row.merit_terms) },
    card: named(row.instrument_card_id, row.card_name, row.card_number),
    campaign: named(row.campaign_version_id, row.campaign_name, row.campaign_number),
    recipe: joinedRef(row),
    stars: byState.in + byState.reserve + byState.held + byState.out,
    byState,
    fingerprint: shortFingerprint(row.fingerprint),
    madeBy: { id: String(row.made_by), name: row.maker ?? "someone who left" },
    madeAt: row.made_at.toISOString(),
    isInvented: Boolean(row.is_invented),
    version: row.version,
  };
};

/** The list for who may not read figures of merit: neither its name nor its terms nor an order by it. */
export const withoutMerit = (list: TargetList): TargetList => {
  const params = new URLSearchParams(list.viewParams);
  if (params.get("sort")?.endsWith("merit")) params.delete("sort");
  params.delete("merit");
  return { ...list, merit: null, viewParams: params.toString() };
};

export const memberWithoutMerit = (member: MemberJson): MemberJson => ({
  ...member,
  merit: null,
  shares: [],
  cameIn: "",
});

export const presentMember = (member: ListMember): MemberJson => ({
  ...(member.row as StarRow),
  id: member.starId,
  place: member.place,
  state: member.state,
  reason: member.reason,
  cameIn: member.cameIn,
});
