import { Writable } from "node:stream";
import { expect, test } from "vitest";
import { createLog } from "#server/log.ts";

const logged = (write: (log: ReturnType<typeof createLog>) => void): string => {
  let text = "";
  const sink = new Writable({
    write(chunk, _encoding, done) {
      text += chunk;
      done();
    },
  });
  write(createLog("debug", "test", sink));
  return text;
};

test("no secret reaches the log, however deep it lies", () => {
  const text = logged((log) => {
    const cause = Object.assign(new Error("mariadb://team:sesame@db refused"), { sql: "SELECT 'sesame'" });
    log.error("database", "Lost mariadb://team:sesame@db/stars", {
      error: new Error("It failed", { cause }),
      request: { headers: { cookie: "sesame", Authorization: "sesame", "x-csrf-token": "sesame" } },
      list: [{ newPassword: "sesame", resetToken: "sesame", sessionSecret: "sesame" }],
    });
  });
  expect(text).not.toContain("sesame");
  expect(text).toContain("It failed");
  expect(text).toContain("[hidden]@db");
});

test("a line says when, which process, what about and what", () => {
  const line = JSON.parse(logged((log) => log.info("job", "Done", { rows: 5n })));
  expect(line).toMatchObject({ service: "test", category: "job", msg: "Done", rows: "5" });
  expect(line.time).toMatch(/^\d{4}-\d\d-\d\dT.*Z$/);
});
