import { createReadStream, createWriteStream, statSync } from "node:fs";
import { join } from "node:path";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import type { PoolConnection } from "mysql2";
import type { DataSource } from "typeorm";
import { encodeRow } from "#server/database/bulk.ts";
import { Extract } from "#server/database/entities/extract.entity.ts";
import { JobRow } from "#server/database/entities/job.entity.ts";
import { readArrays } from "#server/database/rows.ts";
import { astrometryExtract } from "#server/demo/extract-files.ts";
import type { Deps } from "#server/deps.ts";
import { EntryMapper } from "#server/extracts/entry-mapper.ts";
import { loadEntries } from "#server/extracts/load-entries.ts";
import { previewOf } from "#server/extracts/preview.ts";
import { readSample } from "#server/extracts/read-sample.ts";
import type { JobRun } from "#server/jobs/job-run.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { enqueueJob } from "#server/jobs/service.ts";
import { readingPlan } from "#shared/api/extracts.ts";
import { buildMember } from "#tests/support/factories.ts";
import { type BinaryColumn, type BinaryRow, fitsTable, votableTable } from "#tests/support/table-files.ts";
import { type Bench, type Measurement, timed } from "./harness.ts";

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

const TEXTS: Readonly<Record<string, number>> = { source_id: 19, designation: 32 };
const UNITS: Readonly<Record<string, string>> = {
  ra: "deg",
  dec: "deg",
  ref_epoch: "yr",
  parallax: "mas",
  parallax_error: "mas",
  pmra: "mas.yr-1",
  pmra_error: "mas.yr-1",
  pmdec: "mas.yr-1",
  pmdec_error: "mas.yr-1",
};

/** The same rows, cell by cell, for the binary formats. */
function* blocksOf(stars: number): Generator<BinaryRow[]> {
  const [head = ""] = astrometryExtract({ seed: SEED, from: 0, to: 0 });
  const isText = head.split(",").map((name) => name in TEXTS);
  let block: BinaryRow[] = [];
  for (const line of astrometryExtract({ seed: SEED, from: 0, to: stars })) {
    const cells = line.split(",");
    if (line === head || cells.length !== isText.length) continue;
    block.push(cells.map((cell, i) => (isText[i] ? cell : cell === "" ? Number.NaN : Number(cell))));
    if (block.length < LINES) continue;
    yield block;
    block = [];
  }
  yield block;
}

const binaryColumns = (): BinaryColumn[] => {
  const [head = ""] = astrometryExtract({ seed: SEED, from: 0, to: 0 });
  return head.split(",").map((name) => ({ name, unit: UNITS[name] ?? "", characters: TEXTS[name] ?? null }));
};

const countRows = (stars: number): number => {
  let rows = 0;
  for (const block of blocksOf(stars)) rows += block.length;
  return rows;
};

const FILES: readonly { name: string; pieces(stars: number): Iterable<Buffer> }[] = [
  { name: "CSV", pieces: text },
  { name: "FITS", pieces: (stars) => fitsTable(binaryColumns(), blocksOf(stars), countRows(stars)) },
  { name: "VOTable BINARY2", pieces: (stars) => votableTable(binaryColumns(), blocksOf(stars)) },
];

const PAGE = 5_000;

/** The entries of an extract as the bytes that the server is given, column by column as they were written. */
async function* entriesOf(db: DataSource, id: string, columns: readonly string[]): AsyncGenerator<Buffer> {
  const list = columns.map((c) => `\`${c}\``).join(", ");
  for (let after = 0; ; ) {
    const rows = await readArrays(
      db,
      `SELECT \`row_number\`, ${list} FROM entry WHERE extract_id = ? AND \`row_number\` > ?
       ORDER BY \`row_number\` LIMIT ${PAGE}`,
      [id, after],
    );
    if (rows.length === 0) return;
    after = Number(rows.at(-1)?.[0]);
    yield Buffer.from(rows.map(([, ...values]) => `${encodeRow(values)}\n`).join(""));
  }
}

/** The same rows given to the server as they are, into the same table: no reading, converting or checking. */
const bareLoad = async (db: DataSource, path: string, columns: readonly string[]): Promise<void> => {
  const runner = db.createQueryRunner();
  const connection = (await runner.connect()) as PoolConnection;
  const list = columns.map((c) => `\`${c}\``).join(", ");
  await new Promise<void>((resolve, reject) => {
    connection.query(
      {
        sql: `LOAD DATA LOCAL INFILE 'rows' INTO TABLE entry (${list})`,
        infileStreamFactory: () => createReadStream(path),
      },
      (error) => (error ? reject(error) : resolve()),
    );
  });
  await runner.release();
};

/** An extract whose plan is as suggested, waiting for its import. */
const queueImport = async (deps: Deps, path: string): Promise<Extract> => {
  const { person, programme } = await buildMember(deps.db, { roles: ["curator"] });
  const key = `bench/${programme.id}/original`;
  const { bytes } = await deps.files.write(key, createReadStream(path));
  const preview = await previewOf(await readSample(deps.files, key, bytes));
  const columns = preview.columns.map((c) =>
    c.means === "ks_mag_err" ? { ...c, blankMarks: [BLANK_MARK] } : c,
  );
  const extract = await deps.db.manager.save(
    deps.db.manager.create(Extract, {
      programmeId: programme.id,
      number: 1,
      name: "Bench",
      state: "importing",
      fileName: "bench",
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
    payload: { extractId: extract.id },
    subject: { type: "extract", id: extract.id },
  });
  return extract;
};

/** A run that nobody watches. */
const runOf = async (deps: Deps, extract: Extract): Promise<JobRun> => ({
  deps,
  job: await deps.db.manager.findOneByOrFail(JobRow, { programmeId: extract.programmeId }),
  signal: new AbortController().signal,
  progress: async () => undefined,
  holdLease: async () => undefined,
});

const megabytes = (bytes: number): number => Math.round(bytes / 1e6);

const bench: Bench = {
  name: "import",
  rows: 100_000,
  run: async ({ rows, deps, folder }) => {
    const found: Measurement[] = [];
    let plain: Measurement["plain"];
    for (const { name, pieces } of FILES) {
      const path = join(folder, "stars");
      await pipeline(Readable.from(pieces(rows), { objectMode: false }), createWriteStream(path));
      const extract = await queueImport(deps, path);
      const plan = readingPlan.parse(extract.plan);
      const run = await runOf(deps, extract);
      const loading = await timed(async () => {
        const { counts } = await loadEntries(run, extract, plan);
        if (counts.accepted < rows * LEAST_ACCEPTED)
          throw new Error(`Of ${rows} rows ${counts.accepted} were accepted.`);
      });
      if (!plain) {
        const columns = [
          "extract_id",
          "row_number",
          "programme_id",
          "star_id",
          ...new EntryMapper(plan).written,
        ];
        const dumped = join(folder, "rows");
        await pipeline(entriesOf(deps.db, extract.id, columns), createWriteStream(dumped));
        await deps.db.query("TRUNCATE TABLE entry");
        const bare = await timed(() => bareLoad(deps.db, dumped, columns));
        plain = { what: "bare LOAD DATA LOCAL INFILE of the same rows", value: bare / 1000 };
        await deps.db.query("TRUNCATE TABLE entry");
        const whole = await timed(() => runNextJob(deps));
        found.push({
          what: `${rows.toLocaleString("en")} rows from the file to a catalogue that can be cut`,
          value: whole / 1000,
          unit: "s",
          plain,
        });
      }
      await deps.db.query("TRUNCATE TABLE entry");
      const size = megabytes(statSync(path).size);
      found.push({
        what: `${rows.toLocaleString("en")} rows × ${plan.columns.length} columns of ${name} (${size} MB) to rows of the entry table`,
        value: loading / 1000,
        unit: "s",
        plain,
      });
    }
    const peak = megabytes(process.resourceUsage().maxRSS * 1024);
    found.push({ what: "most memory that the process took", value: peak, unit: "MB" });
    return found;
  },
};

export default bench;
