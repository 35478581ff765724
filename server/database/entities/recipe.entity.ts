import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn, nameColumn } from "../columns.ts";

/** One version of a recipe; `recipeId` names the recipe through all its versions. */
@Entity("recipe")
@Index("recipe_version", ["recipeId", "number"], { unique: true })
export class RecipeVersion {
  @PrimaryGeneratedColumn({ name: "recipe_version_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "recipe_id", nullable: true })
  recipeId!: string | null;

  @Index("recipe_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  note!: string;

  @Column({ type: "json" })
  settings!: unknown;

  /** SHA-256 of the canonical JSON of the settings. */
  @Column({ ...hashColumn, name: "content_hash" })
  contentHash!: string;

  /** 0 where it came with the programme. */
  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
