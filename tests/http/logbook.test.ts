import { beforeAll, describe, expect, test } from "vitest";
import { inTransaction } from "#server/database/transaction.ts";
import { writeLine } from "#server/logbook/service.ts";
import { verifyLogbook } from "#server/logbook/verify.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp();
});

const write = (programmeId: string | null, n: number, more: { fail?: boolean } = {}) =>
  inTransaction(on.deps.db, async (tx) => {
    await writeLine(tx, {
      programmeId,
      person: { id: "7", name: "Åsa Écrivaine 🌟" },
      action: "thing.edit",
      subject: { type: "thing", id: String(n % 2), name: `Thing ${n}` },
      before: { b: n, a: [null, 0.1, "é"] },
      after: n % 3 === 0 ? undefined : { n },
      at: on.deps.now(),
    });
    if (more.fail) throw new Error("rolled back");
  });

const chainOf = async (lines: number): Promise<string> => {
  const { id } = await buildProgramme(on.deps.db);
  for (let n = 1; n <= lines; n++) await write(id, n);
  return id;
};

const verify = async (programmeId: string) => (await verifyLogbook(on.deps.db, programmeId))[0];

/** What someone with all rights on the database could do: the triggers out of the way, then back. */
const tamper = async (sql: string, parameters: unknown[]): Promise<void> => {
  const names = ["logbook_line_no_update", "logbook_line_no_delete"];
  const triggers: string[] = [];
  for (const name of names) {
    const [row] = await on.deps.db.query<Record<string, string>[]>(`SHOW CREATE TRIGGER ${name}`);
    triggers.push(row?.["SQL Original Statement"] ?? "");
    await on.deps.db.query(`DROP TRIGGER ${name}`);
  }
  await on.deps.db.query(sql, parameters);
  for (const trigger of triggers) await on.deps.db.query(trigger);
};

describe("the chain", () => {
  test("fits as it was written, in every programme and the installation's own", async () => {
    const id = await chainOf(7);
    await write(null, 1);
    expect(await verify(id)).toEqual({ programmeId: id, lines: 7, fault: null });
    expect(await verify("0")).toEqual({ programmeId: "0", lines: 1, fault: null });
    expect((await verifyLogbook(on.deps.db)).filter((report) => report.fault !== null)).toEqual([]);
  });

  test("does not fork when many write at once, and has no gap where a change was rolled back", async () => {
    const id = await chainOf(1);
    await Promise.all(Array.from({ length: 12 }, (_, n) => write(id, n)));
    await expect(write(id, 99, { fail: true })).rejects.toThrow("rolled back");
    await write(id, 100);
    expect(await verify(id)).toEqual({ programmeId: id, lines: 14, fault: null });
  });

  test.each(["actor", "action", "subject_name", "subject_id", "before_json", "after_json"])(
    "tells of a line whose %s was changed",
    async (column) => {
      const id = await chainOf(5);
      await tamper(`UPDATE logbook_line SET ${column} = '1' WHERE programme_id = ? AND sequence = 4`, [id]);
      expect(await verify(id)).toEqual({
        programmeId: id,
        lines: 3,
        fault: "line 4 is not as it was written",
      });
    },
  );

  test("tells of a moved moment", async () => {
    const id = await chainOf(3);
    await tamper("UPDATE logbook_line SET at = at - INTERVAL 1 DAY WHERE programme_id = ? AND sequence = 2", [
      id,
    ]);
    expect((await verify(id))?.fault).toBe("line 2 is not as it was written");
  });

  test("tells of a line that was taken out, in the middle or at the end", async () => {
    const [middle, end] = [await chainOf(4), await chainOf(4)];
    await tamper("DELETE FROM logbook_line WHERE programme_id = ? AND sequence = 2", [middle]);
    await tamper("DELETE FROM logbook_line WHERE programme_id = ? AND sequence = 4", [end]);
    expect((await verify(middle))?.fault).toBe("line 2 is missing");
    expect((await verify(end))?.fault).toBe("line 4 is missing");
  });

  test("tells of a line whose hash was made to fit its new text", async () => {
    const [id, other] = [await chainOf(4), await chainOf(4)];
    await tamper(
      `UPDATE logbook_line a JOIN logbook_line b ON b.programme_id = ? AND b.sequence = a.sequence
       SET a.hash = b.hash, a.subject_name = 'Another' WHERE a.programme_id = ? AND a.sequence = 2`,
      [other, id],
    );
    expect((await verify(id))?.fault).toBe("line 2 is not as it was written");
  });
});

test("the database itself refuses to change or remove a line", async () => {
  const id = await chainOf(2);
  const refused = /never changed or removed/;
  await expect(
    on.deps.db.query("UPDATE logbook_line SET actor = 'x' WHERE programme_id = ?", [id]),
  ).rejects.toThrow(refused);
  await expect(on.deps.db.query("DELETE FROM logbook_line WHERE programme_id = ?", [id])).rejects.toThrow(
    refused,
  );
});

describe("the logbook's page", () => {
  test("goes through all lines once, newest first, while new ones are added", async () => {
    const { agent, programme } = await on.asPerson("reviewer");
    for (let n = 1; n <= 5; n++) await write(programme.id, n);
    const path = `/api/programmes/${programme.id}/logbook`;
    const first = (await agent.get(`${path}?limit=2`).expect(200)).body;
    await write(programme.id, 6);
    const second = (await agent.get(`${path}?limit=2&cursor=${first.next}`)).body;
    const third = (await agent.get(`${path}?limit=2&cursor=${second.next}`)).body;
    const seen = [first, second, third].flatMap((page) =>
      page.lines.map((l: { sequence: number }) => l.sequence),
    );
    expect(seen).toEqual([5, 4, 3, 2, 1]);
    expect(third.next).toBeUndefined();
    expect(first.lines[0]).toMatchObject({
      actor: "Åsa Écrivaine 🌟",
      subject: "thing Thing 5",
      before: { a: [null, 0.1, "é"], b: 5 },
      after: { n: 5 },
    });
  });

  test("can be narrowed to one thing, and shows no other programme's lines", async () => {
    const { agent, programme } = await on.asPerson("lead");
    for (let n = 1; n <= 4; n++) await write(programme.id, n);
    await chainOf(3);
    const path = `/api/programmes/${programme.id}/logbook`;
    const subjects = async (query: string) =>
      (await agent.get(`${path}${query}`)).body.lines.map((l: { subject: string }) => l.subject);
    expect(await subjects("?subject=thing:1")).toEqual(["thing Thing 3", "thing Thing 1"]);
    expect(await subjects("?subject=list")).toEqual([]);
    expect(await subjects("")).toHaveLength(4);
  });
});
