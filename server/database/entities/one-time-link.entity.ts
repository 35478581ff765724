import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { hashColumn, idColumn, momentColumn } from "../columns.ts";

/** An invitation or a password reset sent by mail: single use, expiring, only the hash of its token kept. */
@Entity("one_time_link")
export class OneTimeLink {
  @PrimaryGeneratedColumn({ name: "one_time_link_id", type: "bigint", unsigned: true })
  id!: string;

  @Column({ type: "varchar", length: 20 })
  purpose!: "invitation" | "password-reset";

  @Index("one_time_link_token", { unique: true })
  @Column({ ...hashColumn, name: "token_hash" })
  tokenHash!: string;

  @Column({ type: "varchar", length: 254 })
  email!: string;

  @Column({ ...idColumn, name: "person_id", nullable: true })
  personId!: string | null;

  @Index("one_time_link_programme")
  @Column({ ...idColumn, name: "programme_id", nullable: true })
  programmeId!: string | null;

  @Column({ type: "json", nullable: true })
  roles!: string[] | null;

  @Column({ ...idColumn, name: "made_by", nullable: true })
  madeBy!: string | null;

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;

  @Column({ ...momentColumn, name: "expires_at" })
  expiresAt!: Date;

  @Column({ ...momentColumn, name: "used_at", nullable: true })
  usedAt!: Date | null;

  @Column({ ...momentColumn, name: "withdrawn_at", nullable: true })
  withdrawnAt!: Date | null;
}
