import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A witness who is asked to watch a session. The record knows the label alone, and the name where they agree. */
@Entity('observers')
@Index('observers_label', ['sessionId', 'label'], { unique: true })
export class Observer {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  /** W1, W2 ... in the session. */
  @Column({ type: 'varchar', length: 8 })
  label: string;

  @Column({ type: 'varchar', length: 80 })
  name: string;

  @Column({ type: 'varchar', length: 320 })
  email: string;

  @Column({ type: 'datetime', precision: 3, name: 'invited_at' })
  invitedAt: Date;

  /** The link has ended. */
  @Column({ type: 'boolean' })
  withdrawn: boolean;
}
