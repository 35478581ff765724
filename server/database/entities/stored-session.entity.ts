import { Column, Entity, Index, PrimaryColumn } from "typeorm";
import { idColumn, momentColumn } from "../columns.ts";

/** One browser's session. `personId` is lifted out of the data so that all sessions of a person can end at once. */
@Entity("session")
export class StoredSession {
  /** SHA-256 of the session id: a stolen table opens no session. */
  @PrimaryColumn({ name: "session_hash", type: "char", length: 64, charset: "ascii", collation: "ascii_bin" })
  hash!: string;

  @Index("session_person")
  @Column({ ...idColumn, name: "person_id", nullable: true })
  personId!: string | null;

  @Column({ type: "json" })
  data!: Record<string, unknown>;

  @Index("session_expires")
  @Column({ ...momentColumn, name: "expires_at" })
  expiresAt!: Date;
}
