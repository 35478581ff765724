import { createHash } from "node:crypto";
import type { EntityManager } from "typeorm";
import type { z } from "zod";
import type { listCreateBody } from "#shared/api/lists.ts";
import type { StarRow } from "#shared/api/stars.ts";
import { viewFromParams, viewToParams } from "#shared/catalogue/view.ts";
import { ListMember } from "../database/entities/list-member.entity.ts";
import { TargetList } from "../database/entities/target-list.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { unprocessable } from "../errors.ts";
import { writeLine } from "../logbook/service.ts";
import { type OpenView, openView } from "../scan/view.ts";
import { readRows } from "../stars/service.ts";

/** Stars read and written at a time. */
const BATCH = 500;

type Input = z.output<typeof listCreateBody>;

/** Names a star the same on any machine: its identifier with the release, else its designation. */
const identityOf = (row: StarRow): string =>
  row.sourceId === null ? row.designation : `${row.release ?? ""}|${row.sourceId}`;

const rankedBy = (view: OpenView): string => {
  const { sort } = view.resolved.view;
  return sort.key === "merit"
    ? "merit"
    : `${sort.key}, ${sort.direction === "desc" ? "highest" : "lowest"} first`;
};

/** A view that names something it cannot have makes another list than the person saw: refuse instead. */
const requireWhole = async (view: OpenView, ignored: readonly string[]): Promise<void> => {
  const lost = [...ignored, ...view.resolved.ignored];
  const broken = (await view.ladder())
    .filter((step) => step.error !== null)
    .map((step) => `cut "${step.expression}"`);
  const wrong = [...lost, ...broken];
  if (wrong.length === 0) return;
  throw unprocessable("view-not-whole", `Part of this view cannot be used: ${wrong.join(", ")}.`, {
    hint: "Open the catalogue, mend or remove that part, and make the list again.",
  });
};

/**
 * Copies the first stars of the view as they are now, some at a time so that a long list is never in memory as a whole;
 * answers their identities.
 */
const copyMembers = async (
  deps: Deps,
  tx: EntityManager,
  listId: string,
  view: OpenView,
  first: number,
): Promise<string[]> => {
  const cameIn = `of ${await view.count()} by ${rankedBy(view)}`;
  const identities: string[] = [];
  while (identities.length < first) {
    const ids = await view.ids(identities.length, Math.min(BATCH, first - identities.length));
    if (ids.length === 0) break;
    const rows = await readRows(deps, view, ids, identities.length + 1, tx);
    const members = rows.map((row) => ({
      listId,
      starId: row.id,
      place: row.place,
      state: "in" as const,
      reason: "",
      cameIn: `place ${row.place} ${cameIn}`,
      row: row as unknown as object,
    }));
    await tx.insert(ListMember, members as never);
    identities.push(...rows.map(identityOf));
  }
  return identities;
};

const fingerprintOf = (identities: readonly string[]): string =>
  createHash("sha256").update(identities.toSorted().join("\n")).digest("hex");

/** Makes a list of the first N stars of a view; they keep the values they are put there on. */
export const makeList = async (
  deps: Deps,
  programmeId: string,
  maker: { id: string; name: string },
  input: Input,
): Promise<{ listId: string; note: string | null }> => {
  const { view: spec, ignored } = viewFromParams(new URLSearchParams(input.view));
  const view = await openView(deps, programmeId, spec);
  await requireWhole(view, ignored);
  const count = await view.count();
  if (count === 0)
    throw unprocessable("no-stars", "No star passes the cuts of this view, so there is nothing to list.", {
      hint: "Loosen a cut and make the list again.",
    });
  const { edition, recipe, card, campaign, merit } = view.resolved;
  const made = await inTransaction(deps.db, async (tx) => {
    const at = deps.now();
    const list = await tx.save(
      TargetList,
      tx.create(TargetList, {
        programmeId,
        name: input.name,
        note: input.note,
        state: "draft",
        catalogueEdition: edition,
        viewParams: viewToParams({ ...view.resolved.view, edition }).toString(),
        cardVersionId: card?.versionId ?? null,
        campaignVersionId: campaign?.versionId ?? null,
        meritVersionId: merit?.versionId ?? null,
        recipeVersionId: recipe.versionId,
        fingerprint: fingerprintOf([]),
        madeBy: maker.id,
        madeAt: at,
      }),
    );
    const identities = await copyMembers(deps, tx, list.id, view, input.first);
    await tx.query("UPDATE target_list SET fingerprint = ? WHERE target_list_id = ?", [
      fingerprintOf(identities),
      list.id,
    ]);
    await writeLine(tx, {
      programmeId,
      person: maker,
      action: "list.make",
      subject: { type: "list", id: list.id, name: input.name },
      after: { stars: identities.length, of: count, catalogueEdition: edition, view: list.viewParams },
      at,
    });
    return { listId: list.id, stars: identities.length };
  });
  const note =
    made.stars < input.first
      ? `Only ${made.stars} ${made.stars === 1 ? "star passes" : "stars pass"} the cuts: the list has all of them.`
      : null;
  return { listId: made.listId, note };
};
