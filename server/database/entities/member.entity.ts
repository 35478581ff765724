import { Column, Entity, Index, PrimaryColumn } from "typeorm";
import { idColumn, momentColumn } from "../columns.ts";

/** A person's place in a programme, with the roles held there. */
@Entity("member")
export class Member {
  @PrimaryColumn({ ...idColumn, name: "programme_id" })
  programmeId!: string;

  @Index("member_person")
  @PrimaryColumn({ ...idColumn, name: "person_id" })
  personId!: string;

  @Column({ type: "json" })
  roles!: string[];

  @Column({ ...momentColumn, name: "since" })
  since!: Date;
}
