import type { DataSource } from "typeorm";
import { hashPassword } from "#server/auth/password.ts";
import { Member } from "#server/database/entities/member.entity.ts";
import { Person } from "#server/database/entities/person.entity.ts";
import { Programme } from "#server/database/entities/programme.entity.ts";
import { addShippedRecipes } from "#server/recipes/shipped.ts";
import type { Role } from "#shared/policy/roles.ts";

/** Of everyone the factories make. */
export const PASSWORD = "a long enough pass phrase";
let passwordHash: Promise<string> | undefined;

let count = 0;
const next = (): number => ++count;

/** Someone who can sign in with `PASSWORD`. */
export const buildPerson = async (db: DataSource, more: Partial<Person> = {}): Promise<Person> => {
  passwordHash ??= hashPassword(PASSWORD);
  const n = next();
  return db.manager.save(
    db.manager.create(Person, {
      email: `person-${n}@example.org`,
      name: `Person ${n}`,
      passwordHash: await passwordHash,
      isInstallationAdministrator: false,
      isActive: true,
      theme: null,
      createdAt: new Date(),
      ...more,
    }),
  );
};

/** A programme with the recipes that every programme has, deriving by the one named. */
export const buildProgramme = async (
  db: DataSource,
  { recipe = "default", ...more }: Partial<Programme> & { recipe?: "default" | "practice" } = {},
): Promise<Programme> => {
  const programme = await db.manager.save(
    db.manager.create(Programme, {
      name: `Programme ${next()}`,
      description: "",
      isInvented: true,
      edition: 0,
      createdAt: new Date(),
      ...more,
    }),
  );
  const ids = await addShippedRecipes(db.manager, programme.id, programme.createdAt);
  programme.recipeVersionId = ids[recipe];
  await db.query("UPDATE programme SET recipe_version_id = ? WHERE programme_id = ?", [
    programme.recipeVersionId,
    programme.id,
  ]);
  return programme;
};

interface MemberParts {
  roles: readonly Role[];
  person?: Person;
  programme?: Programme;
}

/** A person with those roles in a programme; either is made when it is not given. */
export const buildMember = async (
  db: DataSource,
  parts: MemberParts,
): Promise<{ person: Person; programme: Programme; member: Member }> => {
  const person = parts.person ?? (await buildPerson(db));
  const programme = parts.programme ?? (await buildProgramme(db));
  const member = await db.manager.save(
    db.manager.create(Member, {
      programmeId: programme.id,
      personId: person.id,
      roles: [...parts.roles],
      since: new Date(),
    }),
  );
  return { person, programme, member };
};
