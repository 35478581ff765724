import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { bringIn, commit, extractsUrl, receive, runJobs } from "#tests/support/extracts.ts";
import { buildProgramme } from "#tests/support/factories.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const PRACTICE = `name,source_id,ra,dec,ref_epoch,plx,e_plx,Ks,e_Ks,Teff,card_mag
A,3141592653589793239,150.1,-12.5,2016.0,60.00,0.05,7.912,0.02,3350,10.2
B,1234567890123456789,200.2,40.25,2016.0,81.30,0.05,9.431,0.02,2950,12.4
C,6917529027641081857,310.3,-0.5,2016.0,38.50,0.05,6.850,0.02,3650,9.1
`;

type Row = Record<string, number | string | null>;
const starsOf = (programme: Programme): Promise<Row[]> =>
  app.deps.db.query(
    `SELECT s.* FROM star s JOIN programme p ON p.programme_id = s.programme_id
     WHERE s.programme_id = ? AND s.from_edition <= p.edition AND (s.to_edition IS NULL OR s.to_edition > p.edition)
     ORDER BY s.designation`,
    [programme.id],
  );
const editionOf = async (
  programme: Programme,
): Promise<{ edition: number; rows: string; entries: string }> => {
  const [row] = await app.deps.db.query(
    `SELECT edition, (SELECT COUNT(*) FROM star s WHERE s.programme_id = p.programme_id) AS \`rows\`,
       (SELECT COUNT(*) FROM entry e WHERE e.programme_id = p.programme_id) AS entries
     FROM programme p WHERE programme_id = ?`,
    [programme.id],
  );
  return row;
};
const curator = async () => {
  const programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  return { ...(await app.asPerson("curator", programme)), programme };
};

describe("from a file to stars", () => {
  test("the practice stars come out to the printed digits, with their identifiers whole", async () => {
    const { agent, programme } = await curator();
    const extract = await bringIn(app.deps, agent, programme, PRACTICE, {}, "Practice");
    expect(extract.failure).toBeNull();
    expect(extract).toMatchObject({
      state: "committed",
      edition: 1,
      newStars: 3,
      rows: { read: 3, accepted: 3, refused: 0, skipped: 0 },
    });
    const [a, b, c] = await starsOf(programme);
    expect(a?.source_id).toBe("3141592653589793239");
    expect(b?.source_id).toBe("1234567890123456789");
    const digits = (star: Row | undefined, key: string, n: number): string => Number(star?.[key]).toFixed(n);
    expect([a, b, c].map((s) => digits(s, "abs_ks", 3))).toEqual(["6.803", "8.981", "4.777"]);
    expect([a, b, c].map((s) => digits(s, "radius", 4))).toEqual(["0.3344", "0.1452", "0.6533"]);
    expect([a, b, c].map((s) => digits(s, "mass", 4))).toEqual(["0.3162", "0.1182", "0.6294"]);
    expect([a, b, c].map((s) => digits(s, "luminosity", 5))).toEqual(["0.01269", "0.00144", "0.06825"]);
    expect([a, b, c].map((s) => digits(s, "hz_inner", 4))).toEqual(["0.1169", "0.0395", "0.2701"]);
    expect([a, b, c].map((s) => digits(s, "earth_period", 2))).toEqual(["24.55", "7.85", "61.48"]);
    expect([a, b, c].map((s) => digits(s, "earth_depth", 0))).toEqual(["752", "3985", "197"]);
  });

  test("rows read are accepted, refused or skipped, and the refused ones can be had with their reasons", async () => {
    const { agent, programme } = await curator();
    const content = [
      "source_id,designation,ra,dec,epoch,plx,Ks",
      "11,Star one,100.5,20.5,2016,50,8.1",
      "",
      "11,Star one again,100.5,20.5,2016,50,8.1",
      "12,Short,100.5",
      "13,Long,100.5,20.5,2016,50,8.1,9",
      '14,"Quoted, name",100.5,20.5,2016,50,8.1',
      "15,Odd,100.5,20.5,2016,fifty,8.1",
      "16,Polar,100.5,95,2016,50,8.1",
      "17,Minus,100.5,\u221220.5,2016,-0.3,8.1",
      "18,Blank,100.5,20.5,2016,--,8.1",
      "",
    ].join("\n");
    const extract = await bringIn(app.deps, agent, programme, content);
    expect(extract.failure).toBeNull();
    expect(extract.rows).toEqual({ read: 10, accepted: 4, refused: 4, skipped: 2 });
    const stars = await starsOf(programme);
    expect(stars.map((s) => [s.designation, s.dec, s.parallax])).toEqual([
      ["Blank", 20.5, null],
      ["Minus", -20.5, -0.3],
      ["Quoted, name", 20.5, 50],
      ["Star one", 20.5, 50],
    ]);
    const csv = await agent.get(`${extractsUrl(programme)}/${extract.id}/refused`).expect(200);
    expect(csv.text).toContain('5,"This row has 3 values; the table has 7 columns.');
    expect(csv.text).toContain("“fifty” in plx is not a number.");
    expect(csv.text).toContain("Skipped: an earlier row");
    expect(csv.text.trim().split("\r\n")).toHaveLength(6);
  });

  test("a second extract meets the same stars, and the newer one is preferred group by group", async () => {
    const { agent, programme } = await curator();
    await bringIn(app.deps, agent, programme, PRACTICE);
    const second = `name,source_id,ra,dec,ref_epoch,plx,e_plx,e_Ks
a,3141592653589793239,150.2,-12.5,2020.0,61.00,0.04,0.5
D,42,10.5,10.5,2020.0,12.0,0.04,
`;
    const extract = await bringIn(app.deps, agent, programme, second, {}, "Second");
    expect(extract).toMatchObject({ state: "committed", edition: 2, newStars: 1 });
    const stars = await starsOf(programme);
    expect(stars).toHaveLength(4);
    const a = stars.find((s) => s.source_id === "3141592653589793239");
    expect(a).toMatchObject({
      parallax: 61,
      parallax_err: 0.04,
      ra: 150.2,
      epoch: 2020,
      ks_mag: 7.912,
      ks_mag_err: 0.02,
    });
    expect(a).toMatchObject({ from_edition: 2, to_edition: null });
    expect(stars.find((s) => s.designation === "B")).toMatchObject({ from_edition: 1, to_edition: null });
  });

  test("rows without an identifier are matched by their name in any spelling, component letters respected", async () => {
    const { agent, programme } = await curator();
    await bringIn(
      app.deps,
      agent,
      programme,
      "name,ra,dec,epoch,plx\nBD+23 3912,100.5,20.5,2016,50\nX 115404,101.5,20.5,2016,50\n",
    );
    const extract = await bringIn(app.deps, agent, programme, "name,Teff\nBD+23_3912,5000\nX 115404A,4000\n");
    expect(extract).toMatchObject({ state: "committed", newStars: 1 });
    const teffs = (await starsOf(programme)).map((s) => s.teff_given);
    expect(teffs.sort()).toEqual([4000, 5000, null]);
  });

  test("withdrawing an extract gives the catalogue back as it was before, to the fingerprint", async () => {
    const { agent, programme } = await curator();
    const url = `/api/programmes/${programme.id}/catalogue`;
    await bringIn(app.deps, agent, programme, PRACTICE);
    const before = (await agent.get(url).expect(200)).body.catalogue;
    const second = await bringIn(
      app.deps,
      agent,
      programme,
      "source_id,plx,e_plx\n3141592653589793239,61,0.04\n77,9,0.1\n",
    );
    expect((await starsOf(programme)).length).toBe(4);
    await agent.post(`${extractsUrl(programme)}/${second.id}/withdraw`).expect(202);
    await runJobs(app.deps);
    const after = (await agent.get(url).expect(200)).body.catalogue;
    expect(after.edition).toBe(3);
    expect(after.editions[0]).toMatchObject({ stars: 3, fingerprint: before.editions[0].fingerprint });
    expect(after.editions[1].fingerprint).not.toBe(before.editions[0].fingerprint);
    expect((await starsOf(programme)).map((s) => s.parallax)).toEqual([60, 81.3, 38.5]);
    const answer = await agent.get(`${extractsUrl(programme)}/${second.id}`).expect(200);
    expect(answer.body.extract.state).toBe("withdrawn");
  });
});

describe("an import that does not come to its end", () => {
  const rows = (from: number, n: number): string =>
    Array.from(
      { length: n },
      (_, i) => `${from + i},${(i % 350) + 0.5},${(i % 80) + 0.25},2016,${10 + (i % 50)},0.1,9.5`,
    ).join("\n");
  const HEADER = "source_id,ra,dec,epoch,plx,e_plx,Ks\n";

  /** Stops the process's work when the phase comes, as a killed worker would: nothing is cleaned. */
  const interrupt = async (phase: string, how: "kill" | "fail" | "cancel") => {
    const { agent, programme } = await curator();
    await bringIn(app.deps, agent, programme, PRACTICE);
    const before = await editionOf(programme);
    const received = await receive(agent, programme, `${HEADER}${rows(1000, 12_000)}\n`);
    const { job } = await commit(agent, programme, received);
    const { db } = app.deps;
    const original = db.query.bind(db);
    const manager = db.manager.query.bind(db.manager);
    let hit = false;
    db.manager.query = (async (sql: string, parameters?: unknown[]) => {
      if (!hit && sql.startsWith("UPDATE job SET done") && parameters?.[2] === phase) {
        hit = true;
        if (how === "cancel")
          await original("UPDATE job SET cancel_requested = 1 WHERE job_id = ?", [job.id]);
        if (how === "kill")
          await original("UPDATE job SET lease_owner = 'killed' WHERE job_id = ?", [job.id]);
        if (how === "fail") throw Object.assign(new Error("disk"), { code: "ER_DISK_FULL" });
        if (how === "cancel") await new Promise((resolve) => setTimeout(resolve, 1_600));
      }
      return manager(sql, parameters);
    }) as typeof db.manager.query;
    try {
      const { runNextJob } = await import("#server/jobs/runner.ts");
      await runNextJob(app.deps);
    } finally {
      db.manager.query = manager as typeof db.manager.query;
    }
    expect(hit).toBe(true);
    const state = async () =>
      (await agent.get(`${extractsUrl(programme)}/${received.extract.id}`)).body.extract;
    return { agent, programme, before, state, job, received };
  };

  test.each(["Reading rows", "Matching", "Deriving", "Preparing the table", "Finishing"])(
    "by a cancel while %s leaves the catalogue as it was and the plan open",
    async (phase) => {
      const { programme, before, state } = await interrupt(phase, "cancel");
      expect(await editionOf(programme)).toEqual(before);
      expect(await state()).toMatchObject({ state: "planning", failure: null, job: { state: "cancelled" } });
    },
  );

  test("by a full disk says so, and the same plan can be committed again", async () => {
    const { agent, programme, before, state, received } = await interrupt("Deriving", "fail");
    expect(await editionOf(programme)).toEqual(before);
    const failed = await state();
    expect(failed.state).toBe("planning");
    expect(failed.failure.message).toContain("disk is full");
    expect(failed.failure.hint).toBeTruthy();
    await agent
      .post(`${extractsUrl(programme)}/${received.extract.id}/commit`)
      .send({ version: failed.version })
      .expect(202);
    await runJobs(app.deps);
    expect(await state()).toMatchObject({ state: "committed", newStars: 12_000, failure: null });
  });

  test.each(["Reading rows", "Deriving", "Finishing"])(
    "because its worker was killed while %s is taken up by another and comes out the same",
    async (phase) => {
      const { programme, before, state, job } = await interrupt(phase, "kill");
      expect((await editionOf(programme)).edition).toBe(before.edition);
      expect(await starsOf(programme)).toHaveLength(3);
      await app.deps.db.query(
        "UPDATE job SET lease_until = UTC_TIMESTAMP(6) - INTERVAL 1 SECOND WHERE job_id = ?",
        [job.id],
      );
      await runJobs(app.deps);
      expect(await state()).toMatchObject({
        state: "committed",
        rows: { read: 12_000, accepted: 12_000, refused: 0, skipped: 0 },
      });
      expect(await starsOf(programme)).toHaveLength(12_003);
      expect(await editionOf(programme)).toEqual({ edition: 2, rows: "12003", entries: "12003" });
    },
  );
});
