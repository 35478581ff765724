import { Column, Entity, Index, PrimaryColumn } from "typeorm";
import { hashColumn, momentColumn } from "../columns.ts";

/** How often something was tried within a window of time; in the database, so that all web processes count together. */
@Entity("attempt_count")
export class AttemptCount {
  /** SHA-256 of who tries what: neither addresses nor accounts are kept readable. */
  @PrimaryColumn({ ...hashColumn, name: "key_hash" })
  keyHash!: string;

  @Column({ type: "int", unsigned: true })
  hits!: number;

  @Index("attempt_count_resets")
  @Column({ ...momentColumn, name: "resets_at" })
  resetsAt!: Date;
}
