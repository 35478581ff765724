import { Column, Entity, Index, PrimaryColumn } from "typeorm";
import { idColumn } from "../columns.ts";

/** A star in a target list, with the values it was put there on. */
@Entity("list_member")
@Index("list_member_place", ["listId", "place"])
export class ListMember {
  @PrimaryColumn({ ...idColumn, name: "target_list_id" })
  listId!: string;

  @PrimaryColumn({ ...idColumn, name: "star_id" })
  starId!: string;

  @Column({ type: "int", unsigned: true })
  place!: number;

  @Column({ type: "varchar", length: 8 })
  state!: "in" | "reserve" | "held" | "out";

  @Column({ type: "varchar", length: 2000, default: "" })
  reason!: string;

  /** Rule or person that brought it in, in words. */
  @Column({ name: "came_in", type: "varchar", length: 200 })
  cameIn!: string;

  /** shared/api/stars: StarRow as it was then. */
  @Column({ type: "json" })
  row!: unknown;
}
