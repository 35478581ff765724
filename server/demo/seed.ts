import { readFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import type { DataSource } from "typeorm";
import { campaignBody, cardBody } from "#shared/api/instruments.ts";
import { meritBody } from "#shared/api/merits.ts";
import { selectionBody } from "#shared/api/selections.ts";
import { type Cut, viewToParams } from "#shared/catalogue/view.ts";
import type { Role } from "#shared/policy/roles.ts";
import type { Config } from "../config.ts";
import { Person } from "../database/entities/person.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { makeCampaign, makeCard } from "../instruments/service.ts";
import { makeList } from "../lists/make.ts";
import { moveList, readList } from "../lists/service.ts";
import { createLog } from "../log.ts";
import { makeMerit } from "../merit/service.ts";
import { addMember } from "../people/membership.ts";
import { createProgramme, readProgramme } from "../programmes/service.ts";
import { buildScanIndex } from "../scan/build.ts";
import { makeSelection } from "../selections/service.ts";
import { FolderStorage } from "../storage/folder-storage.ts";
import { bringExtract } from "./bring-extract.ts";
import { activateDemoPeople, type DemoPerson, isDemoPerson, makeDemoPeople } from "./people.ts";

export { demoSignIns } from "./people.ts";

const FOLDER = join(dirname(fileURLToPath(import.meta.url)), "../../data-demo");
/** Fewer than the stars within reach of the telescope, so that the figure of merit has something to choose. */
const LISTED = 80;
/** The list's own cut beside the selection's: stars that its telescope cannot measure are no targets. */
const WITHIN_REACH: Cut = { label: "Within reach", expression: "r_min <= 2", blanks: "drop" };
const ABOUT =
  "An invented sky to practise on: none of its stars exist. Two overlapping extracts of an invented release, two instruments, one list in review.";

const readJson = async (name: string): Promise<unknown> =>
  JSON.parse(await readFile(join(FOLDER, name), "utf8"));

/**
 * Whether the database is empty, or holds a seed that was cut short: nobody can sign in before the demo is whole, so
 * nobody but people of the demo, none of them active, is its mark.
 */
export const needsSeed = async (db: DataSource): Promise<boolean> =>
  (await db.manager.find(Person)).every((person) => isDemoPerson(person) && !person.isActive);

/** Takes away what a seed that was cut short left; only ever called where nobody could sign in yet. */
const empty = async (db: DataSource): Promise<void> => {
  for (const { tableName } of db.entityMetadatas) await db.query(`TRUNCATE TABLE \`${tableName}\``);
};

const personWith = (people: readonly DemoPerson[], role: Role): Person => {
  const found = people.find(({ roles }) => roles[0] === role);
  if (!found) throw new Error(`The demo has nobody with the role ${role}.`);
  return found.person;
};

const makeProgramme = async (deps: Deps, people: readonly DemoPerson[]): Promise<string> => {
  const administrator = personWith(people, "administrator");
  const programme = await createProgramme(
    deps,
    { ...administrator, isInstallationAdministrator: true },
    { name: "Small Suns", description: ABOUT, isInvented: true },
  );
  await inTransaction(deps.db, async (tx) => {
    for (const { person, roles } of people)
      await addMember(tx, { programmeId: programme.id, person, roles, by: administrator, at: deps.now() });
  });
  return programme.id;
};

/** Cards, campaigns, figure of merit and selections; answers the versions that the list is made with. */
const makeTools = async (deps: Deps, programmeId: string, people: readonly DemoPerson[]) => {
  const team = personWith(people, "instrument-team");
  const scientist = personWith(people, "scientist");
  await makeCard(deps, programmeId, team, cardBody.parse(await readJson("practice-30.json")));
  const heron = await makeCard(deps, programmeId, team, cardBody.parse(await readJson("heron-04.json")));
  await makeCampaign(deps, programmeId, team, campaignBody.parse(await readJson("practice-180d.json")));
  const nights = await makeCampaign(
    deps,
    programmeId,
    team,
    campaignBody.parse(await readJson("sixty-nights.json")),
  );
  const merit = await makeMerit(
    deps,
    programmeId,
    scientist,
    meritBody.parse(await readJson("small-suns-warm-rocks.json")),
  );
  const selections = selectionBody.array().parse(await readJson("selections.json"));
  for (const selection of selections) await makeSelection(deps, programmeId, scientist, selection);
  return {
    card: heron.versionId,
    campaign: nights.versionId,
    merit: merit.versionId,
    cuts: selections[0]?.cuts ?? [],
  };
};

const RELEASE = "Invented Survey 1";

const bringAstrometry = (deps: Deps, programmeId: string, curator: Person): Promise<void> =>
  bringExtract(deps, programmeId, curator, join(FOLDER, "astrometry.csv"), {
    name: "Astrometry and magnitudes",
    origin: "Invented: made by npm run generate with seed 2027. None of these stars exist.",
    release: RELEASE,
    epoch: null,
  });

const bringSpectra = (deps: Deps, programmeId: string, curator: Person): Promise<void> =>
  bringExtract(deps, programmeId, curator, join(FOLDER, "spectra.csv"), {
    name: "Spectra and light shares",
    origin: "Invented: made by npm run generate with seed 2027, layout spectra. Positions are for J2000.0.",
    release: RELEASE,
    epoch: 2000,
  });

const makeDemoList = async (
  deps: Deps,
  programmeId: string,
  scientist: Person,
  { card, campaign, merit, cuts }: Awaited<ReturnType<typeof makeTools>>,
): Promise<void> => {
  const view = viewToParams({
    edition: null,
    card,
    campaign,
    merit,
    cuts: [...cuts, WITHIN_REACH],
    sort: { key: "merit", direction: "desc" },
  });
  const { edition } = await readProgramme(deps, programmeId);
  await buildScanIndex(deps, {
    programmeId,
    edition: edition ?? 0,
    cardVersionId: card,
    campaignVersionId: campaign,
  });
  const { listId } = await makeList(deps, programmeId, scientist, {
    name: "Winter first light",
    note: "The first list to try the Heron telescope on.",
    view: view.toString(),
    first: LISTED,
  });
  const { version } = await readList(deps, programmeId, listId);
  await moveList(deps, programmeId, scientist, listId, { state: "in-review", version });
};

/** Fills an empty database with the practice programme, through the same services that people's requests go through. */
export const seedDemo = async (db: DataSource, config: Config): Promise<void> => {
  const deps: Deps = {
    config,
    log: createLog("error", "seed"),
    db,
    files: new FolderStorage(config.folders.files),
    now: () => new Date(),
  };
  await empty(db);
  const people = await makeDemoPeople(db.manager, deps.now());
  const programmeId = await makeProgramme(deps, people);
  const curator = personWith(people, "curator");
  await bringAstrometry(deps, programmeId, curator);
  // Between the extracts: an edition prepares a table for the instrument there is, and only the second is looked at.
  const tools = await makeTools(deps, programmeId, people);
  await bringSpectra(deps, programmeId, curator);
  await makeDemoList(deps, programmeId, personWith(people, "scientist"), tools);
  await activateDemoPeople(db, people);
};
