import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { StudyDraft, StudyState } from '#shared/contracts/studies.ts';

@Entity('studies')
export class Study {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('studies_organisation')
  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  /** The neutral title; the draft holds it too. A column so that lists can search it. */
  @Column({ type: 'varchar', length: 80 })
  title: string;

  @Column({ type: 'varchar', length: 16 })
  state: StudyState;

  @Column({ type: 'uuid', name: 'manager_id' })
  managerId: string;

  @Index('studies_code_holder')
  @Column({ type: 'uuid', name: 'code_holder_id' })
  codeHolderId: string;

  /** What the manager typed, whole, by the contract's `studyDraft`. Once sealed only an amendment changes it. */
  @Column({ type: 'json' })
  draft: StudyDraft;

  /** The canonical text of the protocol in force; null while it is a draft. */
  @Column({ type: 'mediumtext', nullable: true })
  protocol: string | null;

  /** The head of the study's record. Locked by whoever appends. */
  @Column({ type: 'int', name: 'head_sequence' })
  headSequence: number;

  @Column({ type: 'char', length: 64, name: 'head_digest', nullable: true })
  headDigest: string | null;

  @Column({ type: 'varchar', length: 16, name: 'codes_state' })
  codesState: 'none' | 'drawn' | 'confirmed';

  @Column({ type: 'datetime', precision: 3, name: 'updated_at' })
  updatedAt: Date;
}
