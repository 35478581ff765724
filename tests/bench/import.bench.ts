import { createReadStream, createWriteStream, statSync } from "node:fs";
import { join } from "node:path";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import type { PoolConnection } from "mysql2";
import type { DataSource } from "typeorm";
import { Extract } from "#server/database/entities/extract.entity.ts";
import { astrometryExtract } from "#server/demo/extract-files.ts";
import type { Deps } from "#server/deps.ts";
import { previewOf } from "#server/extracts/preview.ts";
import { readSample } from "#server/extracts/read-sample.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { enqueueJob } from "#server/jobs/service.ts";
import { readingPlan } from "#shared/api/extracts.ts";
import { buildMember } from "#tests/support/factories.ts";
import { type Bench, timed } from "./harness.ts";

const SEED = 20_260_101;
const LINES = 1_000;
const LEAST_ACCEPTED = 0.99;
/** What the generator writes where an error of Ks is not known. */
const BLANK_MARK = "-999";

/** The generated extract, as the practice programme has it, of that many stars. */
function* text(stars: number): Generator<Buffer> {
  let lines: string[] = [];
  for (const line of astrometryExtract({ seed: SEED, from: 0, to: stars })) {
    lines.push(`${line}\n`);
    if (lines.length < LINES) continue;
    yield Buffer.from(lines.join(""));
    lines = [];
  }
  yield Buffer.from(lines.join(""));
}

/** The file given to the server as it is: no reading, matching, deriving or checking. */
const bareLoad = async (db: DataSource, path: string, header: string): Promise<void> => {
  const names = header.split(",");
  const definition = names.map(
    (n) => `\`${n}\` ${n === "source_id" || n === "designation" ? "varchar(120)" : "double"} NULL`,
  );
  await db.query(`CREATE TABLE bare_load (${definition.join(", ")}, KEY (source_id)) ENGINE=InnoDB`);
  const runner = db.createQueryRunner();
  const connection = (await runner.connect()) as PoolConnection;
  await new Promise<void>((resolve, reject) => {
    connection.query(
      {
        sql: "LOAD DATA LOCAL INFILE 'rows' INTO TABLE bare_load FIELDS TERMINATED BY ',' IGNORE 1 LINES",
        infileStreamFactory: () => createReadStream(path),
      },
      (error) => (error ? reject(error) : resolve()),
    );
  });
  await runner.release();
  await db.query("DROP TABLE bare_load");
};

/** An extract whose plan is as suggested, waiting for its import. */
const queueImport = async (deps: Deps, path: string): Promise<string> => {
  const { person, programme } = await buildMember(deps.db, { roles: ["curator"] });
  const key = `bench/${programme.id}/original`;
  const { bytes } = await deps.files.write(key, createReadStream(path));
  const preview = await previewOf(await readSample(deps.files, key, bytes));
  const columns = preview.columns.map((c) =>
    c.means === "ks_mag_err" ? { ...c, blankMarks: [BLANK_MARK] } : c,
  );
  const { id } = await deps.db.manager.save(
    deps.db.manager.create(Extract, {
      programmeId: programme.id,
      number: 1,
      name: "Bench",
      state: "importing",
      fileName: "bench.csv",
      bytes: String(bytes),
      originalKey: key,
      uploadedBy: person.id,
      plan: readingPlan.parse({ ...preview, columns, epoch: null, release: "", raUnit: null }),
      createdAt: deps.now(),
    }),
  );
  await enqueueJob(deps.db.manager, {
    programmeId: programme.id,
    personId: person.id,
    kind: "import-extract",
    payload: { extractId: id },
    subject: { type: "extract", id },
  });
  return id;
};

const bench: Bench = {
  name: "import",
  rows: 100_000,
  run: async ({ rows, deps, folder }) => {
    const path = join(folder, "stars.csv");
    await pipeline(Readable.from(text(rows), { objectMode: false }), createWriteStream(path));
    const [header] = astrometryExtract({ seed: SEED, from: 0, to: 0 });
    const bare = await timed(() => bareLoad(deps.db, path, header ?? ""));
    const id = await queueImport(deps, path);
    const whole = await timed(() => runNextJob(deps));
    const extract = await deps.db.manager.findOneByOrFail(Extract, { id });
    // A few rows are damaged or stand twice on purpose.
    if ((extract.rowsAccepted ?? 0) < rows * LEAST_ACCEPTED)
      throw new Error(
        `The import took ${extract.rowsAccepted ?? 0} of ${rows} rows. ${extract.failureMessage ?? ""}`,
      );
    const size = Math.round(statSync(path).size / 1e6);
    return [
      {
        what: `${rows.toLocaleString("en")} rows × 17 columns (${size} MB) from the file to a catalogue that can be cut`,
        value: whole / 1000,
        unit: "s",
        plain: { what: "bare LOAD DATA LOCAL INFILE of the same file", value: bare / 1000 },
      },
    ];
  },
};

export default bench;
