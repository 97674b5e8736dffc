import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** One listener's place in a session. The token is the seat; its digest is kept. */
@Entity('seats')
@Index('seats_label', ['sessionId', 'label'], { unique: true })
@Index('seats_study', ['studyId'])
export class Seat {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @Index('seats_session')
  @Column({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  /** L01, L02 ...: one label per listener and study, over all its sessions. */
  @Column({ type: 'varchar', length: 8 })
  label: string;

  @Column({ type: 'varchar', length: 24 })
  place: string;

  @Index('seats_token', { unique: true })
  @Column({ type: 'char', length: 64, name: 'token_digest' })
  tokenDigest: string;
}
