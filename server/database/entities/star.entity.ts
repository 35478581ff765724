import { EntitySchema, type EntitySchemaColumnOptions } from "typeorm";
import { givenColumns, stellarColumns } from "../star-table.ts";

/**
 * A star as one span of catalogue editions knows it: adopted values and what follows from them. A row is part of
 * edition n when `from_edition <= n` and `to_edition` is null or above n, so a new edition writes only the stars
 * that changed, and stays invisible until the programme's edition number moves.
 */
export interface Star {
  starId: string;
  fromEdition: number;
  toEdition: number | null;
  programmeId: string;
  [column: string]: unknown;
}

const keys: Record<string, EntitySchemaColumnOptions> = {
  programmeId: { name: "programme_id", type: "bigint", unsigned: true, primary: true },
  starId: { name: "star_id", type: "bigint", unsigned: true, primary: true },
  fromEdition: { name: "from_edition", type: "int", unsigned: true, primary: true },
  toEdition: { name: "to_edition", type: "int", unsigned: true, nullable: true },
};

export const StarEntity = new EntitySchema<Star>({
  name: "Star",
  tableName: "star",
  columns: { ...keys, ...givenColumns(), ...stellarColumns() },
  indices: [
    { name: "star_identifier", columns: ["programmeId", "source_id"] },
    { name: "star_designation", columns: ["programmeId", "designation"] },
    { name: "star_edition", columns: ["programmeId", "toEdition"] },
  ],
});
