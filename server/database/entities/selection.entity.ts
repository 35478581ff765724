import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** A saved selection, one version; `selectionId` names it through all its versions. */
@Entity("selection")
@Index("selection_version", ["selectionId", "number"], { unique: true })
export class SelectionVersion {
  @PrimaryGeneratedColumn({ name: "selection_version_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "selection_id", nullable: true })
  selectionId!: string | null;

  @Index("selection_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  note!: string;

  @Column({ type: "json" })
  cuts!: unknown;

  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
