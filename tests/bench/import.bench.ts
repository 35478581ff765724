import { createReadStream, createWriteStream, statSync } from "node:fs";
import { join } from "node:path";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import type { PoolConnection } from "mysql2";
import type { DataSource } from "typeorm";
import { Extract } from "#server/database/entities/extract.entity.ts";
import type { Deps } from "#server/deps.ts";
import { previewOf } from "#server/extracts/preview.ts";
import { readSample } from "#server/extracts/sample.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { enqueueJob } from "#server/jobs/service.ts";
import { readingPlan } from "#shared/api/extracts.ts";
import { buildMember } from "#tests/support/factories.ts";
import { type Bench, timed } from "./harness.ts";

const COLUMNS =
  "source_id,designation,ra,dec,ref_epoch,parallax,parallax_error,pmra,pmra_error,pmdec,pmdec_error,phot_g_mean_mag,ks_mag,ks_mag_err,teff,ruwe";
const LINES = 1_000;

/** Invented stars, spread evenly enough to be inside every relation. */
const lineOf = (i: number): string => {
  const u = ((i * 7919) % 104_729) / 104_729;
  const id = 6_000_000_000_000_000_000n + BigInt(i) * 7919n;
  return `${id},Star ${i},${359 * u},${160 * u - 80},2016.0,${10 + 50 * u},0.05,${300 * u},0.03,${-200 * u},0.03,${9 + 5 * u},${7 + 3 * u},0.02,${3000 + 900 * u},${0.9 + u}\n`;
};

function* text(rows: number): Generator<Buffer> {
  yield Buffer.from(`${COLUMNS}\n`);
  for (let from = 0; from < rows; from += LINES) {
    const count = Math.min(LINES, rows - from);
    yield Buffer.from(Array.from({ length: count }, (_, i) => lineOf(from + i)).join(""));
  }
}

/** The file given to the server as it is: no reading, matching, deriving or checking. */
const bareLoad = async (db: DataSource, path: string): Promise<void> => {
  const names = COLUMNS.split(",");
  const definition = names.map(
    (n) => `\`${n}\` ${n === "source_id" || n === "designation" ? "varchar(120)" : "double"}`,
  );
  await db.query(`CREATE TABLE bare_load (${definition.join(", ")}, PRIMARY KEY (source_id)) ENGINE=InnoDB`);
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
      plan: readingPlan.parse({ ...preview, epoch: null, release: "", raUnit: null }),
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
    const bare = await timed(() => bareLoad(deps.db, path));
    const id = await queueImport(deps, path);
    const whole = await timed(() => runNextJob(deps));
    const extract = await deps.db.manager.findOneByOrFail(Extract, { id });
    if (extract.rowsAccepted !== rows)
      throw new Error(`The import took ${extract.rowsAccepted} of ${rows} rows.`);
    const size = Math.round(statSync(path).size / 1e6);
    return [
      {
        what: `${rows.toLocaleString("en")} rows × 16 columns (${size} MB) from the file to a catalogue that can be cut`,
        value: whole / 1000,
        unit: "s",
        plain: { what: "bare LOAD DATA LOCAL INFILE of the same file", value: bare / 1000 },
      },
    ];
  },
};

export default bench;
