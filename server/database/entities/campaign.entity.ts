import { Column, Entity, Index, PrimaryGeneratedColumn } from "typeorm";
import { idColumn, momentColumn, nameColumn } from "../columns.ts";

/** One version of a campaign: how long, how often, how sure. `campaignId` names it through all its versions. */
@Entity("campaign")
@Index("campaign_version", ["campaignId", "number"], { unique: true })
export class CampaignVersion {
  @PrimaryGeneratedColumn({ name: "campaign_version_id", type: "bigint", unsigned: true })
  id!: string;

  /** Id of the first version. */
  @Column({ ...idColumn, name: "campaign_id", nullable: true })
  campaignId!: string | null;

  @Index("campaign_programme")
  @Column({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  number!: number;

  @Column(nameColumn)
  name!: string;

  @Column({ type: "json" })
  settings!: unknown;

  @Column({ ...idColumn, name: "saved_by" })
  savedBy!: string;

  @Column({ ...momentColumn, name: "saved_at" })
  savedAt!: Date;
}
