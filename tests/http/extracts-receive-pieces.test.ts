import { createHash } from "node:crypto";
import { readdirSync } from "node:fs";
import { request } from "node:http";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { Extract } from "#server/database/entities/extract.entity.ts";
import { removeUnfinishedUploads } from "#server/extracts/upload-unfinished.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { extractsUrl } from "#tests/support/extracts.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp({ uploadBytes: 100_000, logLevel: "silent" });
});

const TABLE = "source_id,ra,dec,epoch,plx\n1,100.5,20.5,2016,50\n2,200.5,20.5,2016,40\n";

const begin = async (bytes: number) => {
  const { agent, programme, session } = await app.asPerson("curator");
  const { body } = await agent
    .post(extractsUrl(programme))
    .send({ name: "Stars", fileName: "stars.csv", bytes, origin: "" })
    .expect(201);
  const id: string = body.extract.id;
  const url = `${extractsUrl(programme)}/${id}`;
  const put = (offset: number, piece: string | Buffer) =>
    agent
      .put(`${url}/original?offset=${offset}`)
      .type("application/octet-stream")
      .send(Buffer.from(piece as string));
  const state = async () => (await agent.get(url).expect(200)).body.extract;
  const folder = join(app.deps.config.folders.files, "programmes", programme.id, "extracts", id);
  const stored = () => readdirSync(folder);
  return { agent, programme, session, id, url, put, state, stored };
};

const original = async ({ agent, url }: Awaited<ReturnType<typeof begin>>, which = "original") =>
  (
    await agent
      .get(`${url}/${which}`)
      .buffer(true)
      .parse((res, done) => {
        const parts: Buffer[] = [];
        res.on("data", (part: Buffer) => parts.push(part));
        res.on("end", () => done(null, Buffer.concat(parts)));
      })
      .expect(200)
  ).body as Buffer;

describe("a file in pieces", () => {
  test("is whole after the last one, with the hash over all of it", async () => {
    const made = await begin(TABLE.length);
    const first = await made.put(0, TABLE.slice(0, 20)).expect(200);
    expect(first.body.preview).toBeNull();
    expect(first.body.extract).toMatchObject({ state: "receiving", receivedBytes: 20, sha256: null });
    await made.put(20, TABLE.slice(20, 50)).expect(200);
    const last = await made.put(50, TABLE.slice(50)).expect(200);
    expect(last.body.extract).toMatchObject({ state: "planning", receivedBytes: TABLE.length });
    expect(last.body.extract.sha256).toBe(createHash("sha256").update(TABLE).digest("hex"));
    expect(last.body.preview.columns[0].header).toBe("source_id");
    expect((await original(made)).toString()).toBe(TABLE);
    expect(made.stored()).toHaveLength(1);
    const after = await made.put(TABLE.length, "").expect(409);
    expect(after.body.error.code).toBe("file-already-received");
  });

  test("goes on from where the server says", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 20)).expect(200);
    for (const offset of [10, 21, 60]) {
      const { body } = await made.put(offset, TABLE.slice(offset, offset + 15)).expect(409);
      expect(body.error).toMatchObject({ code: "upload-offset", details: { receivedBytes: 20 } });
    }
    await made.put(20, TABLE.slice(20)).expect(200);
    expect((await original(made)).toString()).toBe(TABLE);
  });

  test("knows a piece that came before, and another file by it", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 40)).expect(200);
    const again = await made.put(0, TABLE.slice(0, 40)).expect(200);
    expect(again.body.extract.receivedBytes).toBe(40);
    const other = await made.put(0, TABLE.slice(0, 40).replace("ra", "RA")).expect(409);
    expect(other.body.error).toMatchObject({
      code: "other-file",
      hint: expect.stringContaining("new extract"),
    });
    await made.put(40, TABLE.slice(40)).expect(200);
    expect((await original(made)).toString()).toBe(TABLE);
  });

  test("that breaks off keeps the pieces that are whole", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 20)).expect(200);
    const address = await app.listen();
    await new Promise<void>((resolve) => {
      const put = request(`${address}${made.url}/original?offset=20`, {
        method: "PUT",
        headers: {
          Cookie: `${made.session.cookie.name}=${made.session.cookie.value}`,
          "X-CSRF-Token": made.session.csrfToken,
          "Content-Type": "application/octet-stream",
          "Content-Length": TABLE.length - 20,
        },
      });
      put.on("error", () => resolve());
      put.write(TABLE.slice(20, 30), () => setTimeout(() => put.destroy(), 100));
    });
    await expect.poll(() => made.stored()).toEqual(["original-of-pieces"]);
    expect(await made.state()).toMatchObject({ state: "receiving", receivedBytes: 20, failure: null });
    await made.put(20, TABLE.slice(20)).expect(200);
    expect((await original(made)).toString()).toBe(TABLE);
  });

  test("takes one of two pieces for the same place", async () => {
    const made = await begin(TABLE.length);
    const answers = await Promise.all([made.put(0, TABLE.slice(0, 30)), made.put(0, TABLE.slice(0, 40))]);
    expect(answers.map((a) => a.status).sort()).toSatisfy(
      (s: number[]) => s.join() === "200,409" || s.join() === "200,200",
    );
    const { receivedBytes } = await made.state();
    await made.put(receivedBytes, TABLE.slice(receivedBytes)).expect(200);
    expect((await original(made)).toString()).toBe(TABLE);
  });

  test("goes on from what is really there when more was noted than kept", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 20)).expect(200);
    await app.deps.db.manager.update(Extract, made.id, { receivedBytes: "35" });
    const { body } = await made.put(35, TABLE.slice(35)).expect(409);
    expect(body.error.details).toEqual({ receivedBytes: 20 });
    await made.put(20, TABLE.slice(20)).expect(200);
  });

  test("is not taken beyond what was announced, nor in pieces too large", async () => {
    const made = await begin(40);
    await made.put(0, TABLE.slice(0, 30)).expect(200);
    expect((await made.put(30, TABLE.slice(30)).expect(422)).body.error.code).toBe("upload-too-long");
    expect(await made.state()).toMatchObject({ receivedBytes: 30 });
    const big = await made.put(30, Buffer.alloc(9 * 1024 ** 2)).expect(413);
    expect(big.body.error).toMatchObject({ code: "piece-too-large", hint: "Send smaller pieces." });
    const larger = await begin(100_001);
    expect((await larger.put(0, "1").expect(413)).body.error.code).toBe("file-too-large");
  });

  test("of no bytes is whole at once", async () => {
    const made = await begin(0);
    const { body } = await made.put(0, "").expect(200);
    expect(body.extract).toMatchObject({ state: "planning", receivedBytes: 0 });
  });

  test("whose bytes are here already leads to the extract that has them, and leaves nothing", async () => {
    const first = await begin(TABLE.length);
    await first.put(0, TABLE).expect(200);
    const { body } = await first.agent
      .post(extractsUrl(first.programme))
      .send({ name: "Again", fileName: "stars.csv", bytes: TABLE.length, origin: "" });
    const url = `${extractsUrl(first.programme)}/${body.extract.id}`;
    const put = (offset: number, piece: string) =>
      first.agent
        .put(`${url}/original?offset=${offset}`)
        .type("application/octet-stream")
        .send(Buffer.from(piece));
    await put(0, TABLE.slice(0, 30)).expect(200);
    const same = await put(30, TABLE.slice(30)).expect(409);
    expect(same.body.error).toMatchObject({
      code: "extract-already-here",
      details: { extractId: first.id, number: 1 },
    });
    const { extract } = (await first.agent.get(url)).body;
    expect(extract).toMatchObject({ state: "receiving", receivedBytes: 0 });
  });

  test("deleted on the way leaves nothing", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 20)).expect(200);
    await made.agent.delete(made.url).expect(204);
    expect(made.stored()).toEqual([]);
    await made.put(20, TABLE.slice(20)).expect(404);
  });
});

describe("an upload that nobody goes on with", () => {
  const inDays = (days: number) => ({
    ...app.deps,
    now: () => new Date(app.deps.now().getTime() + days * 24 * 3600 * 1000),
  });

  test("is kept for a week, then its bytes are removed and the extract says so", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE.slice(0, 20)).expect(200);
    await removeUnfinishedUploads(inDays(6.9));
    expect(await made.state()).toMatchObject({ receivedBytes: 20, failure: null });
    await removeUnfinishedUploads(inDays(7.1));
    expect(made.stored()).toEqual([]);
    const extract = await made.state();
    expect(extract).toMatchObject({ state: "receiving", receivedBytes: 0 });
    expect(extract.failure.message).toContain("28 % of the file had arrived");
    await made.put(0, TABLE).expect(200);
    expect(await made.state()).toMatchObject({ state: "planning", failure: null });
  });

  test("a whole file stays", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE).expect(200);
    await removeUnfinishedUploads(inDays(30));
    expect((await original(made)).toString()).toBe(TABLE);
  });
});

describe("a description beside the table", () => {
  const describeIt = (made: Awaited<ReturnType<typeof begin>>, text: string, name = "ReadMe") =>
    made.agent
      .put(`${made.url}/companion?name=${encodeURIComponent(name)}`)
      .type("application/octet-stream")
      .send(Buffer.from(text));

  test("is kept untouched in the same extract", async () => {
    const made = await begin(TABLE.length);
    const text = "Byte-by-byte Description of file: table3.dat\r\n";
    const { body } = await describeIt(made, text).expect(200);
    expect(body.extract.companion).toEqual({
      fileName: "ReadMe",
      bytes: text.length,
      sha256: createHash("sha256").update(text).digest("hex"),
    });
    await made.put(0, TABLE).expect(200);
    expect((await original(made, "companion")).toString()).toBe(text);
    expect((await original(made)).toString()).toBe(TABLE);
  });

  test("that comes after the table opens the plan anew; another takes its place", async () => {
    const made = await begin(TABLE.length);
    await made.put(0, TABLE).expect(200);
    await describeIt(made, "first", "Read Me.txt").expect(200);
    const { body } = await describeIt(made, "second").expect(200);
    expect(body.extract).toMatchObject({ state: "planning", plan: null, companion: { fileName: "ReadMe" } });
    expect(body.preview).not.toBeNull();
    expect(made.stored()).toHaveLength(2);
    const without = await made.agent.delete(`${made.url}/companion`).expect(200);
    expect(without.body.extract).toMatchObject({ state: "planning", companion: null });
    expect(without.body.preview.columns[0].header).toBe("source_id");
    expect(made.stored()).toHaveLength(1);
    await made.agent.delete(`${made.url}/companion`).expect(404);
    await made.agent.delete(made.url).expect(204);
    expect(made.stored()).toEqual([]);
  });

  test("is limited, and there is none before it has come", async () => {
    const made = await begin(TABLE.length);
    await made.agent.get(`${made.url}/companion`).expect(404);
    await describeIt(made, "x".repeat(9 * 1024 ** 2)).expect(413);
    await made.agent.put(`${made.url}/companion`).expect(400);
    expect((await made.state()).companion).toBeNull();
  });
});
