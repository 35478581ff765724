import { createServer, type Server, type Socket } from "node:net";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { JobRow } from "#server/database/entities/job.entity.ts";
import { Mail } from "#server/database/entities/mail.entity.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { sendMail } from "#server/mail/send.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson } from "#tests/support/factories.ts";

/** The few words of SMTP that taking a mail needs. `refuses` makes it turn every mail away for now. */
class MailServer {
  readonly received: string[] = [];
  refuses = false;
  private readonly server: Server = createServer((socket) => this.talk(socket));

  async listen(): Promise<string> {
    await new Promise<void>((resolve) => this.server.listen(0, "127.0.0.1", resolve));
    const address = this.server.address();
    return `smtp://127.0.0.1:${typeof address === "object" && address ? address.port : 0}`;
  }

  close(): Promise<void> {
    return new Promise((resolve) => this.server.close(() => resolve()));
  }

  private talk(socket: Socket): void {
    let message: string | null = null;
    let rest = "";
    socket.on("error", () => socket.destroy());
    socket.write("220 ready\r\n");
    socket.on("data", (data) => {
      rest += data.toString();
      for (let end = rest.indexOf("\r\n"); end >= 0; end = rest.indexOf("\r\n")) {
        const line = rest.slice(0, end);
        rest = rest.slice(end + 2);
        if (message === null) {
          if (line.startsWith("DATA")) message = "";
          socket.write(this.answer(line));
        } else if (line === ".") {
          this.received.push(message);
          message = null;
          socket.write("250 taken\r\n");
        } else message += `${line}\n`;
      }
    });
  }

  private answer(line: string): string {
    if (line.startsWith("DATA")) return "354 go on\r\n";
    if (line.startsWith("RCPT") && this.refuses) return "451 not now\r\n";
    if (line.startsWith("QUIT")) return "221 bye\r\n";
    return "250 fine\r\n";
  }
}

const server = new MailServer();
let on: TestApp;
let demo: TestApp;
beforeAll(async () => {
  on = await startTestApp({ smtpUrl: await server.listen(), isDemo: true });
  demo = await startTestApp({ smtpUrl: null, isDemo: true });
});
afterAll(() => server.close());

const askReset = async (app: TestApp) => {
  const person = await buildPerson(app.deps.db);
  await (await app.visitor()).post("/api/password-resets").send({ email: person.email }).expect(202);
  return person;
};

const mailTo = (email: string) => on.deps.db.manager.findOneByOrFail(Mail, { to: email });

const newestJob = async (): Promise<JobRow> => {
  const [job] = await on.deps.db.manager.find(JobRow, {
    where: { kind: "send-mail" },
    order: { id: "DESC" },
    take: 1,
  });
  if (!job) throw new Error("No mail was queued.");
  return job;
};

describe("with a mail server", () => {
  test("a mail is queued, sent by the worker, and its link is then kept nowhere", async () => {
    const person = await askReset(on);
    expect(await mailTo(person.email)).toMatchObject({ state: "queued" });
    expect(await runNextJob(on.deps)).toBe(true);
    const [text = ""] = server.received.splice(0);
    expect(text).toContain(`To: ${person.email}`);
    const token = text.replace(/=\n/g, "").match(/password-resets\/([\w-]{43})/)?.[1];
    expect(token).toBeDefined();
    expect(await mailTo(person.email)).toMatchObject({ state: "sent", body: "" });
    await (await on.visitor()).get(`/api/password-resets/${token}`).expect(200);
  });

  test("a mail turned away is tried again later, and has failed after the last attempt", async () => {
    const person = await askReset(on);
    server.refuses = true;
    await sendMail({ deps: on.deps, job: await newestJob() });
    expect(await mailTo(person.email)).toMatchObject({ state: "queued" });
    const again = await newestJob();
    expect(again.payload).toMatchObject({ attempt: 1 });
    expect(again.runAt.getTime()).toBeGreaterThan(Date.now() + 30_000);

    const last = { ...again, payload: { ...again.payload, attempt: 4 } } as JobRow;
    await expect(sendMail({ deps: on.deps, job: last })).rejects.toMatchObject({ code: "mail-not-sent" });
    expect(await mailTo(person.email)).toMatchObject({ state: "failed", body: "" });
    server.refuses = false;
    expect(server.received).toEqual([]);
  });

  test("a mail that was sent is not sent again by a second attempt", async () => {
    const person = await askReset(on);
    const job = await newestJob();
    await sendMail({ deps: on.deps, job });
    await sendMail({ deps: on.deps, job });
    expect(server.received.splice(0)).toHaveLength(1);
    expect(await mailTo(person.email)).toMatchObject({ state: "sent" });
  });

  test("there is no mailbox page", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
    expect((await agent.get("/api/mailbox")).status).toBe(404);
  });
});

describe("the mailbox of a demo installation", () => {
  test("shows its administrators the mails that were kept", async () => {
    const person = await askReset(demo);
    const { agent } = await demo.as(await buildPerson(demo.deps.db, { isInstallationAdministrator: true }));
    const { body } = await agent.get("/api/mailbox").expect(200);
    expect(body.mails[0]).toMatchObject({ to: person.email, state: "kept" });
    expect(body.mails[0].body).toContain("/password-resets/");
  });

  test("is nobody else's, and not there at all outside a demo", async () => {
    const { agent } = await demo.asPerson("administrator");
    expect((await agent.get("/api/mailbox")).status).toBe(403);
    const plain = await startTestApp({ smtpUrl: null, isDemo: false });
    const chief = await plain.as(await buildPerson(plain.deps.db, { isInstallationAdministrator: true }));
    expect((await chief.agent.get("/api/mailbox")).status).toBe(404);
  });
});
