import type { Relation } from 'typeorm';
import { Column, Entity, Index, JoinColumn, ManyToOne, OneToMany, PrimaryColumn } from 'typeorm';
import type { CableDraft } from '#shared/contracts/cables.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { Organisation } from '../organisations/organisation.entity.ts';
import { Specimen } from './specimen.entity.ts';

/** A cable: a design or model. Its physical pieces are specimens. */
@Entity('cables')
export class Cable {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('cables_organisation')
  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'varchar', length: 120 })
  name: string;

  @Column({ type: 'varchar', length: 16 })
  kind: CableDraft['kind'];

  @Column({ type: 'int', name: 'length_mm' })
  lengthMm: number;

  @Column({ type: 'text' })
  description: string;

  /** Null for a cable of which nothing was ever said. */
  @Column({ type: 'json', nullable: true })
  construction: Construction | null;

  @Column({ type: 'boolean' })
  archived: boolean;

  @Column({ type: 'datetime', precision: 3, name: 'updated_at' })
  updatedAt: Date;

  @OneToMany(
    () => Specimen,
    (specimen) => specimen.cable,
  )
  specimens: Relation<Specimen[]>;

  @ManyToOne(() => Organisation)
  @JoinColumn({ name: 'organisation_id', foreignKeyConstraintName: 'cables_organisation_fk' })
  organisation: Relation<Organisation>;
}
