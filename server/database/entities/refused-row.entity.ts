import { Column, Entity, PrimaryColumn } from "typeorm";
import { idColumn } from "../columns.ts";

/** A row that was not accepted, kept as it was. */
@Entity("refused_row")
export class RefusedRow {
  @PrimaryColumn({ ...idColumn, name: "extract_id" })
  extractId!: string;

  @PrimaryColumn({ name: "line_number", type: "int", unsigned: true })
  lineNumber!: number;

  @Column({ type: "varchar", length: 500 })
  reason!: string;

  @Column({ type: "mediumtext" })
  text!: string;
}
