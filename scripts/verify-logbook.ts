import { parseArgs } from "node:util";
import { ConfigError, loadConfig } from "#server/config.ts";
import { createDataSource } from "#server/database/data-source.ts";
import { type ChainReport, verifyLogbook } from "#server/logbook/verify.ts";

const describe = ({ programmeId, lines, fault }: ChainReport): string => {
  const chain = programmeId === "0" ? "The installation" : `Programme ${programmeId}`;
  return fault ? `${chain}: ${fault}; ${lines} lines before it fit.` : `${chain}: all ${lines} lines fit.`;
};

const run = async (): Promise<number> => {
  const { values } = parseArgs({ options: { programme: { type: "string" } } });
  const db = await createDataSource(loadConfig(process.env).databaseUrl, 1).initialize();
  try {
    const reports = await verifyLogbook(db, values.programme);
    for (const report of reports) console.log(describe(report));
    return reports.some((report) => report.fault) ? 1 : 0;
  } finally {
    await db.destroy();
  }
};

run().then(
  (code) => process.exit(code),
  (error: unknown) => {
    console.error(
      error instanceof ConfigError ? error.message : `The logbook could not be read: ${String(error)}`,
    );
    process.exit(2);
  },
);
