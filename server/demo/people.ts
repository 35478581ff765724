import type { DataSource, EntityManager } from "typeorm";
import type { Role } from "#shared/policy/roles.ts";
import { hashPassword, verifyPassword } from "../auth/password.ts";
import { Person } from "../database/entities/person.entity.ts";

/** One invented person for each role, named by it: nobody here is real. */
const PEOPLE: readonly {
  email: string;
  name: string;
  roles: readonly Role[];
  isInstallationAdministrator?: true;
}[] = [
  { email: "curator@example.org", name: "Demo Curator", roles: ["curator"] },
  { email: "scientist@example.org", name: "Demo Scientist", roles: ["scientist"] },
  { email: "reviewer@example.org", name: "Demo Reviewer", roles: ["reviewer"] },
  { email: "lead@example.org", name: "Demo Lead", roles: ["lead"] },
  { email: "instrument@example.org", name: "Demo Instrument Team", roles: ["instrument-team"] },
  { email: "guest@example.org", name: "Demo Guest", roles: ["guest"] },
  {
    email: "administrator@example.org",
    name: "Demo Administrator",
    roles: ["administrator", "curator", "scientist"],
    isInstallationAdministrator: true,
  },
];

/** Known to anyone who can read this: only demo installations have it. */
const DEMO_PASSWORD = "small-suns-practice";

export interface DemoPerson {
  person: Person;
  roles: readonly Role[];
}

/** Known by address and name. */
export const isDemoPerson = (person: Pick<Person, "email" | "name">): boolean =>
  PEOPLE.some(({ email, name }) => email === person.email && name === person.name);

/** Makes the people of the demo; none can sign in before `activateDemoPeople`. */
export const makeDemoPeople = async (tx: EntityManager, at: Date): Promise<DemoPerson[]> => {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const made: DemoPerson[] = [];
  for (const { roles, isInstallationAdministrator = false, email, name } of PEOPLE) {
    const row = tx.create(Person, {
      email,
      name,
      passwordHash,
      isInstallationAdministrator,
      isActive: false,
      theme: null,
      createdAt: at,
    });
    made.push({ person: await tx.save(Person, row), roles });
  }
  return made;
};

/** The last step of the seed: from here on it counts as whole. */
export const activateDemoPeople = async (db: DataSource, people: readonly DemoPerson[]): Promise<void> => {
  await db.manager.update(
    Person,
    people.map(({ person }) => person.id),
    { isActive: true },
  );
};

/** Who of the demo can still sign in with the password they were made with; none where this is no demo. */
export const demoSignIns = async (
  db: DataSource,
): Promise<{ email: string; password: string; roles: string }[]> => {
  const signIns: { email: string; password: string; roles: string }[] = [];
  for (const { email, name, roles } of PEOPLE) {
    const person = await db.manager.findOneBy(Person, { email, name, isActive: true });
    if (person?.passwordHash && (await verifyPassword(DEMO_PASSWORD, person.passwordHash)))
      signIns.push({ email, password: DEMO_PASSWORD, roles: roles.join(", ") });
  }
  return signIns;
};
