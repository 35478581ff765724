import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn } from "../columns.ts";

/**
 * One line of a logbook: who, what, when, before and after. Append-only; each line's hash covers the line before
 * it. The installation's own chain has programme 0.
 */
@Entity("logbook_line")
@Index("logbook_line_chain", ["programmeId", "sequence"], { unique: true })
export class LogbookLine {
  @PrimaryGeneratedColumn({ name: "logbook_line_id", type: "bigint", unsigned: true })
  id!: string;

  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  sequence!: number;

  @Column({ ...momentColumn, name: "at" })
  at!: Date;

  @Column({ ...idColumn, name: "person_id", nullable: true })
  personId!: string | null;

  /** The name at the time: it stays when the person leaves. */
  @Column({ type: "varchar", length: 120 })
  actor!: string;

  @Column({ type: "varchar", length: 60 })
  action!: string;

  @Column({ name: "subject_type", type: "varchar", length: 30 })
  subjectType!: string;

  @Column({ name: "subject_id", type: "varchar", length: 40 })
  subjectId!: string;

  @Column({ name: "subject_name", type: "varchar", length: 200 })
  subjectName!: string;

  /** JSON text as hashed, byte for byte. */
  @Column({ name: "before_json", type: "mediumtext", nullable: true })
  beforeJson!: string | null;

  @Column({ name: "after_json", type: "mediumtext", nullable: true })
  afterJson!: string | null;

  @Column({ ...hashColumn, name: "previous_hash" })
  previousHash!: string;

  @Column(hashColumn)
  hash!: string;
}
