import { Column, Entity, Index, PrimaryGeneratedColumn, VersionColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** A file that describes the table of an extract, kept as it was brought. */
export interface Companion {
  fileName: string;
  bytes: number;
  sha256: string;
  /** In the file storage. */
  key: string;
}

/** A file brought in: its untouched original, how it is read, and what came of it. */
@Entity("extract")
@Index("extract_number", ["programmeId", "number"], { unique: true })
export class Extract {
  @PrimaryGeneratedColumn({ name: "extract_id", type: "bigint", unsigned: true })
  id!: string;

  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "varchar", length: 2000, default: "" })
  origin!: string;

  @Column({ type: "varchar", length: 12 })
  state!: "receiving" | "planning" | "importing" | "committed" | "withdrawn";

  @Column({ name: "is_invented", type: "boolean", default: false })
  isInvented!: boolean;

  @Column({ name: "file_name", type: "varchar", length: 255 })
  fileName!: string;

  /** Bytes announced, and bytes that have arrived. */
  @Column({ type: "bigint", unsigned: true })
  bytes!: string;

  @Column({ name: "received_bytes", type: "bigint", unsigned: true, default: 0 })
  receivedBytes!: string;

  /** Key of the original in the file storage; null until it is whole. */
  @Column({ name: "original_key", type: "varchar", length: 200, nullable: true })
  originalKey!: string | null;

  @Index("extract_sha256")
  @Column({ type: "char", length: 64, charset: "ascii", collation: "ascii_bin", nullable: true })
  sha256!: string | null;

  @Column({ type: "json", nullable: true })
  companion!: Companion | null;

  @Column({ ...idColumn, name: "uploaded_by" })
  uploadedBy!: string;

  /** shared/api/extracts: ExtractPreview and ReadingPlan. */
  @Column({ type: "json", nullable: true })
  preview!: unknown;

  @Column({ type: "json", nullable: true })
  plan!: unknown;

  /** shared/api/extracts: ColumnHealth of each used column; null until it is committed. */
  @Column({ type: "json", nullable: true })
  health!: unknown;

  @Column({ name: "rows_read", type: "int", unsigned: true, nullable: true })
  rowsRead!: number | null;

  @Column({ name: "rows_accepted", type: "int", unsigned: true, nullable: true })
  rowsAccepted!: number | null;

  @Column({ name: "rows_refused", type: "int", unsigned: true, nullable: true })
  rowsRefused!: number | null;

  @Column({ name: "rows_skipped", type: "int", unsigned: true, nullable: true })
  rowsSkipped!: number | null;

  @Column({ name: "new_stars", type: "int", unsigned: true, nullable: true })
  newStars!: number | null;

  @Column({ name: "failure_message", type: "text", nullable: true })
  failureMessage!: string | null;

  @Column({ name: "failure_hint", type: "text", nullable: true })
  failureHint!: string | null;

  /** Catalogue edition that its commit made. */
  @Column({ type: "int", unsigned: true, nullable: true })
  edition!: number | null;

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;

  @Column({ ...momentColumn, name: "committed_at", nullable: true })
  committedAt!: Date | null;

  @VersionColumn({ type: "int", unsigned: true })
  version!: number;
}
