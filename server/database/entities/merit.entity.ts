import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** A figure of merit, one version; `meritId` names it through all its versions. */
@Entity("merit")
@Index("merit_version", ["meritId", "number"], { unique: true })
export class MeritVersion {
  @PrimaryGeneratedColumn({ name: "merit_version_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "merit_id", nullable: true })
  meritId!: string | null;

  @Index("merit_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  note!: string;

  @Column({ type: "json" })
  terms!: unknown;

  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
