import { join } from "node:path";
import { DATABASE, type MariaDb, startMariaDb } from "./mariadb.ts";
import { commandOf } from "./processes.ts";
import { describeTrouble } from "./trouble.ts";

const LOOK_MS = 2_000;

/** The installation's own MariaDB under `var`, started again should it ever end while the product runs. */
export const startPrivateDatabase = async (
  varFolder: string,
): Promise<{ url: string; stop: () => Promise<void> }> => {
  const folder = join(varFolder, "mariadb");
  let server: MariaDb = await startMariaDb({ folder });
  let isBusy = false;
  const look = setInterval(async () => {
    if (isBusy || commandOf(server.pid) !== null) return;
    isBusy = true;
    process.stderr.write("MariaDB has ended; starting it again.\n");
    try {
      server = await startMariaDb({ folder });
    } catch (error) {
      process.stderr.write(`${describeTrouble(error)}\n`);
    }
    isBusy = false;
  }, LOOK_MS);
  const stop = async (): Promise<void> => {
    clearInterval(look);
    await server.stop();
  };
  return { url: server.url(DATABASE), stop };
};
