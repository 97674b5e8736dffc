import type { Relation } from 'typeorm';
import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique } from 'typeorm';
import type { RigPreset as Preset, Rig } from '#shared/protocol/rig-preset.ts';
import { Organisation } from '../organisations/organisation.entity.ts';

/** How an organisation makes a change at one kind of rig. A protocol holds a copy, never a reference. */
@Entity('rig_presets')
@Unique('rig_presets_shipped', ['organisationId', 'shipped'])
export class RigPreset {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('rig_presets_organisation')
  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'varchar', length: 60 })
  name: string;

  @Column({ type: 'varchar', length: 16 })
  kind: Rig;

  @Column({ type: 'json' })
  preset: Preset;

  /** Which of those that every organisation begins with; null for the others. */
  @Column({ type: 'varchar', length: 16, nullable: true })
  shipped: Rig | null;

  @Column({ type: 'boolean' })
  archived: boolean;

  @Column({ type: 'datetime', precision: 3, name: 'updated_at' })
  updatedAt: Date;

  @ManyToOne(() => Organisation)
  @JoinColumn({ name: 'organisation_id', foreignKeyConstraintName: 'rig_presets_organisation_fk' })
  organisation: Relation<Organisation>;
}
