import { Column, Entity, PrimaryGeneratedColumn, VersionColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** Everything one team can see hangs off its programme. */
@Entity("programme")
export class Programme {
  @PrimaryGeneratedColumn({ name: "programme_id", type: "bigint", unsigned: true })
  id!: string;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  description!: string;

  /** Its sky is invented: said on every screen and in every file. */
  @Column({ name: "is_invented", type: "boolean", default: false })
  isInvented!: boolean;

  /** Version of the recipe in force. */
  @Column({ ...idColumn, name: "recipe_version_id", default: 0 })
  recipeVersionId!: string;

  /** Number of the catalogue edition in force; 0 before the first. Moving it is what makes an edition visible. */
  @Column({ type: "int", unsigned: true, default: 0 })
  edition!: number;

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;

  @VersionColumn({ type: "int", unsigned: true })
  version!: number;
}
