import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn, nameColumn } from "../columns.ts";

/** One version of a reading plan that was given a name; `readingPlanId` names the plan through all its versions. */
@Entity("reading_plan")
@Index("reading_plan_version", ["readingPlanId", "number"], { unique: true })
@Index("reading_plan_header", ["programmeId", "headerHash"])
export class ReadingPlanVersion {
  @PrimaryGeneratedColumn({ name: "reading_plan_version_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "reading_plan_id", nullable: true })
  readingPlanId!: string | null;

  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  /** shared/api/extracts: ReadingPlan. */
  @Column({ type: "json" })
  plan!: unknown;

  /** SHA-256 of the column names in their order. */
  @Column({ ...hashColumn, name: "header_hash" })
  headerHash!: string;

  /** The middle of the sizes of each used column's numbers in the file that it was made for. */
  @Column({ type: "json" })
  profile!: unknown;

  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
