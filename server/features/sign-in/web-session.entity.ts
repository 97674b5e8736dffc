import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A signed-in browser, as express-session keeps it. */
@Entity('web_sessions')
export class WebSession {
  /** SHA-256 of the session id: a copy of this table opens no session. */
  @PrimaryColumn({ type: 'char', length: 64, name: 'id_digest' })
  idDigest: string;

  @Index('web_sessions_user')
  @Column({ type: 'uuid', name: 'user_id', nullable: true })
  userId: string | null;

  @Column({ type: 'text' })
  data: string;

  /** The network address and the browser that signed in. */
  @Column({ type: 'varchar', length: 45, default: '' })
  address: string;

  @Column({ type: 'varchar', length: 200, default: '' })
  browser: string;

  @Column({ type: 'datetime', precision: 3, name: 'signed_in_at', default: () => 'CURRENT_TIMESTAMP(3)' })
  signedInAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'last_seen_at', default: () => 'CURRENT_TIMESTAMP(3)' })
  lastSeenAt: Date;

  @Index('web_sessions_expires')
  @Column({ type: 'datetime', precision: 3, name: 'expires_at' })
  expiresAt: Date;
}
