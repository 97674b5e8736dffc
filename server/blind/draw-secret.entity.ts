import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A session's part of its draw: the second secret. No other table has a relation to this one. */
@Entity('draw_secrets')
export class DrawSecret {
  @PrimaryColumn({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @Column({ type: 'char', length: 64 })
  secret: string;

  @Column({ type: 'char', length: 64 })
  salt: string;
}
