import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** An attempt to sign in to an account that exists, for its person to see. */
@Entity('sign_in_attempts')
@Index('sign_in_attempts_user', ['userId', 'at'])
export class SignInAttempt {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'user_id' })
  userId: string;

  @Index('sign_in_attempts_at')
  @Column({ type: 'datetime', precision: 3 })
  at: Date;

  @Column({ type: 'boolean' })
  succeeded: boolean;

  @Column({ type: 'varchar', length: 45 })
  address: string;

  @Column({ type: 'varchar', length: 200 })
  browser: string;
}
