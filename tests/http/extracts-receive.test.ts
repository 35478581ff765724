import { createHash } from "node:crypto";
import { request } from "node:http";
import { Readable } from "node:stream";
import { beforeAll, describe, expect, test } from "vitest";
import { StorageFullError } from "#server/storage/storage-errors.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { extractsUrl, planOf, receive, savePlan } from "#tests/support/extracts.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp({ uploadBytes: 100_000, logLevel: "silent" });
});

const TABLE = "source_id,ra,dec,epoch,plx\n1,100.5,20.5,2016,50\n2,200.5,20.5,2016,40\n";

const announce = async (bytes: number) => {
  const { agent, programme, session } = await app.asPerson("curator");
  const answer = await agent
    .post(extractsUrl(programme))
    .send({ name: "Stars", fileName: 'st"ars\u00e9.csv', bytes, origin: "by hand" })
    .expect(201);
  const url = `${extractsUrl(programme)}/${answer.body.extract.id}`;
  return { agent, programme, session, extract: answer.body.extract, url };
};

const state = async ({ agent, url }: Awaited<ReturnType<typeof announce>>) =>
  (await agent.get(url).expect(200)).body.extract;

describe("the original", () => {
  test("is kept untouched, with its hash, and can be had again", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const bytes = Buffer.from(`\ufeff${TABLE}`.replaceAll("\n", "\r\n"));
    const { extract, preview } = await receive(agent, programme, bytes);
    expect(extract).toMatchObject({ number: 1, state: "planning", receivedBytes: bytes.length });
    expect(extract.sha256).toBe(createHash("sha256").update(bytes).digest("hex"));
    expect(preview.columns[0]).toMatchObject({ header: "source_id", means: "source_id" });
    const answer = await agent
      .get(`${extractsUrl(programme)}/${extract.id}/original`)
      .buffer(true)
      .parse((res, done) => {
        const pieces: Buffer[] = [];
        res.on("data", (piece: Buffer) => pieces.push(piece));
        res.on("end", () => done(null, Buffer.concat(pieces)));
      });
    expect(answer.body.equals(bytes)).toBe(true);
    expect(answer.headers["content-disposition"]).toContain("attachment");
  });

  test("whose bytes are here already is refused, naming where", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const first = await receive(agent, programme, TABLE, "First");
    const made = await agent
      .post(extractsUrl(programme))
      .send({ name: "Again", fileName: "b.csv", bytes: TABLE.length, origin: "" });
    const url = `${extractsUrl(programme)}/${made.body.extract.id}`;
    const answer = await agent
      .put(`${url}/original`)
      .type("application/octet-stream")
      .send(Buffer.from(TABLE))
      .expect(409);
    expect(answer.body.error.code).toBe("extract-already-here");
    expect(answer.body.error.message).toContain("extract 1, “First”");
    expect(answer.body.error.details).toEqual({ extractId: first.extract.id, number: 1 });
    const other = await app.asPerson("curator");
    await receive(other.agent, other.programme, TABLE);
  });

  test("above the limit is stopped at the limit, whatever was announced", async () => {
    const made = await announce(50_000);
    const big = Buffer.alloc(300_000, "1,2\n");
    const answer = await made.agent
      .put(`${made.url}/original`)
      .type("application/octet-stream")
      .send(big)
      .expect(413);
    expect(answer.body.error.message).toContain("larger than");
    expect(answer.body.error.hint).toBeTruthy();
    expect(await state(made)).toMatchObject({ state: "receiving", sha256: null });
    await made.agent.get(`${made.url}/original`).expect(404);
  });

  test("sent in pieces of unknown length is stopped at the limit too", async () => {
    const made = await announce(50_000);
    const address = await app.listen();
    const answer = await new Promise<{ status: number; text: string }>((resolve, reject) => {
      const put = request(
        `${address}${made.url}/original`,
        {
          method: "PUT",
          headers: {
            Cookie: `${made.session.cookie.name}=${made.session.cookie.value}`,
            "X-CSRF-Token": made.session.csrfToken,
            "Content-Type": "application/octet-stream",
          },
        },
        (res) => {
          let text = "";
          res.on("data", (piece: Buffer) => {
            text += piece.toString();
          });
          res.on("end", () => resolve({ status: res.statusCode ?? 0, text }));
        },
      );
      put.on("error", reject);
      Readable.from(Array.from({ length: 40 }, () => Buffer.alloc(10_000, 49))).pipe(put);
    });
    expect(answer.status).toBe(413);
    expect(answer.text).toContain("file-too-large");
  });

  test("that breaks off in the middle leaves nothing, says so, and can be sent again", async () => {
    const made = await announce(TABLE.length);
    const address = await app.listen();
    await new Promise<void>((resolve) => {
      const put = request(`${address}${made.url}/original`, {
        method: "PUT",
        headers: {
          Cookie: `${made.session.cookie.name}=${made.session.cookie.value}`,
          "X-CSRF-Token": made.session.csrfToken,
          "Content-Type": "application/octet-stream",
          "Content-Length": TABLE.length,
        },
      });
      put.on("error", () => resolve());
      put.write(TABLE.slice(0, 30), () => setTimeout(() => put.destroy(), 100));
    });
    await expect.poll(async () => (await state(made)).failure?.message).toContain("before the whole file");
    expect(await state(made)).toMatchObject({ state: "receiving", sha256: null });
    const again = await made.agent
      .put(`${made.url}/original`)
      .type("application/octet-stream")
      .send(Buffer.from(TABLE))
      .expect(200);
    expect(again.body.extract).toMatchObject({ state: "planning", failure: null });
  });

  test("shorter than announced is not taken for whole", async () => {
    const made = await announce(TABLE.length + 10);
    const answer = await made.agent
      .put(`${made.url}/original`)
      .type("application/octet-stream")
      .send(Buffer.from(TABLE))
      .expect(422);
    expect(answer.body.error.code).toBe("upload-incomplete");
    expect(await state(made)).toMatchObject({
      state: "receiving",
      failure: { hint: "Send the file again." },
    });
  });

  test("for which the disk has no room is refused with words, and nothing is kept", async () => {
    const made = await announce(TABLE.length);
    const { files } = app.deps;
    const write = files.write.bind(files);
    files.write = async () => {
      throw new StorageFullError();
    };
    const answer = await made.agent
      .put(`${made.url}/original`)
      .type("application/octet-stream")
      .send(Buffer.from(TABLE));
    files.write = write;
    expect(answer.status).toBe(507);
    expect(answer.body.error.message).toContain("no room");
    expect((await state(made)).failure.message).toContain("no room");
  });
});

describe("a wrong file", () => {
  const stops = async (content: string | Buffer) => {
    const { agent, programme } = await app.asPerson("curator");
    const received = await receive(agent, programme, content);
    const planned = await savePlan(agent, programme, received);
    const refusal = await agent
      .post(`${extractsUrl(programme)}/${received.extract.id}/commit`)
      .send({ version: planned.extract.version })
      .expect(422);
    expect(refusal.body.error.code).toBe("plan-not-ready");
    expect(refusal.body.error.hint).toBeTruthy();
    const found = received.preview.findings.filter((f) => f.level === "stop");
    for (const f of found) expect(f.hint).not.toBe("");
    return found.map((f) => f.code);
  };

  test.each<[string, string | Buffer, string]>([
    ["empty", "", "empty-file"],
    ["of blank lines", "\n\n  \n", "empty-file"],
    ["binary", Buffer.from(Array.from({ length: 4000 }, (_, i) => (i * 7919) % 256)), "not-a-table"],
    ["zipped", Buffer.concat([Buffer.from([0x1f, 0x8b, 8, 0]), Buffer.alloc(500, 200)]), "gzip-broken"],
    ["without rows", "source_id,ra,dec,epoch,plx\n", "header-only"],
    ["without rows or line end", "source_id,ra,dec,epoch,plx", "header-only"],
    ["without a usable column", "colour,shape\nred,round\nblue,square\n", "nothing-usable"],
    ["without names", "1,100.5,20.5\n2,101.5,20.5\n", "no-header"],
    ["cut off in the middle of a line", `${TABLE}3,300.5,2`, "file-cut-off"],
    ["cut off inside a quote", `${TABLE}3,300.5,20.5,2016,"5`, "file-cut-off"],
    [
      "whose identifiers a spreadsheet rounded",
      "source_id,plx\n3.14159E+18,5\n2.71828E+18,6\n",
      "damaged-identifiers",
    ],
    ["with half a position", "source_id,ra,plx\n1,100.5,5\n", "half-a-position"],
  ])("%s is stopped with words", async (_name, content, code) => {
    expect(await stops(content)).toContain(code);
  });

  test("that is sound but for its last line's missing end is fine", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const { preview } = await receive(agent, programme, TABLE.trimEnd());
    expect(preview.findings.filter((f) => f.level !== "note")).toEqual([]);
    expect(preview.sampledRows).toBe(2);
  });
});

describe("a plan", () => {
  test("cannot be committed before every question is answered", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const content =
      "id,ra,dec,plx[furlong],ks_m\n1,1.5,-80,5,9.1\n2,13.5,70,6,-999\n3,22.5,10,7,9.3\n4,2.5,10,7,9.4\n";
    const received = await receive(agent, programme, content);
    const open = received.preview.findings.filter((f) => f.level === "ask").map((f) => f.code);
    expect(open.sort()).toEqual(["blank-mark", "epoch-missing", "ra-unit", "unit-unknown"]);
    const plan = planOf(received.preview, { epoch: 2016, raUnit: "hour" });
    for (const card of plan.columns) {
      if (card.means === "parallax") card.unit = "mas";
      if (card.means === "ks_mag") card.blankMarks = ["-999"];
    }
    const url = `${extractsUrl(programme)}/${received.extract.id}`;
    const first = await savePlan(agent, programme, received);
    expect(first.findings.filter((f) => f.level === "ask")).toHaveLength(4);
    const answer = await agent.put(`${url}/plan`).send({ plan, version: first.extract.version }).expect(200);
    expect(answer.body.findings.filter((f: { level: string }) => f.level !== "note")).toEqual([]);
    await agent.put(`${url}/plan`).send({ plan, version: first.extract.version }).expect(409);
    await agent.post(`${url}/commit`).send({ version: answer.body.extract.version }).expect(202);
    await agent
      .post(`${url}/commit`)
      .send({ version: answer.body.extract.version + 1 })
      .expect(409);
    await agent.delete(url).expect(409);
  });

  test("lets one quantity come from one column alone", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const received = await receive(agent, programme, TABLE);
    for (const card of received.preview.columns) if (card.header === "plx") card.means = "ra";
    const { findings } = await savePlan(agent, programme, received);
    expect(findings.find((f) => f.code === "meaning-twice")?.message).toContain("“ra” and “plx”");
  });
});

test("an extract of another programme answers as one that does not exist", async () => {
  const { agent, programme } = await app.asPerson("curator");
  const { extract } = await receive(agent, programme, TABLE);
  const other = await app.asPerson("curator");
  const url = `${extractsUrl(other.programme)}/${extract.id}`;
  for (const path of ["", "/original", "/refused"]) await other.agent.get(`${url}${path}`).expect(404);
  await other.agent.delete(url).expect(404);
  await other.agent
    .put(`${url}/original`)
    .type("application/octet-stream")
    .send(Buffer.from("x"))
    .expect(404);
  await agent.delete(`${extractsUrl(programme)}/${extract.id}`).expect(204);
  await agent.get(`${extractsUrl(programme)}/${extract.id}`).expect(404);
});
