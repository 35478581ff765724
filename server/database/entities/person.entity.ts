import { Column, Entity, PrimaryGeneratedColumn } from "typeorm";
import { momentColumn, nameColumn } from "../columns.ts";

/** Someone who can sign in. A deactivated person stays in history by name. */
@Entity("person")
export class Person {
  @PrimaryGeneratedColumn({ name: "person_id", type: "bigint", unsigned: true })
  id!: string;

  @Column({ type: "varchar", length: 254, unique: true })
  email!: string;

  @Column(nameColumn)
  name!: string;

  /** scrypt, with its parameters and salt in front; null until an invitation is accepted. */
  @Column({ name: "password_hash", type: "varchar", length: 255, nullable: true })
  passwordHash!: string | null;

  @Column({ name: "is_installation_administrator", type: "boolean", default: false })
  isInstallationAdministrator!: boolean;

  @Column({ name: "is_active", type: "boolean", default: true })
  isActive!: boolean;

  @Column({ type: "varchar", length: 20, nullable: true })
  theme!: string | null;

  @Column({ ...momentColumn, name: "created_at" })
  createdAt!: Date;
}
