import { createServer } from "node:net";
import { expect, test } from "vitest";
import { freePort, requirePort } from "#scripts/lib/ports.ts";

test("a free port is accepted", async () => {
  await expect(requirePort("127.0.0.1", await freePort(), "PORT")).resolves.toBeUndefined();
});

test("a port that is taken is refused in one sentence that says what to set", async () => {
  const server = createServer();
  const port = await new Promise<number>((resolve) => {
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      resolve(typeof address === "object" && address ? address.port : 0);
    });
  });
  await expect(requirePort("127.0.0.1", port, "THE_PORT")).rejects.toThrow(
    new RegExp(`Port ${port} .* is in use .*THE_PORT=${port + 1}`),
  );
  server.close();
});

test("an address of another machine is refused by name", async () => {
  await expect(requirePort("192.0.2.1", 4400, "PORT")).rejects.toThrow(/192\.0\.2\.1 is not an address/);
});
