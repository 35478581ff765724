import { Column, Entity, PrimaryGeneratedColumn } from "typeorm";
import { momentColumn } from "../columns.ts";

/** A message to send, or kept for the local mailbox where no mail server is set. */
@Entity("mail")
export class Mail {
  @PrimaryGeneratedColumn({ name: "mail_id", type: "bigint", unsigned: true })
  id!: string;

  @Column({ name: "to_address", type: "varchar", length: 254 })
  to!: string;

  @Column({ type: "varchar", length: 200 })
  subject!: string;

  @Column({ type: "text" })
  body!: string;

  @Column({ type: "varchar", length: 10 })
  state!: "kept" | "queued" | "sent" | "failed";

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;

  @Column({ ...momentColumn, name: "sent_at", nullable: true })
  sentAt!: Date | null;
}
