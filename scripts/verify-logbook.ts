import { parseArgs } from "node:util";
import { readSettings } from "#server/config.ts";
import { type ChainReport, verifyLogbook } from "#server/logbook/verify.ts";
import { withInstallationDatabase } from "./lib/installation-database.ts";
import { describeTrouble } from "./lib/trouble.ts";

const describe = ({ programmeId, lines, fault }: ChainReport): string => {
  const chain = programmeId === "0" ? "The installation" : `Programme ${programmeId}`;
  return fault ? `${chain}: ${fault}; the ${lines} before it fit.` : `${chain}: all ${lines} lines fit.`;
};

const run = async (): Promise<number> => {
  const { values } = parseArgs({ options: { programme: { type: "string" } } });
  const reports = await withInstallationDatabase(readSettings(process.env), (db) =>
    verifyLogbook(db, values.programme),
  );
  for (const report of reports) console.log(describe(report));
  return reports.some((report) => report.fault !== null) ? 1 : 0;
};

run().then(
  (code) => process.exit(code),
  (error: unknown) => {
    console.error(describeTrouble(error));
    process.exit(2);
  },
);
