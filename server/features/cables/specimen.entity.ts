import type { Relation } from 'typeorm';
import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn } from 'typeorm';
import { Cable } from './cable.entity.ts';

/** One physical piece of a cable. */
@Entity('specimens')
export class Specimen {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('specimens_cable')
  @Column({ type: 'uuid', name: 'cable_id' })
  cableId: string;

  @Column({ type: 'varchar', length: 60 })
  serial: string;

  @Column({ type: 'varchar', length: 500 })
  note: string;

  @Column({ type: 'boolean' })
  archived: boolean;

  @Column({ type: 'int' })
  position: number;

  @ManyToOne(
    () => Cable,
    (cable) => cable.specimens,
  )
  @JoinColumn({ name: 'cable_id', foreignKeyConstraintName: 'specimens_cable_fk' })
  cable: Relation<Cable>;
}
