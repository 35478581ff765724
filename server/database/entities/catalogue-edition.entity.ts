import { Column, Entity, PrimaryColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn } from "../columns.ts";

/** A numbered state of the catalogue that never changes again. */
@Entity("catalogue_edition")
export class CatalogueEdition {
  @PrimaryColumn({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @PrimaryColumn({ type: "int", unsigned: true })
  number!: number;

  /** What made it, in words: "extract 2, Northern motions". */
  @Column({ type: "varchar", length: 200 })
  reason!: string;

  /** Version of the recipe that it was derived by. */
  @Column({ ...idColumn, name: "recipe_version_id" })
  recipeVersionId!: string;

  @Column({ type: "int", unsigned: true })
  stars!: number;

  /** SHA-256 over the stars and their values in a stated order. */
  @Column(hashColumn)
  fingerprint!: string;

  @Column({ ...momentColumn, name: "made_at" })
  madeAt!: Date;

  @Column({ ...idColumn, name: "made_by", nullable: true })
  madeBy!: string | null;
}
