import { EntitySchema, type EntitySchemaColumnOptions } from "typeorm";
import { givenColumns } from "../star-table.ts";

/**
 * One extract's word on a star, one row per accepted row of the file. Rows of an import in progress stand here
 * already, each with the star it founds or was matched to; only entries of committed extracts count.
 */
export interface Entry {
  extractId: string;
  rowNumber: number;
  programmeId: string;
  starId: string | null;
  [column: string]: unknown;
}

const keys: Record<string, EntitySchemaColumnOptions> = {
  extractId: { name: "extract_id", type: "bigint", unsigned: true, primary: true },
  rowNumber: { name: "row_number", type: "int", unsigned: true, primary: true },
  programmeId: { name: "programme_id", type: "bigint", unsigned: true },
  starId: { name: "star_id", type: "bigint", unsigned: true, nullable: true },
};

export const EntryEntity = new EntitySchema<Entry>({
  name: "Entry",
  tableName: "entry",
  columns: { ...keys, ...givenColumns() },
  indices: [
    { name: "entry_star", columns: ["starId"] },
    { name: "entry_identifier", columns: ["programmeId", "source_id"] },
    { name: "entry_designation", columns: ["programmeId", "designation"] },
  ],
});
