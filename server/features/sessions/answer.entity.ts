import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A listener's answer to one trial: beside the record, which carries its leaf from the lock on. */
@Entity('answers')
@Index('answers_trial', ['sessionId', 'trial'])
export class Answer {
  @PrimaryColumn({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @PrimaryColumn({ type: 'int' })
  trial: number;

  @PrimaryColumn({ type: 'varchar', length: 8 })
  seat: string;

  /** A late answer is kept and never counted. */
  @PrimaryColumn({ type: 'boolean' })
  late: boolean;

  @Column({ type: 'int' })
  revision: number;

  @Column({ type: 'varchar', length: 16 })
  choice: string;

  @Column({ type: 'varchar', length: 16, nullable: true })
  confidence: string | null;

  @Column({ type: 'char', length: 32 })
  salt: string;

  @Column({ type: 'char', length: 64 })
  leaf: string;

  @Column({ type: 'datetime', precision: 3, name: 'held_at' })
  heldAt: Date;
}
