import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('organisations')
export class Organisation {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'varchar', length: 120 })
  name: string;

  /** The demo's organisation, made by this program for a first look. */
  @Column({ type: 'boolean' })
  demo: boolean;

  @Column({ type: 'datetime', precision: 3, name: 'created_at' })
  createdAt: Date;
}
