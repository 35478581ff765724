import { DataSource } from "typeorm";
import { MIGRATIONS } from "#migrations/index.ts";
import { ENTITIES } from "./entities/index.ts";

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
    extra: { connectTimeout: 10_000 },
  });
