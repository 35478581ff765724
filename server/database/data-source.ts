import type { TypeCast } from "mysql2";
import { DataSource } from "typeorm";
import { MIGRATIONS } from "#migrations/index.ts";
import { ENTITIES } from "./entities/index.ts";

/** The driver's own reading of a number of 16 digits may miss the last bit, and equal numbers must stay equal. */
const exactNumbers: TypeCast = (field, next) => {
  if (field.type !== "DOUBLE") return next();
  const text = field.string("latin1");
  return text === null ? null : Number(text);
};

/** A data source on that database. Times are UTC, text is utf8mb4, and the schema changes by migration alone. */
export const createDataSource = (url: string, poolSize = 10): DataSource =>
  new DataSource({
    type: "mariadb",
    url,
    entities: ENTITIES,
    migrations: MIGRATIONS,
    migrationsTransactionMode: "each",
    synchronize: false,
    timezone: "Z",
    charset: "utf8mb4",
    poolSize,
    extra: { connectTimeout: 10_000, typeCast: exactNumbers },
  });
