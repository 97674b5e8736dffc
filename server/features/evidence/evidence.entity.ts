import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A file that answers a statement about a cable. Nothing of it changes. */
@Entity('evidence')
export class Evidence {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('evidence_cable')
  @Column({ type: 'uuid', name: 'cable_id' })
  cableId: string;

  @Column({ type: 'varchar', length: 60 })
  rule: string;

  @Column({ type: 'varchar', length: 500 })
  note: string;

  @Column({ type: 'char', length: 64, name: 'file_digest' })
  fileDigest: string;

  @Column({ type: 'varchar', length: 120, name: 'file_name' })
  fileName: string;

  @Column({ type: 'uuid', name: 'added_by' })
  addedBy: string;

  @Column({ type: 'datetime', precision: 3, name: 'added_at' })
  addedAt: Date;
}
