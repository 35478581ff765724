import { Column, Entity, Index, PrimaryGeneratedColumn, VersionColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn, nameColumn } from "../columns.ts";

/** A target list, with everything it was made from. */
@Entity("target_list")
export class TargetList {
  @PrimaryGeneratedColumn({ name: "target_list_id", type: "bigint", unsigned: true })
  id!: string;

  @Index("target_list_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  note!: string;

  @Column({ type: "varchar", length: 12 })
  state!: "draft" | "in-review" | "agreed" | "issued" | "superseded" | "withdrawn";

  @Column({ name: "catalogue_edition", type: "int", unsigned: true })
  catalogueEdition!: number;

  @Column({ name: "view_params", type: "text" })
  viewParams!: string;

  @Column({ ...idColumn, name: "instrument_card_id", nullable: true })
  cardVersionId!: string | null;

  @Column({ ...idColumn, name: "campaign_version_id", nullable: true })
  campaignVersionId!: string | null;

  @Column({ ...idColumn, name: "merit_version_id", nullable: true })
  meritVersionId!: string | null;

  /** Version of the recipe that its stars' values were derived by. */
  @Column({ ...idColumn, name: "recipe_version_id" })
  recipeVersionId!: string;

  @Column(hashColumn)
  fingerprint!: string;

  @Column({ ...idColumn, name: "made_by" })
  madeBy!: string;

  @Column({ ...momentColumn, name: "made_at" })
  madeAt!: Date;

  @VersionColumn({ type: "int", unsigned: true })
  version!: number;
}
