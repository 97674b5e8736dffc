import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** One entry of a study's record, as it was chained. Rows are only ever added. */
@Entity('record_entries')
@Index('record_entries_session', ['studyId', 'sessionNumber', 'sequence'])
export class RecordEntry {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @PrimaryColumn({ type: 'int' })
  sequence: number;

  /** The session that the entry belongs to, for reading; the payload holds it too. */
  @Column({ type: 'int', name: 'session_number', nullable: true })
  sessionNumber: number | null;

  /** ISO 8601 text, exactly as it is part of the digest. */
  @Column({ type: 'char', length: 24 })
  at: string;

  @Column({ type: 'varchar', length: 40 })
  kind: string;

  @Column({ type: 'int' })
  version: number;

  /** The payload's canonical text. */
  @Column({ type: 'mediumtext' })
  payload: string;

  @Column({ type: 'char', length: 32 })
  nonce: string;

  @Column({ type: 'char', length: 64 })
  previous: string;

  @Column({ type: 'char', length: 64 })
  digest: string;
}
