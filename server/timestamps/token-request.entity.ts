import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A signed head that has no token yet. Written with the signature, deleted with the token. */
@Entity('token_requests')
@Index('token_requests_due', ['nextAttemptAt'])
export class TokenRequest {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @PrimaryColumn({ type: 'int' })
  sequence: number;

  @Column({ type: 'int' })
  attempts: number;

  @Column({ type: 'varchar', length: 500, name: 'last_error', nullable: true })
  lastError: string | null;

  @Column({ type: 'datetime', precision: 3, name: 'next_attempt_at' })
  nextAttemptAt: Date;
}
