import { parseArgs } from "node:util";
import { readSettings } from "#server/config.ts";
import { makeInstallationAdministrator } from "#server/people/installation-administrator.ts";
import { email as emailSchema } from "#shared/api/session.ts";
import { withInstallationDatabase } from "./lib/installation-database.ts";
import { describeTrouble, Trouble } from "./lib/trouble.ts";

const USAGE = "npm run administrator -- --email name@example.org --name 'Full Name'";

const run = async (): Promise<void> => {
  const { values } = parseArgs({ options: { email: { type: "string" }, name: { type: "string" } } });
  const email = emailSchema.safeParse(values.email);
  const name = values.name?.trim();
  if (!email.success || !name) throw new Trouble(`An e-mail address and a name are needed: ${USAGE}`);
  const settings = readSettings(process.env);
  const link = await withInstallationDatabase(settings, (db) =>
    makeInstallationAdministrator(
      { config: { ...settings, databaseUrl: "" }, db, now: () => new Date() },
      { email: email.data, name },
    ),
  );
  console.log(`${name} administers this installation. Choose a password here, within an hour:\n${link}`);
};

run().catch((error: unknown) => {
  console.error(describeTrouble(error));
  process.exit(1);
});
