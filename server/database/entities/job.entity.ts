import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { idColumn, momentColumn } from "../columns.ts";

/** Work longer than a request. Claimed under a lease that its worker renews; a lease that ran out is claimed anew. */
@Entity("job")
@Index("job_claim", ["state", "runAt"])
@Index("job_subject", ["programmeId", "subjectType", "subjectId"])
export class JobRow {
  @PrimaryGeneratedColumn({ name: "job_id", type: "bigint", unsigned: true })
  id!: string;

  /** Null for work of the installation itself, such as mail. */
  @Column({ ...idColumn, name: "programme_id", nullable: true })
  programmeId!: string | null;

  @Column({ ...idColumn, name: "person_id", nullable: true })
  personId!: string | null;

  @Column({ type: "varchar", length: 30 })
  kind!: string;

  @Column({ type: "varchar", length: 10 })
  state!: "queued" | "running" | "done" | "failed" | "cancelled";

  @Column({ type: "json" })
  payload!: Record<string, unknown>;

  @Column({ type: "varchar", length: 120, default: "" })
  phase!: string;

  @Column({ type: "double", default: 0 })
  done!: number;

  @Column({ type: "double", nullable: true })
  total!: number | null;

  @Column({ type: "varchar", length: 20, default: "" })
  unit!: string;

  @Column({ name: "subject_type", type: "varchar", length: 30, nullable: true })
  subjectType!: string | null;

  @Column({ name: "subject_id", type: "varchar", length: 40, nullable: true })
  subjectId!: string | null;

  @Column({ name: "error_message", type: "text", nullable: true })
  errorMessage!: string | null;

  @Column({ name: "error_hint", type: "text", nullable: true })
  errorHint!: string | null;

  @Column({ type: "int", unsigned: true, default: 0 })
  attempts!: number;

  @Column({ name: "cancel_requested", type: "boolean", default: false })
  cancelRequested!: boolean;

  @Column({ ...momentColumn, name: "run_at" })
  runAt!: Date;

  @Column({ name: "lease_owner", type: "varchar", length: 64, nullable: true })
  leaseOwner!: string | null;

  @Column({ ...momentColumn, name: "lease_until", nullable: true })
  leaseUntil!: Date | null;

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;

  @Column({ ...momentColumn, name: "changed_at" })
  changedAt!: Date;

  @Column({ ...momentColumn, name: "finished_at", nullable: true })
  finishedAt!: Date | null;
}
