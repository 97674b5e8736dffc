import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

@Entity('password_resets')
export class PasswordReset {
  /** SHA-256 of the link's token. */
  @PrimaryColumn({ type: 'char', length: 64, name: 'token_digest' })
  tokenDigest: string;

  @Index('password_resets_user')
  @Column({ type: 'uuid', name: 'user_id' })
  userId: string;

  @Column({ type: 'datetime', precision: 3, name: 'expires_at' })
  expiresAt: Date;
}
