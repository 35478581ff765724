import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** One version of an instrument card; `instrumentId` names the card through all its versions. */
@Entity("instrument_card")
@Index("instrument_card_version", ["instrumentId", "number"], { unique: true })
export class InstrumentCardVersion {
  @PrimaryGeneratedColumn({ name: "instrument_card_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "instrument_id", nullable: true })
  instrumentId!: string | null;

  @Index("instrument_card_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  /** Where its numbers come from; without one, every number made with it is marked unverified. */
  @Column({ type: "varchar", length: 2000, default: "" })
  source!: string;

  @Column({ type: "json" })
  settings!: unknown;

  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
