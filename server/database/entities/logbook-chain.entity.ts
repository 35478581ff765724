import { Column, Entity, PrimaryColumn } from "typeorm";
import { hashColumn, idColumn } from "../columns.ts";

/** The head of each chain: locked while a line is appended, so that two writers cannot fork it. */
@Entity("logbook_chain")
export class LogbookChain {
  @PrimaryColumn({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Column({ type: "int", unsigned: true })
  sequence!: number;

  @Column(hashColumn)
  hash!: string;
}
