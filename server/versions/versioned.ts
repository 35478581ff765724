import type { EntityManager, EntityTarget, ObjectLiteral } from "typeorm";
import { In } from "typeorm";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { conflict, notFound } from "../errors.ts";
import { writeLine } from "../logbook/service.ts";

/**
 * Things that are saved in versions (cards, campaigns, selections, figures of merit): a save adds a row and changes none,
 * so that what was made with a version opens with the same numbers later.
 */
export interface VersionRow extends ObjectLiteral {
  id: string;
  programmeId: string;
  number: number;
  name: string;
  savedBy: string;
  savedAt: Date;
}

export interface Kind<Row extends VersionRow> {
  readonly entity: EntityTarget<Row>;
  readonly table: string;
  /** Property and SQL name that hold the id of the first version, shared by all of them. */
  readonly rootKey: keyof Row & string;
  readonly rootColumn: string;
  readonly idColumn: string;
  /** Word for messages and the logbook, e.g. "instrument card". */
  readonly word: string;
  readonly subject: string;
}

export interface Editor {
  readonly id: string;
  readonly name: string;
}

const nothing = (kind: { word: string }) => notFound(`This ${kind.word}`);

const namesOf = async (tx: EntityManager, ids: readonly string[]): Promise<Map<string, string>> => {
  const people = await tx.find(Person, {
    select: { id: true, name: true },
    where: { id: In([...new Set(ids)]) },
  });
  return new Map(people.map((person) => [person.id, person.name]));
};

/** A row with the person who saved it. */
export interface Saved<Row> {
  row: Row;
  savedBy: Editor;
}

const withNames = async <Row extends VersionRow>(
  tx: EntityManager,
  rows: readonly Row[],
): Promise<Saved<Row>[]> => {
  const names = await namesOf(
    tx,
    rows.map((row) => row.savedBy),
  );
  return rows.map((row) => ({
    row,
    savedBy: { id: row.savedBy, name: names.get(row.savedBy) ?? "someone who left" },
  }));
};

/** The newest version of each thing of the programme, by name. */
export const newestVersions = async <Row extends VersionRow>(
  deps: Deps,
  kind: Kind<Row>,
  programmeId: string,
): Promise<Saved<Row>[]> => {
  const tx = deps.db.manager;
  const rows = await tx
    .createQueryBuilder(kind.entity, "v")
    .where("v.programmeId = :programmeId", { programmeId })
    .andWhere(
      `NOT EXISTS (SELECT 1 FROM \`${kind.table}\` newer WHERE newer.${kind.rootColumn} = v.${kind.rootColumn} AND newer.\`number\` > v.\`number\`)`,
    )
    .orderBy("v.name")
    .addOrderBy("v.id")
    .getMany();
  return withNames(tx, rows);
};

/** Every version of one thing, the newest first. */
export const allVersions = async <Row extends VersionRow>(
  deps: Deps,
  kind: Kind<Row>,
  programmeId: string,
  rootId: string,
): Promise<Saved<Row>[]> => {
  const tx = deps.db.manager;
  const rows = await tx
    .createQueryBuilder(kind.entity, "v")
    .where(`v.${kind.rootKey} = :rootId AND v.programmeId = :programmeId`, { rootId, programmeId })
    .orderBy("v.number", "DESC")
    .getMany();
  if (rows.length === 0) throw nothing(kind);
  return withNames(tx, rows);
};

/** One version by its own id. */
export const versionById = async <Row extends VersionRow>(
  deps: Deps,
  kind: Kind<Row>,
  programmeId: string,
  versionId: string,
): Promise<Saved<Row>> => {
  const tx = deps.db.manager;
  const row = await tx
    .createQueryBuilder(kind.entity, "v")
    .where("v.id = :versionId AND v.programmeId = :programmeId", { versionId, programmeId })
    .getOne();
  if (!row) throw nothing(kind);
  const [saved] = await withNames(tx, [row]);
  if (!saved) throw nothing(kind);
  return saved;
};

type Content<Row> = Partial<Row> & { name: string };

const insert = async <Row extends VersionRow>(
  tx: EntityManager,
  kind: Kind<Row>,
  row: Content<Row> & { programmeId: string; number: number; savedBy: string; savedAt: Date },
): Promise<Row> => tx.save(kind.entity, tx.create(kind.entity, row as never) as never) as unknown as Row;

/** The first version of a new thing. */
export const saveFirst = async <Row extends VersionRow>(
  deps: Deps,
  kind: Kind<Row>,
  programmeId: string,
  editor: Editor,
  content: Content<Row>,
): Promise<Saved<Row>> =>
  inTransaction(deps.db, async (tx) => {
    const at = deps.now();
    const row = await insert(tx, kind, {
      ...content,
      programmeId,
      number: 1,
      savedBy: editor.id,
      savedAt: at,
    });
    await tx.query(`UPDATE \`${kind.table}\` SET ${kind.rootColumn} = ? WHERE ${kind.idColumn} = ?`, [
      row.id,
      row.id,
    ]);
    Object.assign(row, { [kind.rootKey]: row.id });
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: `${kind.subject}.make`,
      subject: { type: kind.subject, id: row.id, name: content.name },
      after: content,
      at,
    });
    return { row, savedBy: { id: editor.id, name: editor.name } };
  });

/** The newest version of a thing, locked until the transaction ends. */
const lockNewest = async <Row extends VersionRow>(
  tx: EntityManager,
  kind: Kind<Row>,
  programmeId: string,
  rootId: string,
): Promise<Row> => {
  const row = await tx
    .createQueryBuilder(kind.entity, "v")
    .setLock("pessimistic_write")
    .where(`v.${kind.rootKey} = :rootId AND v.programmeId = :programmeId`, { rootId, programmeId })
    .orderBy("v.number", "DESC")
    .limit(1)
    .getOne();
  if (!row) throw nothing(kind);
  return row;
};

/** A further version. `number` is the one the person saw; someone else's newer one is never overwritten. */
export const saveNext = async <Row extends VersionRow>(
  deps: Deps,
  kind: Kind<Row>,
  programmeId: string,
  editor: Editor,
  rootId: string,
  number: number,
  content: Content<Row>,
): Promise<Saved<Row>> =>
  inTransaction(deps.db, async (tx) => {
    const at = deps.now();
    const newest = await lockNewest(tx, kind, programmeId, rootId);
    if (newest.number !== number)
      throw conflict(
        "changed-meanwhile",
        `Version ${newest.number} of this ${kind.word} was saved after you opened version ${number}.`,
        {
          hint: "Open the newer version, or save yours under another name. Nothing of yours is lost on this page.",
          details: { number: newest.number, versionId: newest.id },
        },
      );
    const next = {
      ...content,
      [kind.rootKey]: rootId,
      programmeId,
      number: number + 1,
      savedBy: editor.id,
      savedAt: at,
    };
    const row = await insert(tx, kind, next);
    await writeLine(tx, {
      programmeId,
      person: editor,
      action: `${kind.subject}.save`,
      subject: { type: kind.subject, id: rootId, name: content.name },
      before: { number, name: newest.name },
      after: { number: number + 1, ...content },
      at,
    });
    return { row, savedBy: { id: editor.id, name: editor.name } };
  });
