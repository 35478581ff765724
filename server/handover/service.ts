import { Readable } from "node:stream";
import type { EXPORT_FORMATS, TargetList } from "#shared/api/lists.ts";
import { viewFromParams } from "#shared/catalogue/view.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { presentMember } from "../lists/present.ts";
import { findMembersAfter } from "../lists/queries.ts";
import { readList } from "../lists/service.ts";
import { csvLine } from "./csv.ts";
import { ecsvHeader, ecsvLine } from "./ecsv.ts";
import { type FileColumn, listColumns } from "./list-columns.ts";

type Format = (typeof EXPORT_FORMATS)[number];

const BATCH = 500;
const INVENTED = "The sky of this programme is invented: none of these stars exist.";
const CAUTION =
  "Estimate. The observatory's own tools and rules decide where a telescope may point and how bright a star may be.";

const versionText = (v: { name: string; number: number } | null): string =>
  v ? `${v.name}, version ${v.number}` : "none";

/** What the file says of itself. No moment of writing: the same list gives the same bytes. */
const metaOf = (
  list: TargetList,
  programme: string,
): Record<string, string | number | readonly string[]> => ({
  programme,
  target_list: list.name,
  // Only a signed edition is final; until then every copy says that it is not.
  status: `working copy (${list.state})`,
  stars: list.stars,
  fingerprint: list.fingerprint,
  catalogue_edition: list.catalogueEdition,
  recipe: recipeLabel(list.recipe),
  instrument_card: versionText(list.card),
  campaign: versionText(list.campaign),
  figure_of_merit: versionText(list.merit),
  cuts: viewFromParams(new URLSearchParams(list.viewParams)).view.cuts.map(
    (cut) => `${cut.expression} (blank: ${cut.blanks})`,
  ),
  caution: CAUTION,
  ...(list.isInvented ? { invented: INVENTED } : {}),
});

async function* lines(
  deps: Deps,
  list: TargetList,
  columns: readonly FileColumn[],
  head: string,
  line: typeof csvLine,
): AsyncGenerator<Buffer> {
  yield Buffer.from(head);
  let place = 0;
  for (;;) {
    const members = (await findMembersAfter(deps.db.manager, list.id, place, BATCH)).map(presentMember);
    if (members.length === 0) return;
    yield Buffer.from(
      members
        .map((member) =>
          line(
            columns.map((c) => c.value(member)),
            columns,
          ),
        )
        .join(""),
    );
    place = members.at(-1)?.place ?? Number.POSITIVE_INFINITY;
  }
}

/** The watermark of a format that has no header. */
const fileName = (list: TargetList, format: Format): string =>
  `${
    list.name
      .toLowerCase()
      .replace(/[^a-z0-9]+/g, "-")
      .replace(/^-|-$/g, "") || "target-list"
  }-working-copy.${format}`;

export interface ListFile {
  name: string;
  type: string;
  content: Readable;
}

/** A list as a file, in order of place, every digit kept. */
export const exportList = async (
  deps: Deps,
  programmeId: string,
  listId: string,
  format: Format,
): Promise<ListFile> => {
  const list = await readList(deps, programmeId, listId);
  const programme = await deps.db.manager.findOneBy(Programme, { id: programmeId });
  if (!programme) throw notFound("This programme");
  const columns = listColumns(list.merit?.terms ?? [], list.isInvented);
  const names = columns.map((c) => c.name);
  const [head, line] =
    format === "csv"
      ? [csvLine(names), csvLine]
      : [ecsvHeader(columns, metaOf(list, programme.name)), ecsvLine];
  return {
    name: fileName(list, format),
    type: format === "csv" ? "text/csv; charset=utf-8; header=present" : "text/plain; charset=utf-8",
    content: Readable.from(lines(deps, list, columns, head, line), { objectMode: false }),
  };
};
