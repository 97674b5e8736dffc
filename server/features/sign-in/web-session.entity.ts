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

  @Index('web_sessions_expires')
  @Column({ type: 'datetime', precision: 3, name: 'expires_at' })
  expiresAt: Date;
}
