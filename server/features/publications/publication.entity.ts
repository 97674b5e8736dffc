import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A published study: a frozen document at a stable address. Only its withdrawal is ever added. */
@Entity('publications')
export class Publication {
  /** The short id in its address. */
  @PrimaryColumn({ type: 'char', length: 8 })
  id: string;

  @Index('publications_study', { unique: true })
  @Column({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @Index('publications_organisation')
  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  /** For lists; the document says the same. */
  @Column({ type: 'varchar', length: 80 })
  title: string;

  @Column({ type: 'varchar', length: 500 })
  headline: string;

  /** The organisation by the name that it published under. */
  @Column({ type: 'varchar', length: 120 })
  publisher: string;

  /** SHA-256 of the document's bytes. */
  @Column({ type: 'char', length: 64 })
  digest: string;

  /** The canonical text, exactly as it is downloaded; left out of every query that does not ask for it. */
  @Column({ type: 'longtext', select: false })
  document: string;

  @Column({ type: 'int' })
  bytes: number;

  @Index('publications_published')
  @Column({ type: 'datetime', precision: 3, name: 'published_at' })
  publishedAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'withdrawn_at', nullable: true })
  withdrawnAt: Date | null;

  @Column({ type: 'varchar', length: 500, name: 'withdrawn_reason', nullable: true })
  withdrawnReason: string | null;
}
